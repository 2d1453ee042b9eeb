import type { ChainResponse } from '#shared/contracts/chains.ts';
import { Button } from '#src/components/ui/button.tsx';
import { Notice } from '#src/components/ui/notice.tsx';

interface OtherRulesProps {
  /** The rule set that the address names. */
  asked: string | undefined;
  chain: ChainResponse;
  onDrop: () => void;
}

/** Said where a link names another rule set than the one that runs: the answer may differ from the sender's. */
export function OtherRules({ asked, chain, onDrop }: OtherRulesProps) {
  const { ruleSet } = chain.question;
  if (asked === undefined || asked === ruleSet) return null;
  return (
    <Notice
      role="status"
      tone="caution"
      title={`The link was made under rule set ${asked}.`}
      answers={
        <Button weight="text" onClick={onDrop}>
          Ask by the present rules
        </Button>
      }
    >
      The answer below is by the present one, {ruleSet}: its checks may differ from those that the sender saw.
    </Notice>
  );
}
