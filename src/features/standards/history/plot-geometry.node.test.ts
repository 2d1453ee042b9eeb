import { describe, expect, it } from 'vitest';
import { plotGeometry, type PlotInput, type PlotValue } from './plot-geometry.ts';

function value(performedEnd: string, deviation: string, changes: Partial<PlotValue> = {}): PlotValue {
  return {
    uid: performedEnd,
    revisionId: performedEnd,
    certificateNo: `C ${performedEnd}`,
    revisionN: 1,
    issuer: { id: 'x', code: 'X', name: 'X' },
    quantity: 'conventional mass',
    medium: 'air',
    stage: null,
    epochN: 1,
    deviation,
    expandedU: '0.00006',
    k: '2',
    performedEnd,
    datePrecision: 'day',
    issuedOn: performedEnd,
    state: 'in force',
    stateSince: null,
    change: null,
    ...changes,
  };
}

const EPOCHS: PlotInput['epochs'] = [
  { n: 1, reason: 'new', beginsOn: '2009-05-18', lastGoodOn: null, note: null },
  { n: 2, reason: 'adjusted', beginsOn: '2021-03-02', lastGoodOn: null, note: null },
];

const draw = (values: PlotValue[], changes: Partial<PlotInput> = {}) =>
  plotGeometry({
    values,
    epochs: EPOCHS,
    errorLimit: '0.0005',
    weightClass: 'E1',
    dueOn: '2026-09-12',
    width: 720,
    height: 300,
    ...changes,
  })!;

const HISTORY = [
  value('2016-03-11', '-0.000048'),
  value('2018-02-27', '-0.000031'),
  value('2021-11-30', '0.000038', { epochN: 2 }),
  value('2023-05-04', '0.000047', { epochN: 2 }),
];

describe('plotGeometry', () => {
  it('has nothing to draw without values', () => {
    expect(plotGeometry({ ...({} as PlotInput), values: [] })).toBeNull();
  });

  it('draws each U as a bar of its own length, to the scale of the axis', () => {
    const drawn = draw([value('2016-03-11', '0'), value('2018-03-11', '0', { expandedU: '0.00012' })]);
    const [short, long] = drawn.points.map((point) => point.bar!.bottom - point.bar!.top);
    expect(long! / short!).toBeCloseTo(2, 1);
    const perTick = drawn.valueTicks[0]!.at - drawn.valueTicks[1]!.at;
    const step = Number(drawn.valueTicks[1]!.label) - Number(drawn.valueTicks[0]!.label);
    expect(((short! / perTick) * step) / 2).toBeCloseTo(60, 0);
  });

  it('gives no bar where no U is stated', () => {
    const [point] = draw([value('1948-12-31', '0.0001', { expandedU: null, k: null })]).points;
    expect(point!.bar).toBeNull();
  });

  it('draws no line across an intervention', () => {
    const { lines, points } = draw(HISTORY);
    expect(lines).toEqual([
      [
        { x: points[0]!.x, y: points[0]!.y },
        { x: points[1]!.x, y: points[1]!.y },
      ],
      [
        { x: points[2]!.x, y: points[2]!.y },
        { x: points[3]!.x, y: points[3]!.y },
      ],
    ]);
  });

  it('names the intervention and the day it is due, and not how the weight began', () => {
    const { marks } = draw(HISTORY);
    expect(marks.map((mark) => mark.text)).toEqual(['adjusted 2021-03-02, new epoch', 'due 2026-09-12']);
  });

  it('keeps labels within the frame and apart, on a telephone too', () => {
    for (const width of [328, 358, 720, 1400]) {
      const { marks, frame } = draw(HISTORY, { width, dueOn: '2021-06-01' });
      const spans = marks.map(({ anchor, text, textX }) => {
        const length = text.length * 6.5;
        return anchor === 'end' ? { from: textX - length, to: textX } : { from: textX, to: textX + length };
      });
      for (const { from, to } of spans) {
        expect(from).toBeGreaterThanOrEqual(frame.left);
        expect(to).toBeLessThanOrEqual(frame.right);
      }
      const [first, second] = spans;
      const areApart = first!.to <= second!.from || second!.to <= first!.from;
      expect(areApart || marks[0]!.row !== marks[1]!.row).toBe(true);
    }
  });

  it('shortens a label before it is cut off', () => {
    expect(draw(HISTORY, { width: 328 }).marks[0]!.text).toBe('adjusted 2021-03-02');
  });

  it('draws the error limit where it fits the values, else a third of it, else nothing', () => {
    expect(draw(HISTORY, { errorLimit: '0.0003' }).band?.label).toBe('error limit of class E1');
    const third = draw(HISTORY);
    expect(third.band?.label).toBe('limit for U, a third of the E1 error limit');
    expect(third.band?.halfWidth).toBeCloseTo(500 / 3, 9);
    expect(draw(HISTORY, { errorLimit: '0.05' }).band).toBeNull();
    expect(draw(HISTORY, { errorLimit: null }).band).toBeNull();
  });

  it('shows a date known to the year as a stretch of that year', () => {
    const [year, day] = draw([
      value('2016-12-31', '0', { datePrecision: 'year' }),
      value('2019-03-11', '0'),
    ]).points;
    expect(year!.whisker!.right - year!.whisker!.left).toBeGreaterThan(20);
    expect(year!.x).toBeCloseTo((year!.whisker!.left + year!.whisker!.right) / 2, 0);
    expect(day!.whisker).toBeNull();
  });

  it('does not let a withdrawn value of the wrong unit press the others flat', () => {
    const slip = value('2017-01-01', '0.048', { state: 'withdrawn' });
    const { points, unit, frame } = draw([HISTORY[0]!, slip, HISTORY[1]!]);
    expect(unit).toBe('ug');
    expect(points[1]).toMatchObject({ isBeyond: true, y: frame.top, bar: null });
    expect(points[0]!.bar!.bottom - points[0]!.bar!.top).toBeGreaterThan(20);
  });

  it('takes the unit in which the values read best', () => {
    expect(draw([value('2020-01-01', '0.0132', { expandedU: '0.03' })], { errorLimit: null }).unit).toBe(
      'mg',
    );
  });

  it('leaves zero out where all values lie far from it', () => {
    const far = [
      value('2016-01-01', '0.005', { expandedU: '0.00001' }),
      value('2018-01-01', '0.00502', { expandedU: '0.00001' }),
    ];
    const labels = draw(far, { errorLimit: null }).valueTicks.map((tick) => tick.label);
    expect(labels).not.toContain('0');
    expect(draw(HISTORY).valueTicks.map((tick) => tick.label)).toContain('0');
  });

  it('gives all marks of the axis the same decimals', () => {
    const far = [
      value('2016-01-01', '-0.094244', { expandedU: '0.000029' }),
      value('2018-01-01', '-0.094229', { expandedU: '0.000037' }),
    ];
    const labels = draw(far, { errorLimit: null }).valueTicks.map((tick) => tick.label);
    expect(new Set(labels.map((label) => label.split('.')[1]?.length))).toEqual(new Set([2]));
  });

  it('cuts no label off at the end of the time axis', () => {
    for (let width = 320; width < 900; width += 7) {
      for (const { at, label } of draw(HISTORY, { width }).timeTicks) {
        expect(at + label.length * 3.4).toBeLessThanOrEqual(width);
      }
    }
  });

  it('puts every point inside the frame at every width', () => {
    for (const width of [300, 500, 1000]) {
      const { points, frame } = draw(HISTORY, { width });
      for (const { x, y } of points) {
        expect(x).toBeGreaterThan(frame.left);
        expect(x).toBeLessThan(frame.right);
        expect(y).toBeGreaterThan(frame.top);
        expect(y).toBeLessThan(frame.bottom);
      }
    }
  });
});
