import type { ChainResponse } from '#shared/contracts/chains.ts';
import type { Change, Wording } from './change.ts';
import { massText, shiftText, uText } from './numbers-in-words.ts';
import type { Pairs } from './pairs.ts';

/** What changed of the weight's own result: its U over the chain, and how far it has moved as now known. */
export function changedResult({ before, after }: Pairs, wording: Wording): Change[] {
  const about = { group: 'The weight itself' as const, at: after.focusUid };
  const changes: Change[] = [];
  const [was, is] = [uOf(before, wording), uOf(after, wording)];
  if (was !== is) {
    const why = (after.uncertainty.missing.length > 0 ? after : before).uncertainty.missing.map(
      ({ because }) => `Not computable, because ${because}.`,
    );
    const weight = before.uncertainty.standard === null || after.uncertainty.standard === null ? 4 : 2;
    changes.push({ ...about, says: `U over the chain: ${is}, was ${was}.`, why, mark: 'U changed', weight });
  }
  const [stood, stands] = [movedText(before, wording), movedText(after, wording)];
  if (stood !== stands && !(staysPut(before) && staysPut(after))) {
    const says = `As now known: ${stands}; before: ${stood}.`;
    changes.push({ ...about, says, why: [], mark: 'moved', weight: 3 });
  }
  return changes;
}

function uOf({ uncertainty: { expanded } }: ChainResponse, wording: Wording): string {
  return expanded === null ? 'not computable' : uText(expanded, wording);
}

/** Whether the value is where it was certified: what changed above it, if anything, brings it nothing. */
function staysPut({ asNowKnown }: ChainResponse): boolean {
  return asNowKnown === null || (asNowKnown.shift !== null && Number(asNowKnown.shift) === 0);
}

function movedText(chain: ChainResponse, wording: Wording): string {
  const now = chain.asNowKnown;
  if (!now) return 'as certified';
  if (now.shift === null) return `not computable, because ${now.because}`;
  if (Number(now.shift) === 0) return 'not shifted';
  const focus = chain.nodes.find((node) => node.uid === chain.focusUid);
  const k = focus?.type === 'value' ? focus.k : null;
  const deviation = now.deviation ?? '0';
  return `${massText({ deviation, expandedU: now.expandedU, k }, wording)}, shifted by ${shiftText(now.shift, wording)}`;
}
