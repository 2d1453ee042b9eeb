import { Link } from 'react-router';
import type { ChainResponse } from '#shared/contracts/chains.ts';
import { paths } from '#src/app/paths.ts';
import type { ValueNode } from './selection-sheet.tsx';

interface ChainHeadProps {
  chain: ChainResponse;
  focus: ValueNode;
  /** The address of another value's chain, on the same days. */
  hrefOf: (valueUid: string) => string;
}

const LINK = 'underline decoration-rule underline-offset-3 hover:decoration-ink';

/** Under the title of a chain: whose the weight is, which certificate, how it stands, and what is newer. */
export function ChainHead({ chain: { newerInForce }, focus, hrefOf }: ChainHeadProps) {
  const { holder, issuer, certificateNo, revisionId, state, stateSince } = focus;
  return (
    <>
      {focus.view === 'full' && (
        <>
          <Link to={paths.standard.href(focus.standardId)} className={LINK}>
            The weight
          </Link>{' '}
          ·{' '}
        </>
      )}
      {holder?.name ?? issuer.name} · certificate{' '}
      {revisionId === null ? (
        certificateNo
      ) : (
        <Link to={paths.calibration.href(revisionId)} className={LINK}>
          {certificateNo}
        </Link>
      )}{' '}
      · {state}
      {stateSince && ` since ${stateSince}`}
      {newerInForce && (
        <>
          ; newer:{' '}
          <Link to={hrefOf(newerInForce.uid)} className={LINK}>
            {newerInForce.certificateNo}
          </Link>
        </>
      )}
    </>
  );
}
