import type { Planted, TellingScene } from './scene.ts';

/** One request: its route as declared, and what is put into it. */
export interface Question {
  route: string;
  path: string;
  query?: Record<string, string>;
  body?: Record<string, unknown>;
}

const GROUPINGS = ['laboratory', 'class', 'nominal', 'year'] as const;
const FILES = [
  'drawing.svg',
  'drawing.pdf',
  'chain.json',
  'take-along.html',
  'strip.pdf',
  'statement.json',
  'statement.pdf',
] as const;

const get = (
  route: string,
  params: Record<string, string>,
  query: Record<string, string> = {},
): Question => ({
  ...{ route: `GET ${route}`, query },
  path: route.replace(/:(\w+)/g, (_, name: string) => params[name]!),
});

/** Each way of changing a value. */
export function changesOf({ uid, revisionId }: Planted): Record<string, unknown>[] {
  return [
    { kind: 'shift', valueUid: uid, shift: '0.00021' },
    { kind: 'raise', valueUid: uid, addedU: 0.00019 },
    { kind: 'withdraw', revisionId },
  ];
}

/** What is asked of a value by everybody: each route once, so that each role is tried on each. */
export function shortQuestions(value: Planted, scene: TellingScene): Question[] {
  const { uid, standardId, revisionId } = value;
  const params = { valueUid: uid, uid, standardId, revisionId };
  const other = Object.values(scene.values).find((one) => one.uid !== uid)!;
  const [shift, , withdraw] = changesOf(value);
  return [
    get('/api/chains/:valueUid', params),
    get('/api/chains/:valueUid/life', params),
    get('/api/chains/:valueUid/distance', params),
    get('/api/chains/:valueUid/covariance/:otherUid', { ...params, otherUid: other.uid }),
    together(value, other),
    get('/api/downstream/:uid', params, { by: 'year' }),
    get('/api/exposure/:standardId', params, WINDOW),
    whatIf({ changes: [shift], by: 'laboratory' }),
    { route: 'POST /api/what-if/named', path: '/api/what-if/named', body: { changes: [shift, withdraw] } },
    get('/api/standards/:standardId', params),
    get('/api/calibrations/:revisionId', params),
    ...FILES.map((file) => get(`/api/chains/:valueUid/${file}`, params)),
  ];
}

const WINDOW = { lastGood: '2024-01-01', firstBad: '2025-12-31' };

function together({ uid }: Planted, other: Planted): Question {
  return {
    ...{ route: 'POST /api/chains/together', path: '/api/chains/together' },
    body: { valueUids: [uid, other.uid] },
  };
}

/** The same in every wording, of a value that the person may ask about. */
export function longQuestions(value: Planted, scene: TellingScene): Question[] {
  const { uid, standardId } = value;
  const params = { valueUid: uid, uid, standardId };
  const others = Object.values(scene.values).filter((other) => other.uid !== uid);
  const wordings = [
    { as: 'now known' },
    { checks: 'packed' },
    { day: '2024-08-01' },
    { known: '2024-08-01' },
  ] as Record<string, string>[];
  return [
    ...wordings.map((query) => get('/api/chains/:valueUid', params, query)),
    ...others.map(({ uid: otherUid }) =>
      get('/api/chains/:valueUid/covariance/:otherUid', { ...params, otherUid }),
    ),
    ...others.map((other) => together(value, other)),
    ...GROUPINGS.flatMap((by) => [
      get('/api/downstream/:uid', params, { by }),
      get('/api/downstream/:uid', { uid: standardId }, { by }),
      get('/api/exposure/:standardId', params, { by, ...WINDOW }),
    ]),
    ...changesOf(value).flatMap((change) =>
      GROUPINGS.map((by) => whatIf({ changes: [change], by, threshold: 0 })),
    ),
    ...['statement.json', 'take-along.html'].map((file) =>
      get(`/api/chains/:valueUid/${file}`, params, { as: 'now known', verdict: 'conduct' }),
    ),
    ...others.slice(-3).map((other) => get('/api/chains/:valueUid/drawing.svg', params, { with: other.uid })),
  ];
}

export function whatIf(body: Record<string, unknown>): Question {
  return { route: 'POST /api/what-if', path: '/api/what-if', body };
}

/** Lists and searches, for every text by which a value could be looked for. */
export function searchesFor(
  { registryNo, marking, certificateNo, holder, issuer }: Planted,
  scene: TellingScene,
): Question[] {
  const { laboratories } = scene;
  const texts = [registryNo, marking, certificateNo];
  return [
    ...texts.flatMap((q) => [
      get('/api/chains', {}, { q }),
      get('/api/find', {}, { q }),
      get('/api/standards', {}, { q }),
      get('/api/calibrations', {}, { q, sort: 'issuedOn' }),
    ]),
    ...[holder, issuer].flatMap((name) => [
      get('/api/standards', {}, { laboratory: laboratories[name].id }),
      get('/api/calibrations', {}, { laboratory: laboratories[name].id, sort: '-issuedOn' }),
    ]),
  ];
}

/** What is asked without naming anything. */
export function generalQuestions(scene: TellingScene): Question[] {
  return [
    get('/api/desk', {}),
    get('/api/chains', {}, { q: '' }),
    get('/api/chains', {}, { q: '', failing: '1' }),
    get('/api/standards', {}),
    get('/api/calibrations', {}),
    get('/api/dry-runs', {}),
    get('/api/audits', {}),
    get('/api/notices', {}),
    get('/api/scale-versions', {}),
    get('/api/notices/:noticeId', { noticeId: scene.noticeId }),
    get('/api/notices/:noticeId', { noticeId: scene.noticeId }, { limit: '1' }),
  ];
}
