import { randomUUID } from 'node:crypto';
import { makeStandard } from '#tests/support/calibration-factories.ts';
import { freeRegistryNo } from '#tests/support/factories.ts';
import {
  dryRunOf,
  fullSheet,
  looseCalibration,
  makeAudit,
  makeDraft,
  ownFindingOf,
  makeDryRun,
  WALKERS,
  type Scene,
  type Walker,
} from './scene.ts';
import { makeNotice, noticeOf } from './notices.ts';

export interface WalkRequest {
  path: string;
  query?: Record<string, string>;
  body?: unknown;
  /** Sent as application/pdf. */
  file?: Buffer;
}

/** One route, walked: a request that is right in every way, and who may make it. */
export interface WalkRow {
  /** Made anew for each walker, so that an act of one does not stand in another's way. */
  request(scene: Scene, walker: Walker): WalkRequest | Promise<WalkRequest>;
  may: readonly Walker[];
  /** Status for those who may. */
  ok: 200 | 201;
  /** Status for the others who are signed in: 404 where they may not even know; `hidden`: 403 for who reads home. */
  otherwise: 403 | 404 | 'hidden';
  /** The request ends the session it is sent in. */
  endsSession?: boolean;
}

const EVERYBODY = WALKERS;
const SIGNED_IN = WALKERS.filter((walker) => walker !== 'nobody');
/** Who reads home in full. */
export const READERS: readonly Walker[] = [
  'registrar',
  'laboratory administrator',
  'metrologist',
  'signatory',
  'reader',
  'assessor',
];

/** Who writes in home's name. */
const WRITERS: readonly Walker[] = ['registrar', 'laboratory administrator', 'metrologist'];

const WEIGHT = {
  nominal: '1000',
  marking: '1 kg',
  serial: '77',
  shape: 'knob',
  material: 'stainless steel',
  class: 'E2',
  density: { value: '7950', expandedU: '140', k: '2', origin: 'assumed' },
};

const fixed = (path: string, query?: Record<string, string>) => () => ({ path, query });

/** Every route by `METHOD path`, as declared. The walk fails where a route has no row here. */
export const WALK: Readonly<Record<string, WalkRow>> = {
  // health and identity
  'GET /api/health': { request: fixed('/api/health'), may: EVERYBODY, ok: 200, otherwise: 403 },
  'GET /api/health/session': {
    request: fixed('/api/health/session'),
    may: SIGNED_IN,
    ok: 200,
    otherwise: 403,
  },
  'GET /api/session': { request: fixed('/api/session'), may: EVERYBODY, ok: 200, otherwise: 403 },
  'POST /api/session': {
    request: (scene, walker) => {
      const { email, password } = scene.person(walker);
      return { path: '/api/session', body: { email, password } };
    },
    may: EVERYBODY,
    ok: 200,
    otherwise: 403,
    endsSession: true,
  },
  'DELETE /api/session': {
    request: fixed('/api/session'),
    may: SIGNED_IN,
    ok: 200,
    otherwise: 403,
    endsSession: true,
  },
  'PUT /api/laboratories/:laboratoryId/people/:accountId': {
    request: ({ home, person }) => ({
      path: `/api/laboratories/${home.id}/people/${person('comparison pilot').accountId}`,
      body: { role: 'reader', state: 'ended', validFrom: '2020-01-01', validTo: null },
    }),
    may: ['registrar', 'laboratory administrator'],
    ok: 200,
    otherwise: 403,
  },
  // network
  'GET /api/laboratories': { request: fixed('/api/laboratories'), may: SIGNED_IN, ok: 200, otherwise: 403 },
  'GET /api/laboratories/:laboratoryId': {
    request: ({ home }) => ({ path: `/api/laboratories/${home.id}` }),
    may: SIGNED_IN,
    ok: 200,
    otherwise: 403,
  },
  // notices
  'GET /api/scale-versions': {
    request: fixed('/api/scale-versions'),
    may: SIGNED_IN,
    ok: 200,
    otherwise: 403,
  },
  'GET /api/notices': { request: fixed('/api/notices'), may: SIGNED_IN, ok: 200, otherwise: 403 },
  'GET /api/notices/:noticeId': {
    request: async (scene) => ({ path: `/api/notices/${(await makeNotice(scene)).id}` }),
    may: SIGNED_IN,
    ok: 200,
    otherwise: 403,
  },
  'POST /api/notices': {
    // Published by a national institute: one of which home's signatory is a signatory as well.
    request: async (scene, walker) => ({
      path: '/api/notices',
      body: { ...(await noticeOf(scene)), password: scene.person(walker).password },
    }),
    may: ['signatory'],
    ok: 201,
    otherwise: 403,
  },
  // documents
  'POST /api/documents': {
    request: ({ home }) => ({
      path: '/api/documents',
      query: { laboratory: home.id, name: 'certificate.pdf' },
      file: Buffer.from(`%PDF-1.7 ${randomUUID()} %%EOF`),
    }),
    may: ['registrar', 'laboratory administrator', 'metrologist', 'signatory'],
    ok: 201,
    otherwise: 403,
  },
  'GET /api/documents/:documentId': {
    request: ({ documentId }) => ({ path: `/api/documents/${documentId}` }),
    may: READERS,
    ok: 200,
    otherwise: 404,
  },
  // desk
  'GET /api/desk': { request: fixed('/api/desk'), may: SIGNED_IN, ok: 200, otherwise: 403 },
  'GET /api/find': { request: fixed('/api/find', { q: 'E2' }), may: SIGNED_IN, ok: 200, otherwise: 403 },
  // chains
  'GET /api/chains': { request: fixed('/api/chains', { q: '' }), may: SIGNED_IN, ok: 200, otherwise: 403 },
  'GET /api/chains/:valueUid': {
    request: ({ valueUid }) => ({ path: `/api/chains/${valueUid}` }),
    may: READERS,
    ok: 200,
    otherwise: 404,
  },
  'GET /api/chains/:valueUid/life': {
    request: ({ valueUid }) => ({ path: `/api/chains/${valueUid}/life` }),
    may: READERS,
    ok: 200,
    otherwise: 404,
  },
  ...Object.fromEntries(
    [
      'drawing.svg',
      'drawing.pdf',
      'chain.json',
      'take-along.html',
      'strip.pdf',
      'statement.json',
      'statement.pdf',
    ].map((file) => [
      `GET /api/chains/:valueUid/${file}`,
      {
        request: ({ valueUid }: Scene) => ({ path: `/api/chains/${valueUid}/${file}` }),
        may: READERS,
        ok: 200 as const,
        otherwise: 404 as const,
      },
    ]),
  ),
  'GET /api/chains/:valueUid/covariance/:otherUid': {
    // The reference is upstream of home's weight: its statement is open to home.
    request: ({ valueUid, referenceUid }) => ({ path: `/api/chains/${valueUid}/covariance/${referenceUid}` }),
    may: READERS,
    ok: 200,
    otherwise: 404,
  },
  'GET /api/chains/:valueUid/distance': {
    request: ({ valueUid }) => ({ path: `/api/chains/${valueUid}/distance` }),
    may: READERS,
    ok: 200,
    otherwise: 404,
  },
  'POST /api/chains/together': {
    request: ({ valueUid, referenceUid }) => ({
      path: '/api/chains/together',
      body: { valueUids: [valueUid, referenceUid] },
    }),
    may: READERS,
    ok: 200,
    otherwise: 404,
  },
  // downstream
  'GET /api/downstream/:uid': {
    request: ({ valueUid }) => ({ path: `/api/downstream/${valueUid}` }),
    may: READERS,
    ok: 200,
    otherwise: 404,
  },
  'GET /api/exposure/:standardId': {
    request: ({ standardId }) => ({
      path: `/api/exposure/${standardId}`,
      query: { lastGood: '2024-06-10', firstBad: '2024-12-10' },
    }),
    may: READERS,
    ok: 200,
    otherwise: 404,
  },
  'POST /api/what-if': {
    request: ({ valueUid }) => ({
      path: '/api/what-if',
      body: { changes: [{ kind: 'shift', valueUid, shift: '0.0001' }] },
    }),
    may: READERS,
    ok: 200,
    otherwise: 404,
  },
  'POST /api/what-if/named': {
    request: ({ valueUid }) => ({
      path: '/api/what-if/named',
      body: { changes: [{ kind: 'shift', valueUid, shift: '0.0001' }] },
    }),
    may: READERS,
    ok: 200,
    otherwise: 404,
  },
  // dry runs
  'GET /api/dry-runs': { request: fixed('/api/dry-runs'), may: SIGNED_IN, ok: 200, otherwise: 403 },
  'POST /api/dry-runs': {
    request: (scene) => ({ path: '/api/dry-runs', body: dryRunOf(scene) }),
    may: [...WRITERS, 'signatory'],
    ok: 201,
    otherwise: 403,
  },
  'GET /api/dry-runs/:id': {
    request: async (scene) => ({ path: `/api/dry-runs/${await makeDryRun(scene)}` }),
    may: SIGNED_IN,
    ok: 200,
    otherwise: 403,
  },
  'POST /api/dry-runs/:id/notes': {
    request: async (scene) => ({
      path: `/api/dry-runs/${await makeDryRun(scene)}/notes`,
      body: { kind: 'note', text: 'Asked before the reference went away' },
    }),
    may: [...WRITERS, 'signatory'],
    ok: 201,
    otherwise: 403,
  },
  // audits
  'GET /api/audits': { request: fixed('/api/audits'), may: SIGNED_IN, ok: 200, otherwise: 403 },
  'POST /api/audits': {
    request: ({ home }) => ({ path: '/api/audits', body: { scope: 'laboratory', laboratoryId: home.id } }),
    may: READERS,
    ok: 201,
    otherwise: 403,
  },
  'GET /api/audits/:auditId': {
    request: async (scene) => ({ path: `/api/audits/${await makeAudit(scene)}` }),
    may: READERS,
    ok: 200,
    otherwise: 404,
  },
  'GET /api/audits/:auditId/findings': {
    request: async (scene) => ({ path: `/api/audits/${await makeAudit(scene)}/findings` }),
    may: READERS,
    ok: 200,
    otherwise: 404,
  },
  'GET /api/audits/:auditId/findings.csv': {
    request: async (scene) => ({ path: `/api/audits/${await makeAudit(scene)}/findings.csv` }),
    may: READERS,
    ok: 200,
    otherwise: 404,
  },
  'GET /api/audits/:auditId/findings/:n/facts': {
    request: async (scene) => {
      const id = await makeAudit(scene);
      return { path: `/api/audits/${id}/findings/${await ownFindingOf(scene, id)}/facts` };
    },
    may: READERS,
    ok: 200,
    otherwise: 404,
  },
  'POST /api/audits/:auditId/repeat': {
    request: async (scene) => ({ path: `/api/audits/${await makeAudit(scene)}/repeat` }),
    may: READERS,
    ok: 201,
    otherwise: 404,
  },
  'POST /api/audits/:auditId/stop': {
    // Asked for by the metrologist.
    request: async (scene) => ({ path: `/api/audits/${await makeAudit(scene)}/stop` }),
    may: ['registrar', 'metrologist'],
    ok: 200,
    otherwise: 'hidden',
  },
  // standards
  'GET /api/standards': {
    request: fixed('/api/standards', { q: 'kg' }),
    may: SIGNED_IN,
    ok: 200,
    otherwise: 403,
  },
  'POST /api/standards': {
    request: ({ home }) => ({
      path: '/api/standards',
      body: {
        laboratoryId: home.id,
        registryNo: freeRegistryNo(),
        manufacturer: null,
        inServiceFrom: '2024-01-10',
        intervalMonths: 24,
        ...WEIGHT,
      },
    }),
    may: WRITERS,
    ok: 201,
    otherwise: 403,
  },
  'POST /api/sets': {
    request: ({ home }) => ({
      path: '/api/sets',
      body: {
        laboratoryId: home.id,
        registryNo: freeRegistryNo(),
        name: 'Set of two',
        manufacturer: null,
        inServiceFrom: '2024-01-10',
        intervalMonths: 24,
        members: [WEIGHT, { ...WEIGHT, marking: '1 kg *', density: null }],
      },
    }),
    may: WRITERS,
    ok: 201,
    otherwise: 403,
  },
  'GET /api/standards/:standardId': {
    request: ({ standardId }) => ({ path: `/api/standards/${standardId}` }),
    may: READERS,
    ok: 200,
    otherwise: 404,
  },
  'POST /api/standards/:standardId/epochs': {
    request: async ({ app, home }) => {
      const { id } = await makeStandard(app, home.id);
      return {
        path: `/api/standards/${id}/epochs`,
        body: {
          reason: 'adjusted',
          beginsOn: '2024-05-01',
          lastGoodOn: '2024-04-20',
          note: 'Adjusted upwards',
        },
      };
    },
    may: WRITERS,
    ok: 201,
    otherwise: 'hidden',
  },
  // drafts
  'POST /api/drafts': {
    request: async (scene) => ({
      path: '/api/drafts',
      body: { laboratoryId: scene.home.id, content: await fullSheet(scene) },
    }),
    may: WRITERS,
    ok: 201,
    otherwise: 403,
  },
  'GET /api/drafts/:draftId': {
    request: async (scene) => ({ path: `/api/drafts/${(await makeDraft(scene)).id}` }),
    may: READERS,
    ok: 200,
    otherwise: 404,
  },
  'PUT /api/drafts/:draftId': {
    request: async (scene) => {
      const { id, version, content } = await makeDraft(scene);
      return { path: `/api/drafts/${id}`, body: { version, content } };
    },
    may: WRITERS,
    ok: 200,
    otherwise: 'hidden',
  },
  'POST /api/drafts/:draftId/state': {
    request: async (scene) => {
      const { id, version } = await makeDraft(scene);
      return { path: `/api/drafts/${id}/state`, body: { version, state: 'discarded' } };
    },
    may: [...WRITERS, 'signatory'],
    ok: 200,
    otherwise: 'hidden',
  },
  'POST /api/drafts/:draftId/issue': {
    request: async (scene, walker) => {
      const { id, version } = await makeDraft(scene);
      return { path: `/api/drafts/${id}/issue`, body: { version, password: scene.person(walker).password } };
    },
    may: ['signatory'],
    ok: 201,
    otherwise: 'hidden',
  },
  'GET /api/references': {
    request: ({ home, referenceNo }) => ({
      path: '/api/references',
      query: { laboratory: home.id, q: referenceNo, quantity: 'conventional mass' },
    }),
    may: WRITERS,
    ok: 200,
    otherwise: 403,
  },
  // calibrations
  'GET /api/calibrations': {
    request: fixed('/api/calibrations', { sort: 'issuedOn', limit: '20' }),
    may: SIGNED_IN,
    ok: 200,
    otherwise: 403,
  },
  'GET /api/calibrations/:revisionId': {
    request: ({ revisionId }) => ({ path: `/api/calibrations/${revisionId}` }),
    may: READERS,
    ok: 200,
    otherwise: 404,
  },
  'POST /api/calibrations/:revisionId/withdraw': {
    request: async (scene, walker) => ({
      path: `/api/calibrations/${(await looseCalibration(scene)).revisionId}/withdraw`,
      body: {
        reason: 'The balance was not level',
        effectiveOn: '2024-09-01',
        password: scene.person(walker).password,
      },
    }),
    may: ['signatory'],
    ok: 200,
    otherwise: 'hidden',
  },
  'POST /api/calibrations/:revisionId/correct': {
    request: async (scene, walker) => {
      const { revisionId, valueUids } = await looseCalibration(scene);
      const lines = [{ valueUid: valueUids[0], deviation: '0.00011' }];
      const days = { issuedOn: '2024-09-01', effectiveOn: '2024-09-01' };
      const { password } = scene.person(walker);
      return {
        path: `/api/calibrations/${revisionId}/correct`,
        body: { reason: 'The sign was copied wrongly', ...days, lines, password },
      };
    },
    may: ['signatory'],
    ok: 201,
    otherwise: 'hidden',
  },
};
