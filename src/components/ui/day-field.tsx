import { useState } from 'react';
import { DateField } from './text-field.tsx';

interface DayFieldProps {
  label: string;
  value: string;
  /** Gets a whole day, or undefined once the field was emptied. */
  onDay: (day: string | undefined) => void;
}

const DAY = /^\d{4}-\d{2}-\d{2}$/;

/** The day of a question: it asks anew once a whole day stands there; a day that is none is said, and nothing is asked. */
export function DayField({ label, value, onDay }: DayFieldProps) {
  const [typed, setTyped] = useState<string | null>(null);
  const [error, setError] = useState<string | undefined>();
  const settle = () => {
    if (typed === null) return;
    const text = typed.trim();
    const isDay =
      DAY.test(text) && !Number.isNaN(Date.parse(text)) && new Date(text).toISOString().startsWith(text);
    if (text !== '' && !isDay) {
      setError(`"${text}" is no day. Write it as 2025-02-20.`);
      return;
    }
    setError(undefined);
    setTyped(null);
    if (text !== value) onDay(text === '' ? undefined : text);
  };
  return (
    <DateField
      label={label}
      value={typed ?? value}
      error={error}
      onChange={(event) => setTyped(event.target.value)}
      onBlur={settle}
      onKeyDown={(event) => event.key === 'Enter' && settle()}
    />
  );
}
