import { z } from 'zod';
import { RegisterSetBody, Shape } from '#shared/contracts/standards.ts';
import { isGrams, nominalMarking, readNominal } from './nominal.ts';

const Member = RegisterSetBody.shape.members.element;

/** What all weights of a set share, or all those below 1 g. */
const Body = Member.pick({ material: true, density: true });

/**
 * A set as it is typed: class, material and density once for all its weights, and once more for those below
 * 1 g where they are of another material.
 */
export const SetEntries = RegisterSetBody.omit({ members: true })
  .extend({
    class: Member.shape.class,
    ...Body.shape,
    below1g: Body.nullable(),
    members: z
      .array(Member.pick({ nominal: true, marking: true, serial: true, shape: true }))
      .min(1, 'A set has at least one weight')
      .max(60, 'A set has at most 60 weights; register the others as a second set'),
  })
  .superRefine((entries, context) => {
    const seen = new Map<string, number>();
    entries.members.forEach(({ nominal, marking }, index) => {
      const first = seen.get(`${nominal} ${marking}`);
      if (first === undefined) {
        seen.set(`${nominal} ${marking}`, index);
        return;
      }
      context.addIssue({
        code: 'custom',
        path: ['members', index, 'marking'],
        message: `Same nominal and marking as row ${first + 1}: add a star or a dot, as it is engraved (OIML R 111-1:2004, 13).`,
      });
    });
  });

export type SetEntries = z.output<typeof SetEntries>;
export type SetEntriesInput = z.input<typeof SetEntries>;
export type MemberEntry = SetEntriesInput['members'][number];

/** The request that registers what was typed. */
export function toSetBody(entries: SetEntries): RegisterSetBody {
  const { class: weightClass, material, density, below1g, members, ...set } = entries;
  return {
    ...set,
    members: members.map((member) => ({
      ...member,
      class: weightClass,
      ...(below1g && Number(member.nominal) < 1 ? below1g : { material, density }),
    })),
  };
}

const COLUMNS = ['nominal', 'marking', 'serial', 'shape'] as const;

/** A column of the table of weights that can be typed into. */
export type MemberColumn = (typeof COLUMNS)[number];

/** The columns of the table in their order, for moving and pasting. */
export const MEMBER_COLUMNS: readonly MemberColumn[] = COLUMNS;

/** The name one would write on the lid: "E2 set, 1 mg to 1 kg". */
export function proposedName(
  weightClass: string | null,
  members: readonly Pick<MemberEntry, 'nominal'>[],
): string {
  const nominals = members
    .map((member) => member.nominal)
    .filter(isGrams)
    .toSorted((a, b) => Number(a) - Number(b));
  const [smallest, largest] = [nominals[0], nominals.at(-1)];
  if (!smallest || !largest) return '';
  const range =
    smallest === largest
      ? nominalMarking(smallest)
      : `${nominalMarking(smallest)} to ${nominalMarking(largest)}`;
  return weightClass ? `${weightClass} set, ${range}` : `Set, ${range}`;
}

/** Whether two lists hold the same weights, cell by cell. */
export function isSameMembers(a: readonly MemberEntry[], b: readonly MemberEntry[]): boolean {
  const text = (member: MemberEntry): string => COLUMNS.map((column) => member[column] ?? '').join('\t');
  return a.length === b.length && a.every((member, index) => text(member) === text(b[index]!));
}

/** What is wrong with a cell, in the words of the table where the schema knows only texts. */
export function cellProblem(member: MemberEntry, column: MemberColumn, message: string): string {
  if (column === 'nominal' && !isGrams(member.nominal)) {
    const read = readNominal(member.nominal, '.');
    return read.kind === 'unreadable' ? read.why : 'Write a nominal and its unit, such as 1 kg or 500 mg.';
  }
  if (column === 'shape' && !Shape.safeParse(member.shape).success) {
    return `Received "${member.shape}"; expected ${Shape.options.join(', ')}.`;
  }
  return message;
}
