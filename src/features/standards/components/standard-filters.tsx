import { useEffect, useRef, useState } from 'react';
import { WeightClass } from '#shared/contracts/common.ts';
import { StandardKind } from '#shared/contracts/standards.ts';
import { Toolbar } from '#src/components/layout/columns.tsx';
import { Button } from '#src/components/ui/button.tsx';
import { SelectField, type Choice } from '#src/components/ui/select-field.tsx';
import { TextField } from '#src/components/ui/text-field.tsx';
import { isNarrowed, type Filters, type ListSearch } from '../list-search.ts';
import { isGrams } from '../nominal.ts';
import { KIND_WORDS } from '../words.ts';
import { NominalField } from './nominal-field.tsx';

interface StandardFiltersProps {
  search: ListSearch;
  /** The laboratories this person may narrow to; no such filter with fewer than two. */
  laboratories: readonly Choice[];
  onChange: (change: Partial<Filters>) => void;
}

const PAUSE_MS = 250;
const STANDINGS: readonly Choice[] = [
  { value: 'due', label: 'due within 60 days' },
  { value: 'overdue', label: 'overdue' },
  { value: 'no value', label: 'no value in force' },
];
const NOTHING: Record<keyof Filters, undefined> = {
  q: undefined,
  laboratory: undefined,
  class: undefined,
  kind: undefined,
  standing: undefined,
  nominalFrom: undefined,
  nominalTo: undefined,
};

/** What narrows the list; every choice stands in the address at once, typed text after a short pause. */
export function StandardFilters({ search, laboratories, onChange }: StandardFiltersProps) {
  const choose = (name: keyof Filters) => (event: { target: { value: string } }) =>
    onChange({ [name]: event.target.value || undefined });
  return (
    <Toolbar label="Narrow the list">
      <SearchBox q={search.q ?? ''} onSearch={(q) => onChange({ q })} />
      {laboratories.length > 1 && (
        <SelectField
          label="Laboratory"
          className="w-40"
          placeholder="all"
          choices={laboratories}
          value={search.laboratory ?? ''}
          onChange={choose('laboratory')}
        />
      )}
      <SelectField
        label="Class"
        className="w-20"
        placeholder="all"
        choices={WeightClass.options.map((value) => ({ value, label: value }))}
        value={search.class ?? ''}
        onChange={choose('class')}
      />
      <SelectField
        label="Kind"
        className="w-32"
        placeholder="all"
        choices={StandardKind.options.map((value) => ({ value, label: KIND_WORDS[value] }))}
        value={search.kind ?? ''}
        onChange={choose('kind')}
      />
      <SelectField
        label="Standing"
        className="w-38"
        placeholder="all"
        choices={STANDINGS}
        value={search.standing ?? ''}
        onChange={choose('standing')}
      />
      <RangeEnd
        label="Nominal, from"
        value={search.nominalFrom}
        onRead={(nominalFrom) => onChange({ nominalFrom })}
      />
      <RangeEnd label="to" value={search.nominalTo} onRead={(nominalTo) => onChange({ nominalTo })} />
      {isNarrowed(search) && (
        <Button weight="text" className="mb-1.5" onClick={() => onChange(NOTHING)}>
          Show all
        </Button>
      )}
    </Toolbar>
  );
}

function SearchBox({ q, onSearch }: { q: string; onSearch: (q: string | undefined) => void }) {
  const [typed, setTyped] = useState(q);
  // The address answers a moment later: only a question that was not ours replaces what is being typed.
  const [asked, setAsked] = useState({ address: q, sent: q });
  if (asked.address !== q) {
    setAsked({ ...asked, address: q });
    if (q !== asked.sent) setTyped(q);
  }
  const latest = useRef(onSearch);
  useEffect(() => {
    latest.current = onSearch;
  });
  useEffect(() => {
    const text = typed.trim();
    if (text === q) return undefined;
    const timer = setTimeout(() => {
      setAsked((before) => ({ ...before, sent: text }));
      latest.current(text === '' ? undefined : text);
    }, PAUSE_MS);
    return () => clearTimeout(timer);
  }, [typed, q]);
  return (
    <TextField
      label="Number, marking or certificate"
      type="search"
      className="w-52 max-rail:w-full"
      maxLength={80}
      value={typed}
      onChange={(event) => setTyped(event.target.value)}
    />
  );
}

interface RangeEndProps {
  label: string;
  value: string | undefined;
  onRead: (grams: string | undefined) => void;
}

/** Asks only once the field is left or Enter is pressed: "1", "1 k" and "1 kg" are not three questions. */
function RangeEnd({ label, value, onRead }: RangeEndProps) {
  const [held, setHeld] = useState({ asked: value, text: value ?? '' });
  if (held.asked !== value) setHeld({ asked: value, text: value ?? '' });
  const ask = () => {
    const grams = isGrams(held.text) ? held.text : undefined;
    if (grams !== value && (grams !== undefined || held.text === '')) onRead(grams);
  };
  return (
    <NominalField
      label={label}
      className="w-24"
      placeholder="any"
      value={held.text}
      onChange={(text) => setHeld({ ...held, text })}
      onBlur={ask}
      onKeyDown={(event) => {
        if (event.key === 'Enter') ask();
      }}
    />
  );
}
