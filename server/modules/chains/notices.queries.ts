import type { Sequelize } from 'sequelize';
import { decimalText } from '#shared/decimal.ts';
import { groupBy } from '#shared/group-by.ts';
import type { Notice, NoticeTermFacts } from '#shared/notices/notice.ts';
import { readRow, readRows } from '#server/db/read.ts';

const NOTICES = `
  SELECT n.id, n.number, n.title, n.issuer_id AS issuerId, f.name AS fromScale, t.name AS toScale,
    n.effective_on AS effectiveOn, n.made_known_on AS madeKnownOn,
    DATE_FORMAT(n.recorded_at, '%Y-%m-%dT%H:%i:%s.%fZ') AS recordedAt, n.replaces_id AS replacesId
  FROM notice n
  JOIN scale_version f ON f.id = n.from_scale_id
  LEFT JOIN scale_version t ON t.id = n.to_scale_id
  ORDER BY n.act_seq`;

const TERMS = `
  SELECT notice_id AS noticeId, n, quantity, performed_from AS performedFrom, performed_to AS performedTo,
    nominal_from AS nominalFrom, nominal_to AS nominalTo, added_u AS addedU
  FROM notice_term ORDER BY notice_id, n`;

const SHIFTS = `
  SELECT notice_id AS noticeId, n, performed_on AS \`on\`, shift FROM notice_shift ORDER BY notice_id, n, performed_on`;

type TermRow = Omit<NoticeTermFacts, 'shifts'> & { noticeId: string; n: number };
interface ShiftRow {
  noticeId: string;
  n: number;
  on: string;
  shift: string;
}

/** Every notice recorded, with its terms. There are few: a country publishes one in some years. */
export async function recordedNotices(database: Sequelize): Promise<Notice[]> {
  const notices = await readRows<Omit<Notice, 'terms'>>(database, NOTICES);
  if (notices.length === 0) return [];
  const [terms, shifts] = await Promise.all([
    readRows<TermRow>(database, TERMS),
    readRows<ShiftRow>(database, SHIFTS),
  ]);
  const termsOf = groupBy(terms, (term) => term.noticeId);
  const shiftsOf = groupBy(shifts, (point) => `${point.noticeId} ${point.n}`);
  return notices.map((notice) => ({
    ...notice,
    terms: (termsOf.get(notice.id) ?? []).map(({ noticeId, n, nominalFrom, nominalTo, ...term }) => ({
      ...term,
      nominalFrom: nominalFrom && decimalText(nominalFrom),
      nominalTo: nominalTo && decimalText(nominalTo),
      shifts: (shiftsOf.get(`${noticeId} ${n}`) ?? []).map(({ on, shift }) => ({
        on,
        shift: decimalText(shift),
      })),
    })),
  }));
}

/** Whether an act after `seq` published a notice. */
export async function isNoticeSince(database: Sequelize, seq: number): Promise<boolean> {
  return (
    (await readRow(database, 'SELECT 1 AS yes FROM notice WHERE act_seq > :seq LIMIT 1', { seq })) !== null
  );
}
