import type { FieldErrors } from 'react-hook-form';
import { Notice } from '#src/components/ui/notice.tsx';
import { nominalText } from '#shared/numbers/nominal.ts';
import { isGrams } from '../nominal.ts';
import { cellProblem, MEMBER_COLUMNS, type SetEntriesInput } from '../set-entries.ts';

interface RowProblemsProps {
  errors: FieldErrors<SetEntriesInput>;
  members: SetEntriesInput['members'];
}

/** Every row that keeps the set from being registered, named before the table, so that none is searched for. */
export function RowProblems({ errors, members }: RowProblemsProps) {
  const problems = members.flatMap((member, index) => {
    const row = errors.members?.[index];
    return MEMBER_COLUMNS.flatMap((column) => {
      const message = row?.[column]?.message;
      return message
        ? [{ index, column, message: cellProblem(member, column, message), nominal: member.nominal }]
        : [];
    });
  });
  const whole = errors.members?.root?.message ?? errors.members?.message;
  if (problems.length === 0 && !whole) return null;
  return (
    <Notice role="alert" tone="broken" title={`${problems.length || 1} to mend in the table of weights`}>
      <ul>
        {whole && <li>{whole}</li>}
        {problems.map(({ index, column, message, nominal }) => (
          <li key={`${index} ${column}`}>
            Row {index + 1}
            {isGrams(nominal) && `, ${nominalText(nominal)}`}, {column}: {message}
          </li>
        ))}
      </ul>
    </Notice>
  );
}
