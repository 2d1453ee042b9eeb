import { useState, type ReactNode } from 'react';
import { SignedWithdrawBody, type CalibrationResponse } from '#shared/contracts/calibrations.ts';
import { Button } from '#src/components/ui/button.tsx';
import { Dialog } from '#src/components/ui/dialog.tsx';
import { ErrorNotice } from '#src/components/ui/error-notice.tsx';
import { DateField, Textarea, TextField } from '#src/components/ui/text-field.tsx';
import { errorAt, showFieldProblems, useZodForm } from '#src/lib/form.ts';
import { usePerson } from '#src/lib/session.ts';
import { withdrawalOf, withdrawalText } from '#src/lib/withdrawal.ts';
import { useWithdraw } from '../api.ts';

interface WithdrawDialogProps {
  calibration: Pick<CalibrationResponse['calibration'], 'revisionId' | 'certificateNo' | 'issuer'>;
  /** How many values fall with it. */
  weights: number;
  /** What a dry run counted, in a sentence. */
  touches?: ReactNode;
  onDone?: (actSeq: number) => void;
  onClose: () => void;
}

/** Says exactly what a withdrawal does, and asks for the reason, the day and the signatory's password. */
export function WithdrawDialog(props: WithdrawDialogProps) {
  const { calibration, weights, touches, onDone, onClose } = props;
  const form = useZodForm(SignedWithdrawBody, {
    defaultValues: { reason: '', password: '', effectiveOn: new Date().toISOString().slice(0, 10) },
  });
  const withdrawal = withdrawalOf(usePerson(), calibration.issuer.id);
  const withdraw = useWithdraw(calibration.revisionId);
  const [isShownAtFields, setShownAtFields] = useState(false);
  const { errors } = form.formState;
  const submit = form.handleSubmit((body) =>
    withdraw.mutate(body, {
      onSuccess: ({ actSeq }) => {
        onClose();
        onDone?.(actSeq);
      },
      onError: (error) =>
        setShownAtFields(showFieldProblems(error, form, (path) => path in form.getValues())),
    }),
  );
  return (
    <Dialog
      title={withdrawalText(withdrawal, calibration.certificateNo)}
      onClose={onClose}
      actions={
        <>
          <Button weight="destructive" type="submit" form="withdraw" isBusy={withdraw.isPending}>
            Withdraw {weights === 1 ? 'its value' : `all ${weights} values`}
          </Button>
          <Button onClick={onClose}>Let it stand</Button>
        </>
      }
    >
      {withdrawal === 'entry' && (
        <p>
          This takes back what your laboratory entered, and says so. The certificate itself is{' '}
          {calibration.issuer.name}’s to withdraw.
        </p>
      )}
      <p className="text-ink-2">
        From the day given, {weights === 1 ? 'its value is' : `all ${weights} of its values are`} no longer in
        force, and every chain that leans on {weights === 1 ? 'it' : 'them'} shows the break. The certificate
        stays readable with your reason, and what it said before that day stays on record. This cannot be
        undone; a new calibration takes its place.
      </p>
      {touches && <p>What this will touch: {touches}</p>}
      <form id="withdraw" noValidate onSubmit={(event) => void submit(event)} className="flex flex-col gap-3">
        <Textarea
          label="Reason"
          hint="Those who lean on it will read this"
          maxLength={300}
          error={errorAt(errors, 'reason')}
          {...form.register('reason')}
        />
        <DateField
          label="No longer in force from"
          error={errorAt(errors, 'effectiveOn')}
          {...form.register('effectiveOn')}
        />
        <TextField
          label="Your password again: it is your signature"
          type="password"
          autoComplete="current-password"
          error={errorAt(errors, 'password')}
          {...form.register('password')}
        />
      </form>
      {withdraw.error && !isShownAtFields && <ErrorNotice error={withdraw.error} />}
    </Dialog>
  );
}
