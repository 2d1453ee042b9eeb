import { Link } from 'react-router';
import type { ChainResponse } from '#shared/contracts/chains.ts';
import { mendingOf } from '#shared/rules/mending.ts';
import { mendingLink } from '#src/lib/mending-link.ts';
import { usePerson, type Person } from '#src/lib/session.ts';
import { entersResultsFor, opensHoldingsOf } from '#src/lib/holdings.ts';

type Node = ChainResponse['nodes'][number];
type ValueNode = Extract<Node, { type: 'value' }>;

interface MendProps {
  chain: ChainResponse;
  check: ChainResponse['checks'][number];
}

/** What would mend a check that does not hold: the next step, and the way to where it is taken. */
export function Mend({ chain, check }: MendProps) {
  const person = usePerson();
  const mending = mendingOf(check);
  const { subject } = check;
  if (!mending || subject.type === 'chain') return null;
  const value = valueOf(chain, subject.type === 'link' ? subject.childUid : subject.uid);
  if (!value) return null;
  const reference = subject.type === 'link' ? valueOf(chain, subject.parentUid) : undefined;
  const link = mendingLink(mending, {
    laboratory: value.issuer,
    entersFor: entersResultsFor(person, value.holder?.id),
    standardId: openStandard(person, value),
    revisionId: value.revisionId,
    reference: reference
      ? {
          standardId: openStandard(person, reference),
          registryNo: reference.registryNo,
          revisionId: reference.revisionId,
          entersFor: entersResultsFor(person, reference.holder?.id),
        }
      : null,
  });
  return (
    <p className="text-sm text-ink-2">
      {mending.step}{' '}
      {link && (
        <Link to={link.href} className="text-ink underline underline-offset-3">
          {link.label}
        </Link>
      )}
    </p>
  );
}

function valueOf(chain: ChainResponse, uid: string): ValueNode | undefined {
  return chain.nodes.find((node): node is ValueNode => node.type === 'value' && node.uid === uid);
}

/** Who issued a certificate reads its value in full, and yet may not open the weight of another laboratory. */
function openStandard(person: Person, { holder, standardId }: ValueNode): string | null {
  return holder && opensHoldingsOf(person, holder.id) ? standardId : null;
}
