import { useState } from 'react';
import { DecimalField } from '#src/components/ui/decimal-field.tsx';
import { percentProblem } from '#src/lib/read-percent.ts';

interface BeyondFieldProps {
  /** Percent of U. */
  value: number;
  onChange: (percent: number) => void;
  /** Told when the field is left: whether what stands in it cannot be asked. */
  onRefused: (isRefused: boolean) => void;
}

const LARGEST = 1000;

/** From which part of U on a shift is material: asked anew once the field is left. 10 % unless said otherwise. */
export function BeyondField({ value, onChange, onRefused }: BeyondFieldProps) {
  const [typed, setTyped] = useState(String(value));
  const problem = percentProblem(typed, LARGEST);
  const settle = () => {
    onRefused(problem !== undefined);
    if (problem === undefined && Number(typed) !== value) onChange(Number(typed));
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
      hint="For weights of others always 10"
      error={problem}
    />
  );
}
