import { useQuery } from '@tanstack/react-query';
import type { DraftLine } from '#shared/contracts/drafts.ts';
import { laboratoriesQuery } from '../api.ts';
import { useKnown } from './known.ts';

/** Says in words what a part of a draft holds: names for identifiers, "yes" and "no", "empty" for nothing. */
export function usePartWords(): (field: string | null, value: unknown) => string {
  const known = useKnown();
  const { data } = useQuery(laboratoriesQuery);
  return (field, value) => {
    if (value === null || value === undefined || value === '') return field === null ? 'not there' : 'empty';
    if (field === null) {
      const line = value as DraftLine;
      return [line.value || 'no value', line.unit, line.expandedU && `U ${line.expandedU} ${line.uUnit}`]
        .filter(Boolean)
        .join(' ');
    }
    if (typeof value === 'boolean') return value ? 'yes' : 'no';
    if (field === 'issuerId')
      return data?.laboratories.find(({ id }) => id === value)?.name ?? 'another laboratory';
    if (field === 'standardId') return known.standards.get(String(value))?.registryNo ?? 'another weight';
    if (field === 'documentId') return 'a file';
    if (field === 'references') {
      const names = (value as DraftLine['references']).map(
        ({ valueUid }) => known.references.get(valueUid)?.registryNo ?? 'another value',
      );
      return names.length > 0 ? names.join(', ') : 'none';
    }
    return typeof value === 'string' ? value : JSON.stringify(value);
  };
}
