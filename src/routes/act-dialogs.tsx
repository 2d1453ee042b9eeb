import { CorrectDialog } from '#src/features/calibrations/components/correct-dialog.tsx';
import { WithdrawDialog } from '#src/features/calibrations/components/withdraw-dialog.tsx';
import type { ActDialogs } from '#src/features/downstream/components/real-acts.tsx';

/** The dialogs of the calibrations in which a dry run becomes an act. */
export const ACT_DIALOGS: ActDialogs = {
  withdraw: ({ revisionId, certificateNo, values, ...rest }) => (
    <WithdrawDialog calibration={{ revisionId, certificateNo }} weights={values} {...rest} />
  ),
  correct: (props) => <CorrectDialog {...props} />,
};
