import type { z } from 'zod';
import { Decimal, decimalText } from '#shared/decimal.ts';
import type { CalibrationInput } from '#shared/contracts/calibration-input.ts';
import type { DraftContent, DraftLine, OpenPoint } from '#shared/contracts/drafts.ts';
import { convertUnit } from '#shared/engine/quantity/units.ts';
import type { DraftFacts, DraftStandardFacts } from './draft-facts.ts';
import { missing, wrong } from './open-points.ts';
import { readFactor, type Reading } from './read-typed.ts';

type ReferenceInput = NonNullable<z.input<typeof CalibrationInput>['lines'][number]['references']>[number];

/**
 * The references of a line. Without any, the certificate of a recognized issuer other than the laboratory itself
 * is a legitimate stop (ILAC P10, routes 1 and 2); otherwise the chain would end in nothing, and a point says so.
 */
export function readReferences(
  line: DraftLine,
  path: string,
  content: DraftContent,
  facts: DraftFacts,
  standard: DraftStandardFacts | undefined,
  points: OpenPoint[],
): ReferenceInput[] {
  if (line.references.length === 0) points.push(...withoutReference(path, facts));
  points.push(...farReference(line, path, facts, standard));
  return line.references.flatMap(({ valueUid, sensitivity, usedAs }, at) => {
    const field = `${path}.references.${at}`;
    const reference = facts.references.get(valueUid);
    if (!reference) {
      points.push(
        wrong(
          `${field}.valueUid`,
          'This reference value is not in the register. The draft keeps until it is.',
          valueUid,
          'an assigned value',
        ),
      );
      return [];
    }
    const factor = readSensitivity(sensitivity, `${field}.sensitivity`, line, facts, standard);
    if ('point' in factor) {
      points.push(factor.point);
      return [];
    }
    const usedBegin = content.performedBegin.trim();
    return [{ valueUid, sensitivity: factor.value, usedAs, usedBegin, usedEnd: content.performedEnd.trim() }];
  });
}

function withoutReference(path: string, facts: DraftFacts): OpenPoint[] {
  const { issuer } = facts;
  if (!issuer) return [];
  const field = `${path}.references`;
  if (issuer.id === facts.laboratoryId) {
    return [
      missing(
        field,
        'Name the value of the reference this result leans on.',
        'an assigned value',
        'ISO/IEC 17025:2017, 6.5.1',
      ),
    ];
  }
  if (!issuer.isRecognized) {
    return [
      missing(
        field,
        `${issuer.name} held no recognition on that day, so its certificate is no end of a chain. Name the value it leaned on, or keep the draft until it is known.`,
        'an assigned value',
        'ILAC P10',
      ),
    ];
  }
  const message = `No reference is named: the chain will end at this certificate, as one of a recognized issuer (${issuer.name}).`;
  return [{ field, message, received: null, expected: null, clause: 'ILAC P10', kind: 'note' }];
}

/**
 * A single reference more than ten times lighter or heavier than the weight is unusual enough to be asked about;
 * multiples and parts are calibrated in smaller steps (common practice, no source).
 */
function farReference(
  line: DraftLine,
  path: string,
  facts: DraftFacts,
  standard: DraftStandardFacts | undefined,
): OpenPoint[] {
  const [used, ...others] = line.references;
  const reference = used && facts.references.get(used.valueUid);
  if (!standard || !reference || others.length > 0 || !new Decimal(reference.nominal).gt(0)) return [];
  const ratio = new Decimal(standard.nominal).div(reference.nominal);
  if (ratio.gte('0.1') && ratio.lte(10)) return [];
  const message = `${nominalWords(standard.nominal)} from ${nominalWords(reference.nominal)}: is ${reference.registryNo} really the reference of this line?`;
  return [
    { field: `${path}.references`, message, received: null, expected: null, clause: null, kind: 'note' },
  ];
}

/** A nominal as it is engraved: "1 mg", "500 g", "1 kg". */
function nominalWords(grams: string): string {
  const unit = new Decimal(grams).gte(1000) ? 'kg' : new Decimal(grams).gte(1) ? 'g' : 'mg';
  return `${decimalText(convertUnit(new Decimal(grams), 'g', unit))} ${unit}`;
}

/**
 * The sensitivity as typed. Left empty it is the ratio of the nominals for one reference, and 1 for several that
 * together make up the weight; anything else is for the person to say.
 */
function readSensitivity(
  text: string,
  field: string,
  line: DraftLine,
  facts: DraftFacts,
  standard: DraftStandardFacts | undefined,
): Reading<number> {
  if (text.trim() !== '') {
    const read = readFactor(text, field, 'sensitivity');
    return 'point' in read ? read : { value: Number(read.value) };
  }
  if (!standard) return { value: 1 };
  const nominals = line.references.map(
    ({ valueUid }) => new Decimal(facts.references.get(valueUid)?.nominal ?? 0),
  );
  const [only] = nominals;
  if (nominals.length === 1 && only?.gt(0))
    return { value: new Decimal(standard.nominal).div(only).toNumber() };
  const sum = nominals.reduce((total, nominal) => total.plus(nominal), new Decimal(0));
  if (sum.eq(standard.nominal)) return { value: 1 };
  return {
    point: missing(
      field,
      'Say how strongly the result depends on this reference.',
      'change of the result per change of the reference, such as 0.5 for the mean of two',
      'JCGM 100:2008, 5.1.3',
    ),
  };
}
