import type { RegisterSetBody } from '#shared/contracts/standards.ts';
import { inAct } from '#server/db/act.ts';
import { insertRow, insertRows } from '#server/db/base-model.ts';
import { fieldError } from '#server/http/app-error.ts';
import { newId, today, type Context } from '#server/http/context.ts';
import { insertStandards } from './insert-standards.ts';
import { refuseTakenNumber, type RegisteredStandard } from './register-standard.service.ts';
import { densityProblem, duplicateMarkingProblem, inServiceProblem } from './registration-rules.ts';
import { setMemberModel, setModel } from './standards.model.ts';

export interface RegisteredSet {
  id: string;
  registryNo: string;
  members: RegisteredStandard[];
}

/**
 * Registers a whole set in one act; members are numbered `<set>-01`, `-02`, ... in the order given.
 * @throws AppError `duplicate` on registryNo, `unprocessable` naming the member
 */
export async function registerSet(context: Context, body: RegisterSetBody): Promise<RegisteredSet> {
  const problem =
    inServiceProblem(body.inServiceFrom, today(context)) ??
    duplicateMarkingProblem(body.members) ??
    firstDensityProblem(body.members);
  if (problem) throw fieldError(problem.field, problem);
  return inAct(context, { kind: 'set.register', laboratoryId: body.laboratoryId }, async (act) => {
    await refuseTakenNumber(context, body.registryNo);
    const { laboratoryId, registryNo, name, manufacturer, inServiceFrom, intervalMonths } = body;
    const id = newId(context);
    await insertRow(setModel(context.database), { id, registryNo, name, laboratoryId });
    const members = await insertStandards(
      context,
      body.members.map((member, at) => ({
        ...member,
        id: newId(context),
        kind: 'weight',
        registryNo: `${registryNo}-${String(at + 1).padStart(2, '0')}`,
        laboratoryId,
        manufacturer,
        inServiceFrom,
        intervalMonths,
      })),
    );
    await insertRows(
      setMemberModel(context.database),
      members.map((member, at) => ({
        setId: id,
        standardId: member.id,
        position: at + 1,
        validFrom: inServiceFrom ?? today(context),
        validTo: null,
      })),
    );
    act.record({
      subject: { type: 'set', id },
      after: { ...body, members: body.members.map((member, at) => ({ ...member, id: members[at]?.id })) },
    });
    return { id, registryNo, members };
  });
}

function firstDensityProblem(members: RegisterSetBody['members']) {
  for (const [at, member] of members.entries()) {
    const problem = densityProblem(member.density, `members.${at}.density`);
    if (problem) return problem;
  }
  return null;
}
