import { useState, type FormEvent, type ReactNode } from 'react';
import { Section } from '#src/components/layout/page.tsx';
import { Button } from '#src/components/ui/button.tsx';
import { DecimalField } from '#src/components/ui/decimal-field.tsx';
import { SelectField } from '#src/components/ui/select-field.tsx';
import { groupDigits } from '#shared/numbers/format-decimal.ts';
import { usePreferences } from '#src/lib/preferences.ts';
import { percentProblem } from '#src/lib/read-percent.ts';
import { unitSymbol } from '#shared/numbers/quantity-text.ts';
import { amountProblem, amountText, readAmount } from '../read-amount.ts';
import type { DownstreamSearch, Suppose } from '../search.ts';
import { AmountField } from './amount-field.tsx';

/** What the form asks. */
export type Asked = Pick<DownstreamSearch, 'suppose' | 'amount' | 'beyond'>;

interface WhatIfFormProps {
  asked: Asked;
  /** Null where the certificate is not this person's to open: then its withdrawal is not theirs to try. */
  certificateNo: string | null;
  onAsk: (asked: Asked) => void;
  /** What is written cannot be asked. */
  onRefused: () => void;
  /** Back to who leans on it. */
  onLeave: () => void;
  /** The way to a dry run of several changes. */
  further?: ReactNode;
}

const SUPPOSITIONS: { value: Suppose; label: string }[] = [
  { value: 'shift', label: 'The value shifts' },
  { value: 'raise', label: 'Its u is larger' },
  { value: 'withdraw', label: 'Its certificate is withdrawn' },
];

const LARGEST_BEYOND = 1000;

/** Puts one supposition about the value; what it would do is worked out, and nothing is changed. */
export function WhatIfForm({ asked, certificateNo, onAsk, onRefused, onLeave, further }: WhatIfFormProps) {
  const { decimalMark } = usePreferences();
  const [suppose, setSuppose] = useState(() => firstSupposition(asked, certificateNo));
  const [amount, setAmount] = useState(() => typedFrom(asked.amount, decimalMark));
  const [beyond, setBeyond] = useState(String(asked.beyond));
  // What came with the address is judged at once, what is being typed once it is left.
  const [isJudged, setJudged] = useState(asked.suppose !== undefined);
  const read = readAmount(amount, decimalMark);
  const problems = {
    amount: suppose === 'withdraw' ? undefined : amountProblem(read, suppose),
    beyond: suppose === 'withdraw' ? undefined : percentProblem(beyond, LARGEST_BEYOND),
  };
  const submit = (event: FormEvent) => {
    event.preventDefault();
    setJudged(true);
    if (problems.amount || problems.beyond) {
      onRefused();
      return;
    }
    const kept = suppose !== 'withdraw' && read.kind === 'amount' ? amountText(read.shown) : undefined;
    onAsk({
      suppose,
      amount: kept,
      beyond: suppose === 'withdraw' ? asked.beyond : Number(beyond),
    });
  };
  return (
    <Section title="What if it were otherwise?">
      <p className="text-ink-2">
        A dry run: it works out what would follow for all that leans on this value, and changes nothing.
      </p>
      <form onSubmit={submit} noValidate className="mt-1 flex flex-col gap-3">
        <SelectField
          label="Suppose"
          value={suppose}
          onChange={(event) => setSuppose(event.target.value as Suppose)}
          choices={SUPPOSITIONS.filter(({ value }) => value !== 'withdraw' || certificateNo !== null)}
        />
        {suppose === 'withdraw' ? (
          <p className="text-ink-2">
            Every value on certificate <span className="font-mono text-sm">{certificateNo}</span> falls.
          </p>
        ) : (
          <AmountField
            suppose={suppose}
            value={amount}
            onChange={setAmount}
            onLeft={() => setJudged(amount.trim() !== '')}
            read={read}
            problem={isJudged ? problems.amount : undefined}
          />
        )}
        {suppose !== 'withdraw' && (
          <DecimalField
            label="Material beyond"
            unit="% of U"
            value={beyond}
            onChange={setBeyond}
            hint="10 % of U unless you say otherwise; a changed verdict is never below it. For weights of others always 10 % of U"
            error={problems.beyond}
          />
        )}
        <div className="flex flex-wrap items-baseline gap-x-4 gap-y-2">
          <Button type="submit" weight="primary">
            Work it out
          </Button>
          {asked.suppose && (
            <Button weight="text" onClick={onLeave}>
              Back to who leans on it
            </Button>
          )}
        </div>
      </form>
      {further && <p className="pt-1">{further}</p>}
    </Section>
  );
}

/** A link may suppose a withdrawal that its reader may not try: then the form begins as it does for everyone. */
function firstSupposition({ suppose = 'shift' }: Asked, certificateNo: string | null): Suppose {
  return suppose === 'withdraw' && certificateNo === null ? 'shift' : suppose;
}

/** The address writes a point and a unit code; the field shows them as this reader writes. */
function typedFrom(amount: string | undefined, mark: '.' | ','): string {
  if (amount === undefined) return '';
  const read = readAmount(amount, '.');
  if (read.kind !== 'amount') return amount;
  return `${groupDigits(read.shown.value, mark)} ${unitSymbol(read.shown.unit)}`;
}
