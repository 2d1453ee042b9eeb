import { useState, type FormEvent } from 'react';
import type { WhatIfChange } from '#shared/contracts/downstream.ts';
import { Button } from '#src/components/ui/button.tsx';
import { SelectField } from '#src/components/ui/select-field.tsx';
import { DateField, TextField } from '#src/components/ui/text-field.tsx';
import { usePreferences } from '#src/lib/preferences.ts';
import { noticeFrom, EMPTY_NOTICE, type NoticeEntry } from '../notice-entry.ts';

interface NoticeFormProps {
  institutes: readonly { id: string; name: string }[];
  onAdd: (change: WhatIfChange) => void;
}

/** A notice on one's own institute's values as a supposed change: which values, and what it brings to them. */
export function NoticeForm({ institutes, onAdd }: NoticeFormProps) {
  const { decimalMark } = usePreferences();
  const [entry, setEntry] = useState<NoticeEntry>({ ...EMPTY_NOTICE, issuerId: institutes[0]?.id ?? '' });
  const [isJudged, setJudged] = useState(false);
  const read = noticeFrom(entry, decimalMark);
  const problems = isJudged ? read.problems : {};
  const set = (part: Partial<NoticeEntry>) => setEntry((before) => ({ ...before, ...part }));
  const field = (name: Exclude<keyof NoticeEntry, 'points'>) => ({
    value: entry[name],
    onChange: (event: { target: { value: string } }) => set({ [name]: event.target.value }),
    error: problems[name],
  });
  const submit = (event: FormEvent) => {
    event.preventDefault();
    setJudged(true);
    if (read.change) onAdd(read.change);
  };
  return (
    <form onSubmit={submit} noValidate className="flex flex-col gap-3">
      {institutes.length > 1 && (
        <SelectField
          label="Issuer"
          choices={institutes.map(({ id, name }) => ({ value: id, label: name }))}
          {...field('issuerId')}
        />
      )}
      <SelectField
        label="Covers"
        choices={[
          { value: '', label: 'mass and conventional mass' },
          { value: 'mass', label: 'mass' },
          { value: 'conventional mass', label: 'conventional mass' },
        ]}
        {...field('quantity')}
      />
      <div className="grid grid-cols-2 gap-2">
        <DateField label="Calibrated from" isOptional {...field('performedFrom')} />
        <DateField label="to" isOptional {...field('performedTo')} />
        <TextField label="Nominal from" placeholder="1 kg" isOptional isMono {...field('nominalFrom')} />
        <TextField label="to" placeholder="10 kg" isOptional isMono {...field('nominalTo')} />
      </div>
      <Points points={entry.points} problems={problems} onChange={(points) => set({ points })} />
      <TextField
        label="Standard uncertainty added, per kilogram"
        placeholder="10 µg"
        isOptional
        isMono
        {...field('addedU')}
      />
      {problems.whole && <p className="text-broken">{problems.whole}</p>}
      <div>
        <Button type="submit">Add this change</Button>
      </div>
    </form>
  );
}

interface PointsProps {
  points: NoticeEntry['points'];
  problems: Record<string, string | undefined>;
  onChange: (points: NoticeEntry['points']) => void;
}

/** The shift by day of calibration: linear between the days given, constant outside them. */
function Points({ points, problems, onChange }: PointsProps) {
  const change = (at: number, part: Partial<NoticeEntry['points'][number]>) =>
    onChange(points.map((point, place) => (place === at ? { ...point, ...part } : point)));
  return (
    <fieldset className="flex flex-col gap-2">
      <legend className="text-ink-2">
        Shift per kilogram, by day of calibration: linear between the days, constant outside
      </legend>
      {points.map((point, at) => (
        <div key={at} className="grid grid-cols-2 items-start gap-2">
          <DateField
            label={`Day ${at + 1}`}
            value={point.on}
            onChange={(event) => change(at, { on: event.target.value })}
            error={problems[`points.${at}.on`]}
          />
          <TextField
            label={`Shift on day ${at + 1}`}
            placeholder="-20 µg"
            isMono
            value={point.shift}
            onChange={(event) => change(at, { shift: event.target.value })}
            error={problems[`points.${at}.shift`]}
          />
        </div>
      ))}
      <div className="flex gap-3">
        <Button weight="text" onClick={() => onChange([...points, { on: '', shift: '' }])}>
          Add a day
        </Button>
        {points.length > 1 && (
          <Button weight="text" onClick={() => onChange(points.slice(0, -1))}>
            Take the last away
          </Button>
        )}
      </div>
    </fieldset>
  );
}
