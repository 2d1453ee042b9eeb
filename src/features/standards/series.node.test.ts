import { describe, expect, it } from 'vitest';
import { memberNo, nominalsOf, SERIES, seriesMembers } from './series.ts';

const choices = { division: '1-2-2-5', sign: '*', below1g: 'wire' } as const;
const series = (id: string) => SERIES.find((one) => one.id === id)!;

describe('seriesMembers', () => {
  it.each([
    ['1 mg to 1 kg', 25],
    ['1 mg to 100 g', 21],
    ['1 mg to 500 mg', 12],
    ['1 g to 500 g', 12],
  ])('%s has %i weights', (id, count) => {
    expect(seriesMembers(series(id), choices)).toHaveLength(count);
  });

  it('lists the largest first and tells equal nominals apart', () => {
    const markings = seriesMembers({ from: '1', to: '10' }, choices).map((member) => member.marking);
    expect(markings).toEqual(['10 g', '5 g', '2 g', '2 g*', '1 g']);
    const dotted = seriesMembers({ from: '0.1', to: '0.5' }, { ...choices, sign: '·' });
    expect(dotted.map((member) => member.marking)).toEqual(['500 mg', '200 mg', '200 mg·', '100 mg']);
  });

  it('gives wires or sheets below 1 g', () => {
    const shapes = (below1g: 'wire' | 'sheet') =>
      seriesMembers({ from: '0.5', to: '1' }, { ...choices, below1g }).map((member) => member.shape);
    expect(shapes('wire')).toEqual(['knob', 'wire']);
    expect(shapes('sheet')).toEqual(['knob', 'sheet']);
  });

  it('never gives two weights one nominal and one marking', () => {
    for (const one of SERIES) {
      const keys = seriesMembers(one, choices).map((member) => `${member.nominal} ${member.marking}`);
      expect(new Set(keys).size).toBe(keys.length);
    }
  });
});

describe('nominalsOf', () => {
  it('keeps within ends that fall inside a decade', () => {
    expect(nominalsOf({ from: '2', to: '50' }, '1-2-5')).toEqual(['50', '20', '10', '5', '2']);
  });

  it('has nothing where the ends are crossed or not above zero', () => {
    expect(nominalsOf({ from: '10', to: '1' }, '1-2-5')).toEqual([]);
    expect(nominalsOf({ from: '0', to: '1' }, '1-2-5')).toEqual([]);
  });
});

it('numbers the weights in the order given', () => {
  expect([memberNo('TV 0300', 0), memberNo('TV 0300', 24)]).toEqual(['TV 0300-01', 'TV 0300-25']);
});
