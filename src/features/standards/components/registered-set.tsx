import { Toolbar } from '#src/components/layout/columns.tsx';
import { LinkButton } from '#src/components/ui/button.tsx';
import { Notice } from '#src/components/ui/notice.tsx';

interface RegisteredSetProps {
  registryNo: string;
  /** A new draft with a line for each weight of the set. */
  draftHref: string;
  /** The weights of the set in the list. */
  listHref: string;
}

/** A set that has just come into the register, and the two ways on from here. */
export function RegisteredSet({ registryNo, draftHref, listHref }: RegisteredSetProps) {
  return (
    <>
      <Notice tone="sound" role="status" title={`Set ${registryNo} is in the register`}>
        Its weights have no value yet; their certificate gives it to them.
      </Notice>
      <Toolbar>
        <LinkButton weight="primary" to={draftHref}>
          Record its certificate
        </LinkButton>
        <LinkButton to={listHref}>Open the list</LinkButton>
      </Toolbar>
    </>
  );
}
