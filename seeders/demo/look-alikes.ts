import { bestCapabilityOf, SUSPENSION } from './capabilities.ts';
import { placeOf, type CatalogueEntry } from './catalogue.ts';
import type { Entry, Sheet } from './certificate.ts';
import { daysAfter } from './days.ts';
import { combined, effect } from './effects.ts';
import { leanedEffects, type Use } from './leaning.ts';
import { changeRatio } from './result.ts';
import type { DemoValue } from './value.ts';
import type { World } from './world.ts';

type Likeness = Pick<CatalogueEntry, 'kind' | 'rule' | 'verdict'>;

/** A line of the network with what it stands on. */
interface Line {
  sheet: Sheet;
  entry: Entry;
  value: DemoValue;
  uses: readonly Use[];
}

/** What looks wrong in a line at first sight and is not, and the rule that must not be misled. */
const OF_LINES: (Likeness & { applies(line: Line): boolean })[] = [
  {
    kind: 'subdivision with a smaller absolute U',
    rule: 'B-21',
    verdict: 'conduct',
    applies: ({ sheet, value, uses }) =>
      Boolean(sheet.group) && uses.length === 1 && value.expandedU < uses[0]!.value.expandedU,
  },
  {
    kind: 'U equal to the best capability after rounding',
    rule: 'B-26',
    verdict: 'conduct',
    applies: ({ entry, value }) => {
      const { issuer, quantity, isAccredited } = entry.result.task;
      const best = bestCapabilityOf(issuer, quantity, value.weight.nominal);
      return isAccredited && best !== null && Math.abs(value.expandedU - best) <= value.halfDigit;
    },
  },
  {
    kind: 'recognized external certificate, where a chain may end',
    rule: 'B-10',
    verdict: 'conduct',
    applies: ({ entry }) => entry.rootKind === 'recognized certificate',
  },
  {
    kind: 'chain that ends at a recognized external certificate',
    rule: 'B-43',
    verdict: 'today',
    applies: ({ sheet, uses }) =>
      uses.length > 0 && uses.every(({ value }) => isExternal(value)) && Boolean(sheet),
  },
  {
    kind: 'change between 1 and 1.5 U of the difference',
    rule: 'B-19',
    verdict: 'today',
    applies: ({ entry, value }) => {
      const ratio = ratioToLast(entry, value);
      return ratio !== null && ratio > 1 && ratio < 1.4;
    },
  },
  {
    kind: 'mean of two references, better than either',
    rule: 'B-21',
    verdict: 'conduct',
    applies: ({ value, uses }) =>
      uses.length === 2 &&
      uses.every((use) => use.sensitivity === 0.5 && value.expandedU < use.value.expandedU),
  },
  {
    kind: 'references that share an ancestor, their covariance counted',
    rule: 'B-48',
    verdict: 'conduct',
    applies: ({ uses }) => uses.length > 1,
  },
  {
    kind: 'conventional mass with a smaller U than the mass it was found from',
    rule: 'B-21',
    verdict: 'conduct',
    applies: ({ value, uses }) =>
      uses.length === 1 &&
      uses[0]!.value.quantity === 'mass' &&
      value.quantity === 'conventional mass' &&
      value.expandedU < uses[0]!.value.expandedU,
  },
  {
    kind: 'found knocked or near its limit, then adjusted',
    rule: 'B-19',
    verdict: 'today',
    applies: ({ value }) => value.stage === 'as found',
  },
  {
    kind: 'value after an adjustment, far from the one before it',
    rule: 'B-19',
    verdict: 'today',
    applies: ({ value }) => value.stage === 'as left',
  },
  {
    kind: 'right value after a slip of the unit, confirmed when it was questioned',
    rule: 'B-18',
    verdict: 'today',
    applies: ({ entry }) => entry.isUnitConfirmed === true,
  },
  {
    kind: 'entered by its recipient, whose budget stays with the issuer',
    rule: 'B-23',
    verdict: 'conduct',
    applies: ({ sheet, entry, uses }) =>
      uses.length > 0 && !entry.hasBudget && sheet.registeredBy !== sheet.issuer,
  },
  {
    kind: 'entered by its recipient, who cannot know who signed',
    rule: 'B-38',
    verdict: 'conduct',
    applies: ({ sheet }) => sheet.registeredBy !== sheet.issuer,
  },
  {
    kind: 'adjusted, with both results',
    rule: 'B-36',
    verdict: 'conduct',
    applies: ({ value }) => value.stage === 'as found',
  },
  {
    kind: 'two of one nominal value, one with a star',
    rule: 'B-01',
    verdict: 'today',
    applies: ({ value }) => value.weight.marking.endsWith('*'),
  },
  {
    kind: 'assumed density whose U reaches beyond the class',
    rule: 'B-04',
    verdict: 'today',
    applies: ({ value }) => value.weight.class === 'E1' && value.weight.density?.origin === 'assumed',
  },
  {
    kind: 'cast-iron block of class M',
    rule: 'B-09',
    verdict: 'today',
    applies: ({ value }) => value.weight.shape === 'block' && Boolean(value.weight.class?.startsWith('M')),
  },
  {
    kind: 'under a scope that had rested and was restored',
    rule: 'B-27',
    verdict: 'conduct',
    applies: ({ sheet, entry }) =>
      sheet.issuer === SUSPENSION.laboratory &&
      entry.result.task.isAccredited &&
      sheet.begin > SUSPENSION.to &&
      sheet.begin < daysAfter(SUSPENSION.to, 730),
  },
];

/** The same for the step from a line to its reference. */
const OF_LINKS: (Likeness & { applies(line: Line, use: Use): boolean })[] = [
  {
    kind: 'used by its class limit, not by its certificate',
    rule: 'B-22',
    verdict: 'conduct',
    applies: (_, use) => use.usedAs === 'class limit',
  },
  {
    kind: 'used on the day its certificate was issued',
    rule: 'B-13',
    verdict: 'conduct',
    applies: ({ sheet }, { value }) => value.issuedOn === sheet.begin,
  },
  {
    kind: 're-issued with unchanged values',
    rule: 'B-15',
    verdict: 'today',
    applies: (_, { value }) => value.ends.length > 0 && value.ends.every((end) => !end.changesValue),
  },
];

/** Adds to the catalogue every line and link that looks like a fault and is none. */
export function addLookAlikes(world: World): void {
  const faulty = new Set(
    world.catalogue
      .filter((entry) => entry.is === 'fault')
      .map(({ certificateNo, line }) => `${certificateNo}/${line}`),
  );
  for (const { sheet, values, revision } of world.sheets.values()) {
    for (const [at, entry] of sheet.entries.entries()) {
      const value = values[at]!;
      if (revision > 1 || faulty.has(`${value.certificateNo}/${value.line}`)) continue;
      const line: Line = { sheet, entry, value, uses: entry.result.task.leaning.uses };
      addOfLine(world, line);
    }
  }
}

function addOfLine(world: World, line: Line): void {
  const common = { is: 'look-alike' as const, ...placeOf(line.value), alsoFoundBy: [] };
  for (const { applies, ...likeness } of OF_LINES) {
    if (applies(line)) world.catalogue.push({ ...common, ...likeness, reference: null });
  }
  for (const use of line.uses) {
    for (const { applies, ...likeness } of OF_LINKS) {
      if (applies(line, use)) world.catalogue.push({ ...common, ...likeness, reference: placeOf(use.value) });
    }
  }
}

function isExternal(value: DemoValue): boolean {
  return value.certificateNo.startsWith('VI-') || value.certificateNo.startsWith('LH-');
}

/** E against the value just before; null for the first of an epoch. */
function ratioToLast(entry: Entry, value: DemoValue): number | null {
  const before = value.weight.values.filter(
    (other) =>
      other.quantity === value.quantity &&
      other.epoch === value.epoch &&
      other.ends.length === 0 &&
      !other.isFaulty &&
      other.performedEnd < value.performedEnd,
  );
  const last = before.at(-1);
  if (!last || entry.ownEffects) return null;
  const { task, localU, printed } = entry.result;
  const effects = combined([
    { sensitivity: 1, effects: leanedEffects(task.leaning, value.key) },
    { sensitivity: 1, effects: effect(value.key, localU) },
  ]);
  return changeRatio(printed, effects, last);
}
