import { Link } from 'react-router';
import type { ChainResponse } from '#shared/contracts/chains.ts';
import { mendingOf } from '#shared/rules/mending.ts';
import { mendingLink } from '#src/lib/mending-link.ts';
import { usePerson } from '#src/lib/session.ts';
import { writesFor } from '#src/lib/writes-for.ts';

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
    isOurs: writesFor(person, value.issuer.id),
    standardId: openStandard(value),
    revisionId: value.revisionId,
    reference: reference
      ? {
          standardId: openStandard(reference),
          registryNo: reference.registryNo,
          revisionId: reference.revisionId,
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

function openStandard({ view, standardId }: ValueNode): string | null {
  return view === 'full' ? standardId : null;
}
