import { describe, expect, it } from 'vitest';
import type { ChainResponse } from '#shared/contracts/chains.ts';
import { marksOf, whatChanged } from './what-changed.ts';

type Node = Extract<ChainResponse['nodes'][number], { type: 'value' }>;
type Link = ChainResponse['links'][number];
type Check = ChainResponse['checks'][number];

const value = (uid: string, more: Partial<Node> = {}): Node =>
  ({
    type: 'value',
    uid,
    view: 'full',
    registryNo: uid,
    standardId: uid,
    certificateNo: `C-${uid}`,
    revisionN: 1,
    quantity: 'conventional mass',
    medium: 'air',
    deviation: '0.0001',
    expandedU: '0.0002',
    k: '2',
    performedEnd: '2020-01-01',
    state: 'in force',
    stateSince: null,
    uNow: 1e-4,
    tier: 1,
    share: 0.2,
    now: null,
    ...more,
  }) as Node;

const link = (childUid: string, parentUid: string, more: Partial<Link> = {}): Link =>
  ({ childUid, parentUid, role: 'reference', flow: 0.2, conduct: 'sound', today: 'sound', ...more }) as Link;

const check = (
  rule: string,
  outcome: Check['outcome'],
  subject: Check['subject'],
  more: Partial<Check> = {},
): Check => ({
  rule,
  subject,
  verdict: 'today',
  outcome,
  severity: 'critical',
  parameters: {},
  sentence: 'said',
  ...more,
});

/** The weight T leans on the reference R. */
function chain(changes: Partial<ChainResponse> = {}): ChainResponse {
  return {
    focusUid: 'T',
    nodes: [value('T', { tier: 0, share: 1 }), value('R')],
    links: [link('T', 'R')],
    asNowKnown: null,
    uncertainty: { standard: 1e-4, expanded: 2e-4, k: 2, missing: [] },
    rules: ['B-15', 'B-08'].map((id) => ({
      id,
      title: `Title of ${id}`,
      isLasting: false,
      sentences: { said: `What ${id} says.` },
    })),
    checks: [check('B-15', 'holds', { type: 'link', childUid: 'T', parentUid: 'R' })],
    ...changes,
  } as unknown as ChainResponse;
}

const said = (before: ChainResponse, after: ChainResponse) =>
  whatChanged(before, after).map(({ group, says }) => `${group}: ${says}`);

describe('what changed between two answers', () => {
  it('is nothing between an answer and itself', () => {
    expect(whatChanged(chain(), chain())).toEqual([]);
  });

  const withdrawn = chain({
    nodes: [value('T', { tier: 0, share: 1 }), value('R', { state: 'withdrawn', stateSince: '2021-05-02' })],
    links: [link('T', 'R', { today: 'broken' })],
    checks: [
      check('B-15', 'fails', { type: 'link', childUid: 'T', parentUid: 'R' }),
      check('B-08', 'holds', { type: 'value', uid: 'R' }),
    ],
    asNowKnown: {
      shift: null,
      deviation: null,
      expandedU: null,
      because: 'certificate C-R was withdrawn',
      keepsClass: null,
      replaced: [],
      notices: [],
    },
  });

  it('names a withdrawal at the result, at the link with its rule, and at the reference, in this order', () => {
    expect(said(chain(), withdrawn)).toEqual([
      'The weight itself: As now known: not computable, because certificate C-R was withdrawn; before: as certified.',
      'How links stand: R → T, by what is known now: broken, was sound (B-15).',
      'What it rests on: R, certificate C-R: withdrawn since 2021-05-02, was in force.',
    ]);
    expect(whatChanged(chain(), withdrawn)[1]!.why).toEqual(['What B-15 says.']);
  });

  it('does not call moved what stays where it was certified, whether or not something changed above it', () => {
    const unmoved = chain({
      asNowKnown: { ...withdrawn.asNowKnown!, shift: '0', deviation: '0.0001', because: null },
    });
    expect(whatChanged(chain(), unmoved)).toEqual([]);
    expect(whatChanged(unmoved, chain())).toEqual([]);
    expect(said(unmoved, withdrawn)[0]).toContain('not computable');
  });

  it('gives each place of the drawing the word of its gravest change', () => {
    expect([...marksOf(whatChanged(chain(), withdrawn))]).toEqual([
      ['T', 'moved'],
      ['T.R', 'was sound'],
      ['R', 'was in force'],
    ]);
  });

  it('tells from the other side what was found before and is not any more', () => {
    const [, change] = whatChanged(withdrawn, chain());
    expect(change).toMatchObject({
      says: 'R → T, by what is known now: sound, was broken (B-15).',
      mark: 'was broken',
    });
    expect(change!.why).toEqual(['Before: What B-15 says.']);
  });

  it('pairs a successor with what it replaced: one statement, and the link stays the same link', () => {
    const after = chain({
      nodes: [
        value('T', { tier: 0, share: 1 }),
        value('R2', {
          registryNo: 'R',
          standardId: 'R',
          certificateNo: 'C-R',
          revisionN: 2,
          deviation: '0.00015',
        }),
      ],
      links: [link('T', 'R2')],
      checks: [check('B-15', 'holds', { type: 'link', childUid: 'T', parentUid: 'R2' })],
    });
    const [only, ...others] = whatChanged(chain(), after);
    expect(others).toEqual([]);
    expect(only!.says).toMatch(
      /^R: certificate C-R, revision 2 stands in the place of C-R; deviation \+0?.*150/,
    );
    expect(only).toMatchObject({ at: 'R2', mark: 'new', group: 'What it rests on' });
  });

  it('says what came and what went, and gives what went no place', () => {
    const wider = chain({ nodes: [...chain().nodes, value('S')], links: [...chain().links, link('T', 'S')] });
    expect(whatChanged(chain(), wider)).toMatchObject([
      { says: 'S, certificate C-S: new in the chain.', at: 'S' },
    ]);
    expect(whatChanged(wider, chain())).toMatchObject([
      { says: 'S, certificate C-S: no longer in the chain.', at: null, mark: null },
    ]);
  });

  it('says by how much U changed, and nothing where two digits show no difference', () => {
    const wider = (expanded: number) =>
      chain({ uncertainty: { ...chain().uncertainty, standard: expanded / 2, expanded } });
    expect(said(chain(), wider(2.6e-4))).toHaveLength(1);
    expect(said(chain(), wider(2.6e-4))[0]).toMatch(/^The weight itself: U over the chain: .*26.*, was .*20/);
    expect(said(chain(), wider(2.0001e-4))).toEqual([]);
  });

  it.each([
    [0.209, 0],
    [0.2101, 1],
    [0.18, 1],
  ])('counts a share of 20 %% that became %d as %i change', (share, count) => {
    const after = chain({ nodes: [value('T', { tier: 0, share: 1 }), value('R', { share })] });
    expect(whatChanged(chain(), after)).toHaveLength(count);
  });

  it('lists a check of its own that no link tells, where either outcome is a finding', () => {
    const of = (outcome: Check['outcome']) =>
      chain({ checks: [check('B-08', outcome, { type: 'value', uid: 'R' })] });
    expect(said(of('holds'), of('fails'))).toEqual([
      'Other checks: R: Title of B-08 (B-08), now: fails, was: holds.',
    ]);
    expect(said(of('does not apply'), of('holds'))).toEqual([]);
  });
});
