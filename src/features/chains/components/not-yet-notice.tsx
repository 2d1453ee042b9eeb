import type { ChainResponse } from '#shared/contracts/chains.ts';
import { LinkButton } from '#src/components/ui/button.tsx';
import { Notice } from '#src/components/ui/notice.tsx';
import { notYet } from '../not-yet.ts';

interface NotYetNoticeProps {
  chain: ChainResponse;
  /** The address of another chain on the same days. */
  hrefOf: (valueUid: string) => string;
}

/** Said above the chain where the day asked about lies before its value; names what stood then. */
export function NotYetNotice({ chain, hrefOf }: NotYetNoticeProps) {
  const before = notYet(chain);
  if (!before) return null;
  const stood = chain.inForceInstead;
  return (
    <Notice
      role="status"
      tone="caution"
      title={
        before.what === 'in force'
          ? `On ${before.day} this value was not yet in force.`
          : `On ${before.day} this value was not yet recorded.`
      }
    >
      {stood ? (
        <>
          Certificate <span className="font-mono text-sm">{stood.certificateNo}</span> was:{' '}
          <LinkButton weight="text" to={hrefOf(stood.uid)}>
            open its chain
          </LinkButton>
        </>
      ) : (
        'What is drawn below came later.'
      )}
    </Notice>
  );
}

/** Said above the chain of a certificate whose place was taken: the chain below is still that of the old one. */
export function SucceededNotice({ chain, hrefOf }: NotYetNoticeProps) {
  const next = chain.succeededBy;
  if (!next) return null;
  return (
    <Notice role="status" title="This certificate was superseded.">
      <span className="font-mono text-sm">
        {next.certificateNo}
        {next.revisionN > 1 && `, revision ${next.revisionN}`}
      </span>{' '}
      stands in its place:{' '}
      <LinkButton weight="text" to={hrefOf(next.uid)}>
        open its chain
      </LinkButton>
    </Notice>
  );
}
