import { describe, expect, it } from 'vitest';
import { generatedChain } from '#shared/drawing/generated-chain.ts';
import { namesOf } from '#shared/drawing/link-order.ts';
import { nextOrder, rulesOfLinks, rulesText, sortedLinks } from './sorted-links.ts';

const chain = generatedChain({ plates: 80 });
const names = namesOf(chain);

describe('order of the links', () => {
  it('sorts by flow, whatever its sign, and puts the worst first', () => {
    const flows = sortedLinks(chain.links, { by: 'flow', isDescending: true }, names, 'today').map(
      ({ flow }) => Math.abs(flow!),
    );
    expect(flows).toEqual(flows.toSorted((a, b) => b - a));
    const [worst] = sortedLinks(chain.links, { by: 'judged', isDescending: false }, names, 'today');
    expect(worst!.today).toBe('broken');
  });

  it('keeps links without a day last, whichever way', () => {
    for (const isDescending of [true, false]) {
      const days = sortedLinks(chain.links, { by: 'used', isDescending }, names, 'today').map(
        (link) => link.usedEnd,
      );
      expect(days.indexOf(null)).toBe(days.filter((day) => day !== null).length);
    }
  });

  it('goes one way, the other way, and back to the chain’s own order', () => {
    const first = nextOrder(null, 'flow');
    const second = nextOrder(first, 'flow');
    expect([first, second, nextOrder(second, 'flow')]).toEqual([
      { by: 'flow', isDescending: true },
      { by: 'flow', isDescending: false },
      null,
    ]);
    expect(nextOrder(first, 'link')).toEqual({ by: 'link', isDescending: false });
  });
});

describe('rules that a link fails', () => {
  it('are those of the step and of the value it made, under one verdict', () => {
    const link = chain.links.find(({ role }) => role === 'reference')!;
    const check = {
      verdict: 'today' as const,
      outcome: 'fails' as const,
      severity: 'major' as const,
      parameters: {},
      sentence: null,
    };
    const { childUid, parentUid } = link;
    const checked = {
      ...chain,
      checks: [
        { ...check, rule: 'two', subject: { type: 'link' as const, childUid, parentUid } },
        { ...check, rule: 'one', subject: { type: 'value' as const, uid: childUid } },
        {
          ...check,
          rule: 'open',
          outcome: 'cannot be judged' as const,
          subject: { type: 'value' as const, uid: childUid },
        },
        {
          ...check,
          rule: 'held',
          outcome: 'holds' as const,
          subject: { type: 'value' as const, uid: childUid },
        },
        {
          ...check,
          rule: 'other',
          verdict: 'conduct' as const,
          subject: { type: 'value' as const, uid: childUid },
        },
      ],
    };
    const found = rulesOfLinks(checked, 'today').get(`${childUid}.${parentUid}`)!;
    expect(found).toEqual({ fails: ['one', 'two'], notJudged: ['open'] });
    expect(rulesText(found)).toBe('fails one two; not judged open');
    expect(rulesText({ fails: [], notJudged: [] })).toBe('');
  });
});
