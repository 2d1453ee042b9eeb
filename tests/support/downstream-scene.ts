import { issueCalibration } from '#server/modules/calibrations/index.ts';
import { readRow } from '#server/db/read.ts';
import { inputOf, lineOf, makeStandard, useOf } from './calibration-factories.ts';
import { makeLaboratory, makePerson, type TestPerson } from './factories.ts';
import type { TestApp } from './test-app.ts';

type Laboratory = Awaited<ReturnType<typeof makeLaboratory>>;

/** One value of the scene. */
export interface SceneValue {
  id: number;
  uid: string;
  revisionId: string;
  certificateNo: string;
  standardId: string;
  registryNo: string;
  deviation: string;
  /** Expanded, k = 2, grams. */
  expandedU: string;
}

export interface DownstreamScene {
  institute: Laboratory;
  home: Laboratory;
  customer: Laboratory;
  another: Laboratory;
  /** The institute's root, 1 kg, and its working standard. */
  root: SceneValue;
  working: SceneValue;
  /** Home's reference, calibrated by the institute from the working standard; another laboratory's likewise. */
  homes: SceneValue;
  others: SceneValue;
  /** A customer's weight, calibrated by home; what the customer calibrated from it for itself. */
  customers: SceneValue;
  below: SceneValue;
  /** Metrologists, a registrar, and one of a laboratory that has nothing here. */
  people: Record<'institute' | 'home' | 'customer' | 'another' | 'registrar' | 'stranger', TestPerson>;
}

/** Issues one 1 kg weight of class E2 for a holder; its deviation is its own, so that a leak is seen. */
export async function issueValue(
  app: TestApp,
  parts: {
    issuer: Laboratory;
    holder: Laboratory;
    day: string;
    deviation: string;
    expandedU: string;
    leansOn: string | null;
    sensitivity?: number;
    usedAs?: 'certificate' | 'class limit' | 'by notice';
    standardId?: string;
    weightClass?: 'E2' | 'M1';
  },
): Promise<SceneValue> {
  const standard = parts.standardId
    ? { id: parts.standardId, registryNo: '' }
    : await makeStandard(app, parts.holder.id);
  const use = parts.leansOn && useOf(parts.leansOn, parts.day, parts.sensitivity ?? 1);
  const line = lineOf(standard.id, {
    deviation: parts.deviation,
    expandedU: parts.expandedU,
    class: parts.weightClass ?? 'E2',
    ...(use ? { references: [{ ...use, usedAs: parts.usedAs ?? 'certificate' }] } : {}),
  });
  // Who holds the weight enters the certificate: a laboratory that issues for a customer does not own the weight.
  const input = inputOf(parts.issuer.id, parts.day, [line], { registeredById: parts.holder.id });
  const issued = await issueCalibration(app.context(), input);
  const uid = issued.valueUids[0]!;
  const row = await readRow<{ id: number }>(app.database, 'SELECT id FROM assigned_value WHERE uid = :uid', {
    uid,
  });
  return {
    id: row!.id,
    uid,
    revisionId: issued.revisionId,
    certificateNo: input.certificateNo,
    standardId: standard.id,
    registryNo: standard.registryNo,
    deviation: parts.deviation,
    expandedU: parts.expandedU,
  };
}

/** Root - working standard - home's and another's references - a customer's weight - the customer's own. */
export async function makeDownstreamScene(app: TestApp): Promise<DownstreamScene> {
  const institute = await makeLaboratory(app, 'national institute');
  const [home, customer, another, nowhere] = [
    await makeLaboratory(app),
    await makeLaboratory(app),
    await makeLaboratory(app),
    await makeLaboratory(app),
  ];
  const value = (
    issuer: Laboratory,
    holder: Laboratory,
    day: string,
    [deviation, expandedU]: [string, string],
    above: SceneValue | null,
  ) => issueValue(app, { issuer, holder, day, deviation, expandedU, leansOn: above?.uid ?? null });
  const root = await value(institute, institute, '2024-01-10', ['0.000011', '0.0001'], null);
  const working = await value(institute, institute, '2024-02-10', ['0.000022', '0.0002'], root);
  const homes = await value(institute, home, '2024-03-10', ['0.000133', '0.0003'], working);
  const others = await value(institute, another, '2024-03-11', ['0.000144', '0.0003'], working);
  const customers = await value(home, customer, '2024-04-10', ['0.000255', '0.0004'], homes);
  const below = await value(customer, customer, '2025-05-10', ['0.000366', '0.0005'], customers);
  const person = (laboratory: Laboratory) => makePerson(app, 'metrologist', laboratory.id);
  return {
    ...{ institute, home, customer, another, root, working, homes, others, customers, below },
    people: {
      institute: await person(institute),
      home: await person(home),
      customer: await person(customer),
      another: await person(another),
      registrar: await makePerson(app, 'registrar'),
      stranger: await person(nowhere),
    },
  };
}
