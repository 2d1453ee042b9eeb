import { combined, effect, type Effects } from './effects.ts';
import { laboratoryOf } from './laboratories.ts';
import { carriedAsPrinted, leanedEffects } from './leaning.ts';
import { FEW_DEGREES, LEFT_OUT, type Omission } from './omissions.ts';
import type { PlannedCertificate, PlannedLine } from './plan.ts';
import type { Result } from './result.ts';
import type { DemoValue } from './value.ts';
import { classLimitOf } from './weight.ts';
import { nextCertificateNo, type IssuedSheet, type World } from './world.ts';

/** A result as it goes onto a certificate. */
export interface Entry {
  result: Result;
  /** Whether the certificate breaks the laboratory's own part down. */
  hasBudget: boolean;
  /** Whose lines the budget has; a weighing's unless said otherwise. */
  budget?: keyof typeof BUDGETS;
  /** What a consensus value was informed by, without flow. */
  informedBy?: readonly DemoValue[];
  /** Mass scale it rests on; that of its first reference where left out. */
  scale?: string | null;
  rootKind?: PlannedLine['rootKind'];
  /** Own effects where a weighing design correlates the lines; independent where left out. */
  ownEffects?: Effects;
  isUnitConfirmed?: boolean;
  /** Printed wrong on purpose. */
  isFaulty?: boolean;
  /** Says class and keeps it; left out: wherever the result allows it. */
  statesClass?: boolean;
  /** Left out on purpose. */
  omits?: Omission;
}

/** A certificate before it has its number. */
export interface Sheet {
  issuer: string;
  /** The laboratory that enters the certificate: the holder of the weights. */
  registeredBy: string;
  begin: string;
  end: string;
  issued: string;
  method: string;
  group?: PlannedCertificate['group'];
  entries: Entry[];
}

/** Issues a certificate: a step of the plan, and values that later work can lean on. */
export function issue(world: World, sheet: Sheet): DemoValue[] {
  const certificateNo = nextCertificateNo(world, sheet.issuer, sheet.issued);
  const values = sheet.entries.map((entry, at) => valueOf(sheet, entry, certificateNo, at + 1, 1));
  world.steps.push({
    day: sheet.issued,
    does: 'issue',
    certificate: certificateOf(sheet, certificateNo, values),
    keys: values.map((value) => value.key),
  });
  enter(world, { sheet, revision: 1, values });
  for (const { result } of sheet.entries) {
    for (const { value } of result.task.leaning.uses) {
      if (sheet.end > value.weight.lastUsedOn) value.weight.lastUsedOn = sheet.end;
    }
  }
  return values;
}

/** How a certificate is issued again. */
export interface Reissue {
  day: string;
  reason: string;
  /** Gives each line anew; the same line where value and U stay. */
  correct?(entry: Entry): Entry;
}

/** Issues a certificate again: every line, and the ends of the lines before. */
export function reissue(world: World, certificateNo: string, { day, reason, correct }: Reissue): DemoValue[] {
  const before = world.sheets.get(certificateNo);
  if (!before) throw new Error(`There is no certificate ${certificateNo} to issue again`);
  const entries = before.sheet.entries.map((entry) => correct?.(entry) ?? entry);
  const sheet = { ...before.sheet, issued: day, entries };
  const revision = before.revision + 1;
  const values = entries.map((entry, at) => valueOf(sheet, entry, certificateNo, at + 1, revision));
  for (const [at, value] of before.values.entries()) {
    const isSame = values[at]!.deviation === value.deviation && values[at]!.expandedU === value.expandedU;
    value.ends.push({ effectiveOn: day, knownOn: day, changesValue: !isSame });
  }
  world.steps.push({
    day,
    does: 'revise',
    certificate: certificateOf(sheet, certificateNo, values),
    reason,
    effectiveOn: day,
    keys: values.map((value) => value.key),
  });
  enter(world, { sheet, revision, values });
  return values;
}

/** Withdraws a certificate on a day, from another day on. */
export function withdraw(
  world: World,
  certificateNo: string,
  { day, reason, effectiveOn }: { day: string; reason: string; effectiveOn: string },
): void {
  const { sheet, values } = world.sheets.get(certificateNo)!;
  for (const value of values) value.ends.push({ effectiveOn, knownOn: day, changesValue: true });
  world.steps.push({
    day,
    does: 'withdraw',
    laboratory: sheet.registeredBy,
    certificateNo,
    reason,
    effectiveOn,
  });
}

function enter(world: World, issued: IssuedSheet): void {
  world.sheets.set(issued.values[0]!.certificateNo, issued);
  for (const value of issued.values) {
    world.values.set(value.key, value);
    value.weight.values.push(value);
  }
}

/** The sheet as the services take it. */
export function certificateOf(
  sheet: Sheet,
  certificateNo: string,
  values: readonly DemoValue[],
): PlannedCertificate {
  const omits = (what: Omission) => sheet.entries.some((entry) => entry.omits === what);
  return {
    issuer: sheet.issuer,
    registeredBy: sheet.registeredBy,
    signedBy: omits('signatory') ? 'metrologist' : 'signatory',
    certificateNo,
    performedBegin: sheet.begin,
    performedEnd: sheet.end,
    issuedOn: sheet.issued,
    method: sheet.method,
    decisionRule:
      values.some((value) => value.class !== null) && !omits('decision rule')
        ? laboratoryOf(sheet.issuer).decisionRule
        : null,
    lines: sheet.entries.map((entry, at) => lineOf(sheet, entry, values[at]!)),
    group: sheet.group ?? null,
  };
}

function valueOf(
  sheet: Sheet,
  entry: Entry,
  certificateNo: string,
  line: number,
  revision: number,
): DemoValue {
  const { task, printed, localU } = entry.result;
  const key = `${certificateNo}/${line}${revision === 1 ? '' : `@${revision}`}`;
  // Without a budget the register takes the own part from the printed U: so does the plan.
  const own = entry.hasBudget
    ? localU
    : Math.sqrt(Math.max(0, (printed.expandedU / 2) ** 2 - carriedAsPrinted(task.leaning)));
  return {
    key,
    certificateNo,
    revision,
    line,
    weight: task.weight,
    quantity: task.quantity,
    stage: task.stage,
    deviation: printed.deviation,
    expandedU: printed.expandedU,
    u: printed.expandedU / 2,
    halfDigit: printed.halfDigit,
    class: classStatement(entry),
    effects: combined([
      { sensitivity: 1, effects: leanedEffects(task.leaning, key) },
      { sensitivity: 1, effects: entry.ownEffects ?? effect(key, own) },
    ]),
    performedEnd: sheet.end,
    issuedOn: sheet.issued,
    epoch: task.stage === 'as found' ? task.weight.epochs.length - 2 : task.weight.epochs.length - 1,
    scale: entry.scale !== undefined ? entry.scale : (task.leaning.uses[0]?.value.scale ?? null),
    isFaulty: entry.isFaulty ?? false,
    ends: [],
  };
}

/** The class, where deviation and U allow it by the stricter decision rule and U is at most a third of the limit. */
function classStatement({ result: { task, printed }, statesClass }: Entry): DemoValue['class'] {
  const { weight, quantity } = task;
  if (quantity === 'mass' || weight.class === null || statesClass === false) return null;
  const limit = classLimitOf(weight.class, weight.nominal);
  const keeps = Math.abs(printed.deviation) + printed.expandedU <= limit && printed.expandedU <= limit / 3;
  return keeps ? weight.class : null;
}

function lineOf(sheet: Sheet, entry: Entry, value: DemoValue): PlannedLine {
  const { task, printed } = entry.result;
  return {
    registryNo: task.weight.registryNo,
    quantity: task.quantity,
    medium: task.weight.kind === 'realization' ? 'vacuum' : 'air',
    stage: task.stage,
    deviation: printed.deviationText,
    reportedUnit: printed.unit,
    reportedDecimals: printed.decimals,
    expandedU: printed.expandedUText,
    reportedUDecimals: printed.decimals,
    k: '2',
    coverage: '0.9545',
    class: value.class as PlannedLine['class'],
    underAccreditation: task.isAccredited,
    unitConfirmed: entry.isUnitConfirmed ?? false,
    rootKind: entry.rootKind ?? null,
    scale: value.scale,
    references: [
      ...task.leaning.uses.map(({ value: { key }, sensitivity, usedAs }) => ({
        value: key,
        sensitivity,
        usedAs,
      })),
      ...(entry.informedBy ?? []).map(({ key }) => ({
        value: key,
        sensitivity: 0,
        role: 'informs' as const,
      })),
    ].map((reference) => ({ ...reference, usedBegin: sheet.begin, usedEnd: sheet.end })),
    sources:
      entry.omits === 'buoyancy'
        ? []
        : task.leaning.sources.map(({ source, sensitivity }) => ({ source, sensitivity })),
    degreesOfFreedom: entry.omits === 'degrees of freedom' ? FEW_DEGREES : null,
    components: entry.hasBudget ? budgetOf(entry) : [],
  };
}

/** Budgets: shares of the own variance that sum to 1. */
const BUDGETS = {
  weighing: [
    {
      name: 'Repeatability of the weighings',
      evaluation: 'A',
      distribution: 'normal',
      share: 0.4,
      degreesOfFreedom: 18,
    },
    { name: 'Reference since its calibration', evaluation: 'B', distribution: 'rectangular', share: 0.3 },
    { name: 'Balance', evaluation: 'B', distribution: 'rectangular', share: 0.2 },
    { name: 'Air density', evaluation: 'B', distribution: 'normal', share: 0.1 },
  ],
  realization: [
    {
      name: 'Repeatability of the run',
      evaluation: 'A',
      distribution: 'normal',
      share: 0.3,
      degreesOfFreedom: 24,
    },
    { name: 'Alignment', evaluation: 'B', distribution: 'normal', share: 0.3 },
    { name: 'Length, time and electrical standards', evaluation: 'B', distribution: 'normal', share: 0.2 },
    { name: 'Surface and magnetic effects', evaluation: 'B', distribution: 'normal', share: 0.2 },
  ],
} as const;

function budgetOf({
  result: { task, fillU },
  budget = 'weighing',
  omits,
}: Entry): NonNullable<PlannedLine['components']> {
  const leftOut = omits && LEFT_OUT[omits];
  const kept = BUDGETS[budget].filter(({ name }) => name !== leftOut);
  const total = kept.reduce((sum, { share }) => sum + share, 0);
  const own = kept.map(({ share, ...component }) => ({
    ...component,
    standardUncertainty: task.ownU * Math.sqrt(share / total),
    sensitivity: 1,
  }));
  if (fillU === 0) return own;
  const fill = { name: 'Filled up to the best capability', evaluation: 'B', distribution: 'normal' } as const;
  return [...own, { ...fill, standardUncertainty: fillU, sensitivity: 1 }];
}
