import { unreadSentence, type Unread } from '#src/lib/unread-address.ts';
import { Notice } from './notice.tsx';

/** Says what could not be read from the address: what is shown is then another question than the link's. */
export function UnreadAddress({ unread }: { unread: readonly Unread[] }) {
  if (unread.length === 0) return null;
  return (
    <div className="px-4 pt-4 rail:px-7">
      <Notice role="status" tone="caution" title="The address could not be read in full">
        {unread.map((each) => (
          <p key={each.name} className="wrap-anywhere">
            {unreadSentence(each)}
          </p>
        ))}
      </Notice>
    </div>
  );
}
