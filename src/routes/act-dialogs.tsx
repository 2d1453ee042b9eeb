import { lazy, Suspense } from 'react';
import type { ActDialogs } from '#src/features/downstream/components/real-acts.tsx';

/** The dialogs and the form library behind them are fetched when an act is asked for. */
const WithdrawDialog = lazy(() =>
  import('#src/features/calibrations/components/withdraw-dialog.tsx').then((module) => ({
    default: module.WithdrawDialog,
  })),
);
const CorrectDialog = lazy(() =>
  import('#src/features/calibrations/components/correct-dialog.tsx').then((module) => ({
    default: module.CorrectDialog,
  })),
);

/** The dialogs of the calibrations in which a dry run becomes an act. */
export const ACT_DIALOGS: ActDialogs = {
  withdraw: ({ revisionId, certificateNo, issuer, values, ...rest }) => (
    <Suspense fallback={null}>
      <WithdrawDialog calibration={{ revisionId, certificateNo, issuer }} weights={values} {...rest} />
    </Suspense>
  ),
  correct: (props) => (
    <Suspense fallback={null}>
      <CorrectDialog {...props} />
    </Suspense>
  ),
};
