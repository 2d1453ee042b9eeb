import { describe, expect, it } from 'vitest';
import { DraftContent } from '#shared/contracts/drafts.ts';
import type { DraftFacts } from './draft-facts.ts';
import { readDraft } from './draft-input.ts';

const LABORATORY = '01890000-0000-7000-8000-000000000001';
const ISSUER = '01890000-0000-7000-8000-000000000002';
const WEIGHT = '01890000-0000-7000-8000-000000000003';
const KILOGRAM = '01890000-0000-7000-8000-000000000004';
const HALF = '01890000-0000-7000-8000-000000000005';

function factsOf(changes: Partial<DraftFacts> = {}, nominal = '1000'): DraftFacts {
  return {
    laboratoryId: LABORATORY,
    issuer: { id: ISSUER, name: 'Institute', isRecognized: true },
    standards: new Map([[WEIGHT, { registryNo: 'TV 0112', nominal, class: 'E2', lastValues: {} }]]),
    references: new Map([
      [KILOGRAM, { registryNo: 'TV 0001', nominal: '1000.000000000000' }],
      [HALF, { registryNo: 'TV 0002', nominal: '500' }],
    ]),
    ...changes,
  };
}

function contentOf(line: object = {}, changes: object = {}): DraftContent {
  return DraftContent.parse({
    issuerId: ISSUER,
    certificateNo: ' C 1 ',
    issuedOn: '2024-02-20',
    performedBegin: '2024-02-18',
    performedEnd: '2024-02-19',
    method: 'Substitution weighing',
    lines: [{ key: 'a', standardId: WEIGHT, value: '0.120', expandedU: '0.50', ...line }],
    ...changes,
  });
}

const read = (line: object = {}, changes: object = {}, facts = factsOf()) =>
  readDraft(contentOf(line, changes), facts);

const blocking = (reading: ReturnType<typeof readDraft>) =>
  reading.points.filter((point) => point.kind !== 'note').map((point) => [point.field, point.kind]);

describe('a value as typed', () => {
  it.each([
    [{ value: '0.120', unit: 'mg' }, '0.00012', 'mg', 3],
    [{ value: '−0,120', unit: 'mg' }, '-0.00012', 'mg', 3],
    [{ value: '+12', unit: 'ug' }, '0.000012', 'ug', 0],
    [{ value: '120 µg', unit: 'mg' }, '0.00012', 'ug', 0],
    [{ value: '1 000.000 120', unit: 'g', valueIs: 'whole value' }, '0.00012', 'g', 6],
    [{ value: '0.999 999 880 0', unit: 'kg', valueIs: 'whole value' }, '-0.00012', 'kg', 10],
  ])('%j is %s g, printed in %s with %i decimals', (line, deviation, reportedUnit, reportedDecimals) => {
    const { input } = read(line);
    expect(input?.lines[0]).toMatchObject({ deviation, reportedUnit, reportedDecimals });
  });

  it('counts the decimals of U in the unit of the value', () => {
    const inGrams = read({ value: '0.000120', unit: 'g', expandedU: '0.50', uUnit: 'mg' });
    expect(inGrams.input?.lines[0]).toMatchObject({ expandedU: '0.0005', reportedUDecimals: 5 });
  });

  it.each([
    ['value', '0.1.2'],
    ['value', 'twelve'],
    ['value', '1.2 ± 0.3 mg'],
    ['value', '12 kg/m3'],
    ['expandedU', '1,234'],
    ['k', '2x'],
    ['k', '0.5'],
    ['coverage', '120 %'],
  ])('an unreadable %s "%s" is named with what was received', (field, text) => {
    const { input, points } = read({ [field]: text });
    expect(input).toBeNull();
    expect(points).toContainEqual(
      expect.objectContaining({ field: `lines.0.${field}`, kind: 'wrong', received: text }),
    );
    expect(points.find((point) => point.kind === 'wrong')!.message).not.toMatch(/received/);
  });

  it('refuses what the register cannot hold digit for digit', () => {
    expect(blocking(read({ value: '0.0000000001234', unit: 'mg' }))).toEqual([['lines.0.value', 'wrong']]);
    expect(blocking(read({ expandedU: '0' }))).toEqual([['lines.0.expandedU', 'wrong']]);
  });

  it('takes a coverage probability in per cent or as a fraction', () => {
    expect(read({ coverage: '95.45 %' }).input?.lines[0]?.coverage).toBe('0.9545');
    expect(read({ coverage: '0,95' }).input?.lines[0]?.coverage).toBe('0.95');
  });

  it('reads no U where the certificate states none', () => {
    const { input } = read({ expandedU: 'see above', uNotStated: true, k: '' });
    expect(input?.lines[0]).toMatchObject({ expandedU: null, k: null, reportedUDecimals: null });
  });
});

describe('the references of a line', () => {
  const named = (...references: object[]) => ({
    references: references.map((one) => ({ usedAs: 'certificate', sensitivity: '', ...one })),
  });

  it.each([
    ['the ratio of the nominals for one', named({ valueUid: KILOGRAM }), '500', [0.5]],
    ['one for weights that make it up', named({ valueUid: HALF }, { valueUid: KILOGRAM }), '1500', [1, 1]],
    [
      'what is typed',
      named({ valueUid: HALF, sensitivity: '0,5' }, { valueUid: KILOGRAM, sensitivity: '−0.25' }),
      '500',
      [0.5, -0.25],
    ],
  ])('have as sensitivity %s', (_, line, nominal, expected) => {
    const { input } = read(line, {}, factsOf({}, nominal));
    expect(input?.lines[0]?.references.map((reference) => reference.sensitivity)).toEqual(expected);
    expect(input?.lines[0]?.references[0]).toMatchObject({ usedBegin: '2024-02-18', usedEnd: '2024-02-19' });
    expect(input?.lines[0]?.rootKind).toBeNull();
  });

  it('must say their sensitivity where it cannot be told', () => {
    const reading = read(named({ valueUid: HALF }, { valueUid: KILOGRAM }));
    expect(blocking(reading)).toEqual([
      ['lines.0.references.0.sensitivity', 'missing'],
      ['lines.0.references.1.sensitivity', 'missing'],
    ]);
  });

  it.each([
    ['0.001', /^1 mg from 1 kg: is TV 0001 really/],
    ['20000', /^20 kg from 1 kg: is TV 0001 really/],
    ['100', null],
    ['10000', null],
  ])('are asked about, without blocking, where one is far from %s g', (nominal, words) => {
    const reading = read({ ...named({ valueUid: KILOGRAM }), value: '0' }, {}, factsOf({}, nominal));
    const notes = reading.points.filter(
      ({ kind, field }) => kind === 'note' && field === 'lines.0.references',
    );
    expect(notes.map(({ message }) => message)).toEqual(words ? [expect.stringMatching(words)] : []);
    expect(blocking(reading)).toEqual([]);
  });

  it('end a chain at a recognized issuer, and say so', () => {
    const { input, points } = read();
    expect(input?.lines[0]?.rootKind).toBe('recognized certificate');
    expect(points).toMatchObject([{ kind: 'note', field: 'lines.0.references', clause: 'ILAC P10' }]);
  });

  it('are missing where the issuer is not recognized, is the laboratory itself, or they are unknown', () => {
    const unrecognized = factsOf({ issuer: { id: ISSUER, name: 'Somebody', isRecognized: false } });
    expect(blocking(read({}, {}, unrecognized))).toEqual([['lines.0.references', 'missing']]);
    const own = factsOf({ issuer: { id: LABORATORY, name: 'Own', isRecognized: true } });
    expect(blocking(read({}, { issuerId: LABORATORY }, own))).toEqual([['lines.0.references', 'missing']]);
    expect(blocking(read(named({ valueUid: WEIGHT })))).toEqual([['lines.0.references.0.valueUid', 'wrong']]);
  });
});

describe('the questions of a draft', () => {
  const before = (deviation: string, expandedU = '0.0005') =>
    factsOf({
      standards: new Map([
        [
          WEIGHT,
          {
            registryNo: 'TV 0112',
            nominal: '1000',
            class: 'E2',
            lastValues: { 'conventional mass': { deviation, expandedU } },
          },
        ],
      ]),
    });

  it('ask about the unit beyond ten limits, or where value and U are both a thousandfold', () => {
    expect(blocking(read({ value: '120', expandedU: '500' }))).toEqual([['lines.0.value', 'question']]);
    const small = read({ value: '1.2', unit: 'ug', expandedU: '0.5', uUnit: 'ug' }, {}, before('0.0012'));
    expect(blocking(small)).toEqual([['lines.0.value', 'question']]);
    expect(blocking(read({ value: '1.2', unit: 'ug' }, {}, before('0.0012')))).toEqual([]);
    expect(blocking(read({ value: '120', expandedU: '500', unitConfirmed: true }))).toEqual([]);
  });

  it('ask about the sign only where the other sign fits and this one does not', () => {
    expect(blocking(read({ value: '0.9' }, {}, before('-0.0009')))).toEqual([['lines.0.value', 'question']]);
    expect(blocking(read({ value: '0.9', signConfirmed: true }, {}, before('-0.0009')))).toEqual([]);
    expect(blocking(read({ value: '0.1' }, {}, before('-0.0001')))).toEqual([]);
    expect(blocking(read({ value: '0.9' }, {}, before('-0.0001')))).toEqual([]);
  });

  it('keep the calibration at hand: a question waits for an answer, nothing is lost', () => {
    expect(read({ value: '120', expandedU: '500' }).input?.lines[0]?.deviation).toBe('0.12');
  });
});

it('names everything an empty sheet lacks', () => {
  const empty = readDraft(DraftContent.parse({}), factsOf({ issuer: null }));
  expect(empty.points.map((point) => point.field)).toEqual([
    'issuerId',
    'certificateNo',
    'method',
    'performedBegin',
    'performedEnd',
    'issuedOn',
    'lines',
  ]);
});
