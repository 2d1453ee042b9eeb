import { inAct } from '#server/db/act.ts';
import type { Context } from '#server/http/context.ts';
import {
  assertMembership,
  createAccount,
  hashPassword,
  userByAccountId,
} from '#server/modules/identity/index.ts';
import {
  adoptPolicy,
  assertAuthorisation,
  assertRecognition,
  assertScopeLine,
  createLaboratory,
  createScaleVersion,
} from '#server/modules/network/index.ts';
import { createSource } from '#server/modules/standards/index.ts';
import type { User } from '#server/policy/user.ts';
import { SCOPES } from './capabilities.ts';
import { LABORATORIES, type DemoLaboratory } from './laboratories.ts';
import { DEMO_PASSWORD, demoPeople, type DemoPerson } from './people.ts';
import { CONSENSUS, CONSENSUS_U, SCALES } from './scales.ts';

/** What the register holds, by the plan's own names. */
export interface Admitted {
  laboratoryIds: Map<string, string>;
  people: number;
  /** By laboratory. */
  signatories: Map<string, User>;
  /** Accounts, by laboratory. */
  metrologistIds: Map<string, string>;
  standardIds: Map<string, string>;
  /** `V:<registry number>`, `S:<scale>`. */
  sourceUids: Map<string, string>;
  scaleIds: Map<string, string>;
  valueUids: Map<string, string>;
  /** By certificate: its calibration and latest revision. */
  calibrations: Map<string, { calibrationId: string; revisionId: string }>;
}

const SINCE = '2016-06-01';
const METHOD = 'Substitution weighing';

/** Laboratories with recognition and scope, the scales, the policy that marks the demo, and the people. */
export async function admitNetwork(context: Context): Promise<Admitted> {
  const admitted: Admitted = {
    laboratoryIds: new Map(),
    people: 0,
    signatories: new Map(),
    metrologistIds: new Map(),
    standardIds: new Map(),
    sourceUids: new Map(),
    scaleIds: new Map(),
    valueUids: new Map(),
    calibrations: new Map(),
  };
  await adoptPolicy(context, {
    name: 'demo network',
    edition: '1',
    content: { note: 'Every laboratory, person, weight and value of this register is invented.' },
    validFrom: SINCE,
    validTo: null,
  });
  for (const laboratory of LABORATORIES) await admitLaboratory(context, laboratory, admitted);
  await addScales(context, admitted);
  const passwordHash = await hashPassword(DEMO_PASSWORD);
  for (const person of demoPeople()) await addPerson(context, person, passwordHash, admitted);
  return admitted;
}

async function admitLaboratory(
  context: Context,
  laboratory: DemoLaboratory,
  admitted: Admitted,
): Promise<void> {
  const { code, name, kind, country, place, isAccredited } = laboratory;
  await inAct(
    context,
    { kind: 'laboratory.create', laboratoryId: null, reason: 'Admission' },
    async (act) => {
      const { id } = await createLaboratory(context, { code, name, kind, country, place });
      admitted.laboratoryIds.set(code, id);
      if (kind !== 'calibration laboratory' || isAccredited) {
        await assertRecognition(context, {
          laboratoryId: id,
          ...(isAccredited
            ? {
                kind: 'accreditation',
                body: 'Accreditation Council of Orria',
                arrangement: 'Round Table of Accreditors',
              }
            : {
                kind: 'institute arrangement',
                body: 'Assembly of Mass Institutes',
                arrangement: 'Mutual Trust of Institutes',
              }),
          number: `${code}-1`,
          state: 'granted',
          validFrom: SINCE,
          validTo: null,
        });
      }
      for (const line of scopeLines(code))
        await assertScopeLine(context, { laboratoryId: id, ...line, ...OPEN });
      act.record({ subject: { type: 'laboratory', id }, after: laboratory });
    },
  );
}

const OPEN = { state: 'granted', validFrom: SINCE, validTo: null } as const;

/** The scope of a laboratory as the register takes it, numbered from 1. */
export function scopeLines(code: string) {
  return (SCOPES.get(code) ?? []).map((range, at) => ({
    line: at + 1,
    quantity: range.quantity,
    nominalFrom: range.from,
    nominalTo: range.to,
    method: METHOD,
    bestUConstant: range.constant,
    bestURelative: range.relative,
    k: '2',
    coverage: '0.9545',
  }));
}

async function addScales(context: Context, admitted: Admitted): Promise<void> {
  for (const scale of SCALES) {
    const { id } = await createScaleVersion(context, { ...scale, validTo: null });
    admitted.scaleIds.set(scale.name, id);
  }
  const { uid } = await createSource(context, {
    kind: 'scale version',
    name: CONSENSUS,
    u: CONSENSUS_U,
    unit: 'g',
  });
  admitted.sourceUids.set(`S:${CONSENSUS}`, uid);
}

async function addPerson(
  context: Context,
  { email, name, roles }: DemoPerson,
  passwordHash: string,
  admitted: Admitted,
): Promise<void> {
  const { id: accountId } = await createAccount(context, { email, name, passwordHash });
  admitted.people += 1;
  for (const { role, laboratory, from, to } of roles) {
    const laboratoryId = laboratory === null ? null : admitted.laboratoryIds.get(laboratory)!;
    const days = { state: 'granted', validFrom: from, validTo: to } as const;
    await assertMembership(context, { accountId, laboratoryId, role, ...days });
    if (role === 'metrologist' && laboratory) admitted.metrologistIds.set(laboratory, accountId);
    if (role !== 'signatory' || !laboratoryId) continue;
    await assertAuthorisation(context, { accountId, laboratoryId, what: 'sign calibrations', ...days });
    const user = await userByAccountId(context.database, context.clock, accountId);
    if (user) admitted.signatories.set(laboratory!, user);
  }
}
