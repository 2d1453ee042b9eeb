import { useState, type ReactNode } from 'react';
import { z } from 'zod';
import { CorrectBody } from '#shared/contracts/calibrations.ts';
import { Decimal, DecimalString, decimalText } from '#shared/decimal.ts';
import { Controller } from 'react-hook-form';
import { Button } from '#src/components/ui/button.tsx';
import { DecimalField } from '#src/components/ui/decimal-field.tsx';
import { Dialog } from '#src/components/ui/dialog.tsx';
import { ErrorNotice } from '#src/components/ui/error-notice.tsx';
import { Quantity } from '#src/components/ui/quantity.tsx';
import { DateField, Textarea, TextField } from '#src/components/ui/text-field.tsx';
import { errorAt, showFieldProblems, useZodForm } from '#src/lib/form.ts';
import { useCorrect } from '../api.ts';

interface CorrectDialogProps {
  revisionId: string;
  certificateNo: string;
  /** The result to correct, as the certificate states it; grams. */
  value: { uid: string; registryNo: string; deviation: string; expandedU: string | null; k: string | null };
  /** What the form begins with; grams. */
  supposed: { deviation: string; expandedU: string | null };
  /** What a dry run counted, in a sentence. */
  touches?: ReactNode;
  onDone: (actSeq: number) => void;
  onClose: () => void;
}

const MILLIGRAMS = 1000;

const { reason, issuedOn, effectiveOn, password } = CorrectBody.shape;
const Entry = z.object({
  deviation: DecimalString,
  expandedU: z
    .literal('')
    .or(
      DecimalString.refine((text) => new Decimal(text).gt(0), 'Expected an expanded uncertainty above zero'),
    ),
  reason,
  issuedOn,
  effectiveOn,
  password,
});

/** Corrects one result: the whole certificate is issued again as its next revision, under the signatory's password. */
export function CorrectDialog(props: CorrectDialogProps) {
  const { revisionId, certificateNo, value, supposed, touches, onDone, onClose } = props;
  const today = new Date().toISOString().slice(0, 10);
  const form = useZodForm(Entry, {
    defaultValues: {
      deviation: inMilligrams(supposed.deviation),
      expandedU: supposed.expandedU === null ? '' : inMilligrams(supposed.expandedU),
      reason: '',
      issuedOn: today,
      effectiveOn: today,
      password: '',
    },
  });
  const correct = useCorrect(revisionId);
  const [isShownAtFields, setShownAtFields] = useState(false);
  const { errors } = form.formState;
  const submit = form.handleSubmit(({ deviation, expandedU, ...entry }) => {
    const line = {
      valueUid: value.uid,
      deviation: inGrams(deviation),
      ...(expandedU === '' ? {} : { expandedU: inGrams(expandedU) }),
    };
    correct.mutate(
      { ...entry, lines: [line] },
      {
        onSuccess: ({ actSeq }) => onDone(actSeq),
        onError: (error) =>
          setShownAtFields(showFieldProblems(error, form, (path) => path in form.getValues())),
      },
    );
  });
  return (
    <Dialog
      title={`Correct certificate ${certificateNo}`}
      onClose={onClose}
      actions={
        <>
          <Button weight="primary" type="submit" form="correct" isBusy={correct.isPending}>
            Sign and issue the correction
          </Button>
          <Button onClick={onClose}>Let it stand</Button>
        </>
      }
    >
      <p className="text-ink-2">
        The certificate is issued again as its next revision with this result of {value.registryNo} corrected
        and every other result as it stands. What it said before stays on record. Now it states{' '}
        <Quantity
          value={value.deviation}
          kind="deviation"
          shownIn="mg"
          expandedUncertainty={value.expandedU}
          coverageFactor={value.k}
        />
        .
      </p>
      {touches && <p>What this will touch: {touches}</p>}
      <form id="correct" noValidate onSubmit={(event) => void submit(event)} className="flex flex-col gap-3">
        <div className="grid grid-cols-1 gap-3 sm:grid-cols-2">
          <Controller
            control={form.control}
            name="deviation"
            render={({ field: { value: held, onChange, onBlur, ref } }) => (
              <DecimalField
                label="Deviation from nominal"
                unit="mg"
                {...{ onChange, onBlur, ref }}
                value={held}
                error={errorAt(errors, 'deviation')}
              />
            )}
          />
          {value.expandedU !== null && (
            <Controller
              control={form.control}
              name="expandedU"
              render={({ field: { value: held, onChange, onBlur, ref } }) => (
                <DecimalField
                  label={`U, k = ${value.k}`}
                  unit="mg"
                  {...{ onChange, onBlur, ref }}
                  value={held}
                  error={errorAt(errors, 'expandedU')}
                />
              )}
            />
          )}
        </div>
        <Textarea
          label="What is corrected, and why"
          hint="Those who lean on it will read this"
          maxLength={300}
          error={errorAt(errors, 'reason')}
          {...form.register('reason')}
        />
        <div className="grid grid-cols-1 gap-3 sm:grid-cols-2">
          <DateField label="Issued on" error={errorAt(errors, 'issuedOn')} {...form.register('issuedOn')} />
          <DateField
            label="Takes its place from"
            error={errorAt(errors, 'effectiveOn')}
            {...form.register('effectiveOn')}
          />
        </div>
        <TextField
          label="Your password again: it is your signature"
          type="password"
          autoComplete="current-password"
          error={errorAt(errors, 'password')}
          {...form.register('password')}
        />
      </form>
      {correct.error && !isShownAtFields && <ErrorNotice error={correct.error} />}
    </Dialog>
  );
}

function inMilligrams(grams: string): string {
  return decimalText(new Decimal(grams).times(MILLIGRAMS));
}

function inGrams(milligrams: string): string {
  return decimalText(new Decimal(milligrams).div(MILLIGRAMS));
}
