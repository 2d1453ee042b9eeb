import { useState } from 'react';
import { DecimalField } from '#src/components/ui/decimal-field.tsx';

interface BeyondFieldProps {
  /** Percent of U. */
  value: number;
  onChange: (percent: number) => void;
}

const LARGEST = 1000;

/** From which part of U on a shift is material: asked anew once the field is left. 10 % unless said otherwise. */
export function BeyondField({ value, onChange }: BeyondFieldProps) {
  const [typed, setTyped] = useState(String(value));
  const percent = Number(typed);
  const isGood = typed.trim() !== '' && percent >= 0 && percent <= LARGEST;
  const settle = () => {
    if (isGood && percent !== value) onChange(percent);
  };
  return (
    <DecimalField
      label="Material beyond, 10 if not said"
      unit="% of U"
      className="w-56"
      value={typed}
      onChange={setTyped}
      onBlur={settle}
      onKeyDown={(event) => event.key === 'Enter' && settle()}
      error={isGood ? undefined : `Write a part of U from 0 to ${LARGEST} %.`}
    />
  );
}
