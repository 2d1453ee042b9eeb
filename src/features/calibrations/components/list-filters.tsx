import { useQuery } from '@tanstack/react-query';
import { useEffect, useRef, useState, type ReactNode } from 'react';
import { Day } from '#shared/contracts/common.ts';
import { SelectField } from '#src/components/ui/select-field.tsx';
import { DateField, TextField } from '#src/components/ui/text-field.tsx';
import { Toolbar } from '#src/components/layout/columns.tsx';
import { laboratoriesQuery } from '../api.ts';
import type { ListSearch } from '../list-search.ts';

const PAUSE_MS = 300;
const STATES = ['in force', 'superseded', 'withdrawn'].map((state) => ({ value: state, label: state }));

interface ListFiltersProps {
  search: ListSearch;
  onSearch: (change: Partial<ListSearch>) => void;
}

/** What narrows the list. Every choice goes into the address. */
export function ListFilters({ search, onSearch }: ListFiltersProps) {
  const { data } = useQuery(laboratoriesQuery);
  const laboratories = (data?.laboratories ?? []).map(({ id, name }) => ({ value: id, label: name }));
  return (
    <Toolbar label="Narrow the list">
      <Typed
        value={search.q ?? ''}
        onSettled={(q) => onSearch({ q: q || undefined })}
        render={(typed) => (
          <TextField
            label="Search"
            type="search"
            maxLength={80}
            placeholder="certificate, number or marking"
            className="w-64 max-w-full"
            {...typed}
          />
        )}
      />
      <SelectField
        label="Laboratory"
        placeholder="any"
        choices={laboratories}
        className="w-56 max-w-full"
        value={search.laboratory ?? ''}
        onChange={(event) => onSearch({ laboratory: event.target.value || undefined })}
      />
      <DayFilter
        label="Issued from"
        value={search.issuedFrom}
        onDay={(issuedFrom) => onSearch({ issuedFrom })}
      />
      <DayFilter label="Issued to" value={search.issuedTo} onDay={(issuedTo) => onSearch({ issuedTo })} />
      <SelectField
        label="Stands"
        placeholder="any"
        choices={STATES}
        className="w-32"
        value={search.state ?? ''}
        onChange={(event) => onSearch({ state: (event.target.value || undefined) as ListSearch['state'] })}
      />
    </Toolbar>
  );
}

interface DayFilterProps {
  label: string;
  value: string | undefined;
  onDay: (day: string | undefined) => void;
}

function DayFilter({ label, value, onDay }: DayFilterProps) {
  return (
    <Typed
      value={value ?? ''}
      onSettled={(text) => {
        if (text === '' || Day.safeParse(text).success) onDay(text || undefined);
      }}
      render={(typed) => (
        <DateField
          label={label}
          error={
            typed.value.length === 10 && !Day.safeParse(typed.value).success
              ? 'No day of the calendar'
              : undefined
          }
          {...typed}
        />
      )}
    />
  );
}

interface TypedProps {
  value: string;
  /** Called once the typing pauses. */
  onSettled: (text: string) => void;
  render: (field: { value: string; onChange: (event: { target: { value: string } }) => void }) => ReactNode;
}

/** Holds what is being typed until it pauses; a change of the address from elsewhere wins. */
function Typed({ value, onSettled, render }: TypedProps) {
  const [text, setText] = useState(value);
  const [outside, setOutside] = useState(value);
  if (value !== outside) {
    setOutside(value);
    if (value !== text.trim()) setText(value);
  }
  const latest = useRef(onSettled);
  useEffect(() => {
    latest.current = onSettled;
  });
  useEffect(() => {
    if (text.trim() === value) return undefined;
    const timer = setTimeout(() => latest.current(text.trim()), PAUSE_MS);
    return () => clearTimeout(timer);
  }, [text, value]);
  return render({ value: text, onChange: (event) => setText(event.target.value) });
}
