import type { LifeEvent } from '#shared/contracts/chain-life.ts';
import { addMonths, dateText, performed } from '#shared/rules/days.ts';
import { rowInForce } from '#shared/rules/in-force.ts';
import { certificateText } from '#shared/rules/numbers.ts';
import { today, type Context } from '#server/http/context.ts';
import type { ChainStore, Closure } from './chain-store.ts';
import { entriesOf } from './noticed-closure.ts';
import type { LaboratoryDossier, StandardDossier, StoredHistoryValue, StoredValue } from './stored.ts';

/** An event with what decides who may know of it. */
export interface RecordedEvent extends Omit<LifeEvent, 'isImported'> {
  /** The value whose reader may know it; null: published. */
  about: StoredValue | null;
  /** Who may know it: whoever is shown a statement of the value, who reads it in full, or who sees the weight's history. */
  toldTo: 'all' | 'readers' | 'holder';
}

export interface Life {
  focus: StoredValue;
  today: string;
  events: RecordedEvent[];
}

interface Parts {
  closure: Closure;
  focus: StoredValue;
  standards: Map<string, StandardDossier>;
  laboratories: Map<string, LaboratoryDossier>;
  today: string;
}

/** What befell a weight and what its value rests on, with the days on which a question makes a difference. */
export async function lifeOf(context: Context, store: ChainStore, focusId: number): Promise<Life> {
  await store.catchUp();
  const closure = await store.closure([focusId]);
  const focus = closure.values.find((value) => value.id === focusId)!;
  const [standards, laboratories] = await Promise.all([
    store.standards(closure.values.map((value) => value.standardId)),
    store.laboratories([focus.issuerId, focus.holderId]),
  ]);
  const parts = { closure, focus, standards, laboratories, today: today(context) };
  const events = [
    ...ofTheWeight(parts),
    ...closure.values.flatMap((value) => (value.id === focusId ? [] : ofReference(value, parts))),
    ...dueDays(parts),
    ...ofTheScale(parts, store),
  ];
  return { focus, today: parts.today, events };
}

/** Every value of the weight in the focus's kind, and its epochs after the first. */
function ofTheWeight({ focus, standards }: Parts): RecordedEvent[] {
  const dossier = standards.get(focus.standardId)!;
  const own = dossier.history.filter((row) => row.quantity === focus.quantity);
  const base = { of: 'weight', about: focus, registryNo: focus.registryNo } as const;
  const calibrated = {
    ...base,
    kind: 'calibrated' as const,
    valueUid: focus.uid,
    what: certificateText(focus),
    inForceFrom: focus.performedEnd,
    madeKnownOn: focus.issuedOn,
    recordedOn: dayOf(focus.recordedAt),
    toldTo: 'all' as const,
  };
  const epochs = dossier.epochs
    .filter((epoch) => epoch.n > 1)
    .map((epoch) => ({
      ...base,
      kind: 'epoch' as const,
      valueUid: null,
      what: epoch.reason,
      inForceFrom: epoch.beginsOn,
      madeKnownOn: dayOf(epoch.recordedAt),
      recordedOn: dayOf(epoch.recordedAt),
      toldTo: 'holder' as const,
    }));
  const values = own.flatMap((row) => {
    const toldTo = row.id === focus.id ? ('all' as const) : ('holder' as const);
    // A later revision is told by the end of the one it replaced.
    const issued = row.revisionN > 1 ? [] : [issuedEvent(row)];
    return [...issued, ...endEvents(row)].map((event) => ({ ...base, ...event, toldTo }));
  });
  return [calibrated, ...epochs, ...values];
}

/** Ends of a reference and of what took its place; its issue where that was recorded long after. */
function ofReference(value: StoredValue, { standards }: Parts): RecordedEvent[] {
  const { history } = standards.get(value.standardId)!;
  const base = { of: 'chain', about: value, registryNo: value.registryNo, toldTo: 'all' } as const;
  const inTurn = [value.id];
  for (const id of inTurn) {
    const ends = history.find((row) => row.id === id)?.ends ?? [];
    for (const { replacedById } of ends)
      if (replacedById !== null && !inTurn.includes(replacedById)) inTurn.push(replacedById);
  }
  const rows = inTurn.flatMap((id) => history.find((row) => row.id === id) ?? []);
  const issued = issuedEvent(rows[0]!);
  return [...(isImported(issued) ? [issued] : []), ...rows.flatMap(endEvents)].map((event) => ({
    ...base,
    ...event,
  }));
}

type Dated = Pick<LifeEvent, 'kind' | 'valueUid' | 'what' | 'inForceFrom' | 'madeKnownOn' | 'recordedOn'>;

function issuedEvent(row: StoredHistoryValue): Dated {
  return {
    kind: 'issued',
    valueUid: row.uid,
    what: certificateText(row),
    inForceFrom: row.issuedOn,
    madeKnownOn: row.issuedOn,
    recordedOn: dayOf(row.recordedAt),
  };
}

/** A supersession by words alone changes nothing that a chain carries: it is called a re-issue. */
function endEvents(row: StoredHistoryValue): Dated[] {
  return row.ends.map((end) => ({
    kind: end.kind === 'superseded' && end.changed === 'text' ? 're-issued' : end.kind,
    valueUid: row.uid,
    what: certificateText(row),
    inForceFrom: end.effectiveOn,
    madeKnownOn: end.madeKnownOn,
    recordedOn: dayOf(end.recordedAt),
  }));
}

/** When the programmes of whoever uses them ended, for the weight itself and for what was weighed against. */
function dueDays(parts: Parts): RecordedEvent[] {
  const { closure, focus, standards, laboratories } = parts;
  const byId = new Map(closure.values.map((value) => [value.id, value]));
  const references = focus.parents
    .filter((link) => link.role === 'reference')
    .map((link) => ({ value: byId.get(link.parentId)!, userId: focus.issuerId, of: 'chain' as const }));
  return [{ value: focus, userId: focus.holderId, of: 'weight' as const }, ...references].flatMap(
    ({ value, userId, of }) => {
      const rows = standards.get(value.standardId)!.programmes.filter((row) => row.laboratoryId === userId);
      const programme = rowInForce(rows, parts.today, parts.today);
      if (!programme) return [];
      const due = addMonths(performed(value), programme.intervalMonths).last;
      const known = [value.recordedAt, programme.recordedAt].sort().at(-1)!;
      if (due >= parts.today) return [];
      return {
        kind: 'due' as const,
        of,
        about: focus,
        toldTo: of === 'weight' ? ('holder' as const) : ('readers' as const),
        valueUid: value.uid,
        registryNo: value.registryNo,
        what: `${laboratories.get(userId)!.name}, ${dateText(due, value.datePrecision)}`,
        inForceFrom: due,
        madeKnownOn: dayOf(known),
        recordedOn: dayOf(known),
      };
    },
  );
}

/** Notices that enter the chain on any day: they are published, and everybody may know them. */
function ofTheScale({ closure }: Parts, store: ChainStore): RecordedEvent[] {
  const known = store.notices.filter((notice) => entriesOf(closure, [notice]).size > 0);
  return known.map((notice) => ({
    kind: 'notice',
    of: 'chain',
    about: null,
    toldTo: 'all',
    valueUid: null,
    registryNo: null,
    what: `${notice.number}, ${notice.title}`,
    inForceFrom: notice.effectiveOn,
    madeKnownOn: notice.madeKnownOn,
    recordedOn: dayOf(notice.recordedAt),
  }));
}

const MILLISECONDS_PER_DAY = 86_400_000;
/** Entered later than this after it was made known, a fact is imported history. Common practice, no source. */
const DAYS_TO_ENTER = 30;

/** Whether the register learnt of a fact long after it was made known. */
export function isImported({
  madeKnownOn,
  recordedOn,
}: Pick<LifeEvent, 'madeKnownOn' | 'recordedOn'>): boolean {
  return Date.parse(recordedOn) - Date.parse(madeKnownOn) > DAYS_TO_ENTER * MILLISECONDS_PER_DAY;
}

function dayOf(instant: string): string {
  return instant.slice(0, 10);
}
