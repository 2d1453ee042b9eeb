import { useSearchParams } from 'react-router';
import { UnreadAddress } from '#src/components/ui/unread-address.tsx';
import { WhatIfScreen } from '#src/features/downstream/components/what-if-screen.tsx';
import {
  readWhatIfSearch,
  withWhatIfChange,
  type WhatIfSearch,
} from '#src/features/downstream/what-if-search.ts';
import { unreadIn } from '#src/lib/unread-address.ts';
import { ACT_DIALOGS } from './act-dialogs.tsx';

/** A dry run of several changes; the whole question stands in the address. */
export function Component() {
  const [parameters, setParameters] = useSearchParams();
  const search = readWhatIfSearch(parameters);
  const change = (next: Partial<WhatIfSearch>) =>
    setParameters(withWhatIfChange(search, next), {
      replace: !('changes' in next),
      preventScrollReset: true,
    });
  return (
    <>
      <UnreadAddress unread={unreadIn(parameters, { ...search })} />
      <WhatIfScreen search={search} onChange={change} dialogs={ACT_DIALOGS} />
    </>
  );
}
