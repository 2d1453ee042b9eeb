import { Toolbar } from '#src/components/layout/columns.tsx';
import { SelectField } from '#src/components/ui/select-field.tsx';
import type { AuditSearch } from '../search.ts';
import { SEVERITIES, severityWord } from '#shared/severity-words.ts';

interface FindingFiltersProps {
  search: AuditSearch;
  onChange: (change: Partial<AuditSearch>) => void;
  /** Whether results of one's own are told from those above. */
  hasOwners: boolean;
}

/** Which findings are shown. */
export function FindingFilters({ search, onChange, hasOwners }: FindingFiltersProps) {
  const filter = (name: keyof AuditSearch, label: string, choices: { value: string; label: string }[]) => (
    <SelectField
      label={label}
      placeholder="all"
      className="w-40"
      choices={choices}
      value={search[name] ?? ''}
      onChange={(event) => onChange({ [name]: event.target.value || undefined })}
    />
  );
  const same = (value: string) => ({ value, label: value });
  return (
    <Toolbar label="Which findings">
      {filter('outcome', 'Outcome', ['fails', 'cannot be judged'].map(same))}
      {filter(
        'severity',
        'Severity',
        SEVERITIES.map((value) => ({ value, label: severityWord(value) })),
      )}
      {filter('verdict', 'Verdict', [
        { value: 'conduct', label: 'at use' },
        { value: 'today', label: 'today' },
      ])}
      {hasOwners &&
        filter('whose', 'Results', [
          { value: 'own', label: 'of the laboratory' },
          { value: 'above', label: 'of others, above' },
        ])}
    </Toolbar>
  );
}
