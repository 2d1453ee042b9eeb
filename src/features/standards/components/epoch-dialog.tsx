import { OpenEpochBody, type StandardResponse } from '#shared/contracts/standards.ts';
import { Button } from '#src/components/ui/button.tsx';
import { Dialog } from '#src/components/ui/dialog.tsx';
import { ErrorNotice } from '#src/components/ui/error-notice.tsx';
import { SelectField } from '#src/components/ui/select-field.tsx';
import { DateField, Textarea } from '#src/components/ui/text-field.tsx';
import { errorAt, showFieldProblems, useZodForm } from '#src/lib/form.ts';
import { useOpenEpoch } from '../api.ts';
import { emptyAsNull } from '../entries.ts';

const REASONS = OpenEpochBody.shape.reason.options.map((value) => ({ value, label: value }));

/** Asks what happened to the weight, and when; the history is broken there from then on. */
export function EpochDialog({ sheet, onClose }: { sheet: StandardResponse; onClose: () => void }) {
  const { standard } = sheet;
  const openEpoch = useOpenEpoch(standard.id);
  const form = useZodForm(OpenEpochBody, {
    defaultValues: { reason: 'adjusted', beginsOn: '', lastGoodOn: null, note: null },
  });
  const { errors } = form.formState;
  const submit = form.handleSubmit((body) =>
    openEpoch.mutateAsync(body).then(onClose, (error: unknown) => {
      showFieldProblems(error, form);
    }),
  );
  return (
    <Dialog
      title={`Open epoch ${sheet.epochs.length + 1} of ${standard.registryNo}`}
      onClose={onClose}
      actions={
        <>
          <Button weight="primary" type="submit" form="open-epoch" isBusy={openEpoch.isPending}>
            Open the epoch
          </Button>
          <Button onClick={onClose}>Leave it as it is</Button>
        </>
      }
    >
      <form
        id="open-epoch"
        noValidate
        onSubmit={(event) => void submit(event)}
        className="flex flex-col gap-4"
      >
        <p className="text-ink-2">
          After an intervention the weight is another weight: its history breaks, and no drift is drawn or
          predicted across the day. Values already issued stay as they are. This cannot be taken back.
        </p>
        <div className="grid grid-cols-1 gap-x-4 items-start gap-y-4 min-[30rem]:grid-cols-3">
          <SelectField
            label="What happened"
            choices={REASONS}
            error={errorAt(errors, 'reason')}
            {...form.register('reason')}
          />
          <DateField
            label="On"
            className="w-full"
            error={errorAt(errors, 'beginsOn')}
            {...form.register('beginsOn')}
          />
          <DateField
            label="Last good"
            isOptional
            className="w-full"
            error={errorAt(errors, 'lastGoodOn')}
            {...form.register('lastGoodOn', { setValueAs: emptyAsNull })}
          />
        </div>
        <Textarea
          label="Note"
          isOptional
          maxLength={300}
          hint="Who did it, why, and where it is recorded."
          error={errorAt(errors, 'note')}
          {...form.register('note', { setValueAs: emptyAsNull })}
        />
        {openEpoch.error && <ErrorNotice error={openEpoch.error} hidesFields />}
      </form>
    </Dialog>
  );
}
