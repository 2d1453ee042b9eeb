import { QueryTypes } from 'sequelize';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { CatalogueEntry, LineOfCertificate } from '#seeders/demo/catalogue.ts';
import { makePlan } from '#seeders/demo/make-plan.ts';
import { seedDemoNetwork } from '#seeders/demo/seed.ts';
import { makeContext } from '#server/http/context.ts';
import { chainOf, storeOf } from '#server/modules/chains/index.ts';
import { ownDatabase, type OwnDatabase } from '#tests/support/own-database.ts';
import { ancestryOf, simulatedU, uWithoutCorrelation } from '#tests/support/simulated-uncertainty.ts';

/** The day all chains are asked about. */
const DAY = '2026-12-01';

const { catalogue } = makePlan();
const faults = catalogue.filter((entry) => entry.is === 'fault');
const lookAlikes = catalogue.filter((entry) => entry.is === 'look-alike');

let own: OwnDatabase;
/** Every check that failed anywhere, as `<rule> <verdict> <subject>`. */
const failed = new Set<string>();
/** Every check that was made. */
const made = new Set<string>();
const tiers = new Map<number, number>();
/** Relative gaps of conservation, chain by chain, for 200 of them. */
const leaks: { certificate: string; gap: number }[] = [];
/** Chains that a notice in force reaches. */
let noticed = 0;
/** U printed against k times u as certified, in half last digits. */
const misprints: { certificate: string; digits: number }[] = [];

beforeAll(async () => {
  own = await ownDatabase();
  await seedDemoNetwork(own.database, () => {});
  await judgeEverything();
}, 600_000);

afterAll(() => own.drop(), 60_000);

async function query<Row extends object>(sql: string): Promise<Row[]> {
  return own.database.query<Row>(sql, { type: QueryTypes.SELECT });
}

const place = ({ certificateNo, line, revision }: LineOfCertificate) =>
  `${certificateNo}/${line} r${revision}`;

/** The subject as the checks name it: a link, a value, or a chain by its focus. */
function subjectOf(entry: CatalogueEntry): string {
  if (entry.reference) return `${place(entry)} <- ${place(entry.reference)}`;
  return entry.rule === 'B-43' ? `chain of ${place(entry)}` : place(entry);
}

async function judgeEverything(): Promise<void> {
  const clock = { now: () => new Date(`${DAY}T12:00:00Z`) };
  const context = makeContext({ database: own.database, clock });
  const store = storeOf(own.database);
  const notices = await query<{ id: string }>('SELECT id FROM notice');
  const noticeIds = new Set(notices.map(({ id }) => id));
  const ids = await query<{ id: number }>('SELECT id FROM assigned_value ORDER BY id');
  for (const [at, { id }] of ids.entries()) {
    const chain = await chainOf(context, store, id, {});
    const names = new Map(
      chain.closure.values.map((value) => [value.uid, place({ ...value, revision: value.revisionN })]),
    );
    for (const { rule, verdict, outcome, subject } of chain.judgement.checks) {
      const name =
        subject.type === 'chain'
          ? `chain of ${names.get(chain.focus.uid)}`
          : subject.type === 'value'
            ? names.get(subject.uid)
            : `${names.get(subject.childUid)} <- ${names.get(subject.parentUid)}`;
      const key = `${rule} ${verdict} ${name}`;
      made.add(key);
      if (outcome === 'fails') failed.add(key);
    }
    // A notice stands above what it covers and is no link of the chain.
    const links = [...chain.tiers].filter(([uid]) => !noticeIds.has(uid));
    if (links.length < chain.tiers.size) noticed += 1;
    const deepest = Math.max(...links.map(([, tier]) => tier));
    tiers.set(deepest, (tiers.get(deepest) ?? 0) + 1);
    const { focus, numbers } = chain;
    const u = numbers.propagation.standardUncertainty!;
    // A certificate cannot know of the notices that came after it.
    const uCertified = Math.sqrt(numbers.varianceAsCertified(focus.uid)!);
    const [expandedU, k] = [Number(focus.expandedU), Number(focus.k)];
    // Every certificate of the network states U to two significant digits.
    const halfDigit = 0.5 * 10 ** (Math.floor(Math.log10(expandedU)) - 1);
    misprints.push({
      certificate: names.get(focus.uid)!,
      digits: Math.abs(k * uCertified - expandedU) / halfDigit,
    });
    // A step that shares no factor with the sizes of certificates: 200 chains from all over the register.
    if (at % Math.floor(ids.length / 200) === 0 && leaks.length < 200) {
      leaks.push({ certificate: names.get(focus.uid)!, gap: leakOf(numbers.propagation, focus.uid, u) });
    }
  }
}

/** Largest gap between what flows into a node and out of it, relative to the sum of |flow|. */
function leakOf(
  {
    flows,
    localFlows,
  }: { flows: { child: string; parent: string; variance: number }[]; localFlows: Record<string, number> },
  focus: string,
  u: number,
): number {
  const balance = new Map(Object.entries(localFlows));
  let total = 0;
  for (const { child, parent, variance } of flows) {
    balance.set(child, (balance.get(child) ?? 0) + variance);
    balance.set(parent, (balance.get(parent) ?? 0) - variance);
    total += Math.abs(variance);
  }
  balance.set(focus, balance.get(focus)! - u * u);
  return Math.max(...[...balance.values()].map(Math.abs)) / Math.max(total, u * u);
}

describe('the network', () => {
  it('has its laboratories, standards and values over ten years', async () => {
    const [count] = await query<Record<string, number>>(
      `SELECT (SELECT COUNT(*) FROM laboratory WHERE kind <> 'external institute') laboratories,
         (SELECT COUNT(*) FROM standard) standards, (SELECT COUNT(*) FROM assigned_value) valuesAssigned,
         (SELECT COUNT(*) FROM value_group) designs, (SELECT COUNT(*) FROM epoch WHERE n > 1) adjusted,
         (SELECT DATEDIFF(MAX(issued_on), MIN(issued_on)) FROM revision) days,
         (SELECT COUNT(*) FROM assigned_value WHERE root_kind = 'realization run') runs,
         (SELECT COUNT(*) FROM value_link WHERE role = 'informs') informing`,
    );
    expect(count!.laboratories).toBeGreaterThanOrEqual(14);
    expect(count!.standards).toBeGreaterThanOrEqual(600);
    expect(count!.valuesAssigned).toBeGreaterThanOrEqual(2500);
    expect(count!.days).toBeGreaterThan(3600);
    expect(count!.designs).toBeGreaterThanOrEqual(10);
    expect(count!.adjusted).toBeGreaterThanOrEqual(10);
    expect(count).toMatchObject({ runs: 2, informing: 2 });
  });

  it('has chains of 4 to 9 links and none deeper', () => {
    for (const depth of [4, 5, 6, 7, 8, 9]) expect(tiers.get(depth)).toBeGreaterThan(50);
    expect(Math.max(...tiers.keys())).toBe(9);
  });

  it('has two scale versions and a notice in force, and a third with the notice that leads to it', async () => {
    const rows = await query<{ number: string; from: string; to: string | null; effective: string }>(
      `SELECT n.number, f.name \`from\`, t.name \`to\`, n.effective_on effective FROM notice n
       JOIN scale_version f ON f.id = n.from_scale_id LEFT JOIN scale_version t ON t.id = n.to_scale_id
       ORDER BY n.effective_on`,
    );
    expect(rows).toEqual([
      { number: 'OI-N 1', from: 'Kilogram as realized', to: null, effective: '2026-11-16' },
      { number: 'OI-N 2', from: 'Consensus value 2021', to: 'Consensus value 2027', effective: '2027-01-01' },
    ]);
    expect(noticed).toBeGreaterThan(500);
  });

  it('assumes the density of about one weight in ten', async () => {
    const [row] = await query<{ share: number }>(
      "SELECT SUM(origin = 'assumed') / COUNT(*) share FROM property WHERE kind = 'density'",
    );
    expect(Number(row!.share)).toBeGreaterThan(0.07);
    expect(Number(row!.share)).toBeLessThan(0.15);
  });

  it('traces each prototype value to the reference that its date demands', async () => {
    const rows = await query<{ day: string; root: string; runDay: string }>(
      `SELECT v.performed_end day, p.root_kind root, p.performed_end runDay FROM value_link l
       JOIN assigned_value v ON v.id = l.child_id JOIN assigned_value p ON p.id = l.parent_id
       JOIN standard s ON s.id = v.standard_id WHERE s.kind = 'prototype' AND l.role = 'reference'`,
    );
    expect(rows.length).toBeGreaterThanOrEqual(8);
    for (const { day, root, runDay } of rows) {
      expect(root).toBe(day < '2021-03-01' ? 'realization run' : 'consensus value');
      if (day > '2019-07-01' && day < '2021-03-01') expect(runDay).toBe('2019-06-14');
    }
  });
});

describe('every fault is found from stored data', () => {
  it.each(faults.map((entry) => [`${entry.rule}, ${entry.kind}: ${subjectOf(entry)}`, entry] as const))(
    '%s',
    (_, entry) => {
      const check = `${entry.rule} ${entry.verdict} ${subjectOf(entry)}`;
      expect(failed.has(check), `${check} is reported`).toBe(true);
    },
  );

  it('leaves the conduct sound where only later facts speak against it', () => {
    const later = faults.filter((entry) => entry.rule === 'B-15' && entry.verdict === 'today');
    expect(later.length).toBeGreaterThanOrEqual(6);
    for (const entry of later) expect(failed).not.toContain(`B-15 conduct ${subjectOf(entry)}`);
  });
});

describe('nothing else is reported', () => {
  const kinds = [...new Set(lookAlikes.map((entry) => `${entry.rule}: ${entry.kind}`))];
  it.each(kinds)('%s', (kind) => {
    const alike = lookAlikes.filter((entry) => `${entry.rule}: ${entry.kind}` === kind);
    expect(alike.length).toBeGreaterThan(0);
    for (const entry of alike) {
      const check = `${entry.rule} ${entry.verdict} ${subjectOf(entry)}`;
      expect(made.has(check), `${check} was judged`).toBe(true);
      expect(failed.has(check), `${check} is reported`).toBe(false);
    }
  });

  it('there are at least ten times as many look-alikes as faults', () => {
    expect(faults.length).toBeGreaterThanOrEqual(30);
    expect(lookAlikes.length).toBeGreaterThanOrEqual(10 * faults.length);
  });

  it('no honest value, link or chain fails any rule', () => {
    const known = new Set(
      faults.flatMap((entry) =>
        [entry.rule, ...entry.alsoFoundBy].map((rule) => `${rule} ${subjectOf(entry)}`),
      ),
    );
    const falseAlarms = [...failed].filter((check) => !known.has(check.replace(/ (conduct|today) /, ' ')));
    expect(falseAlarms).toEqual([]);
  });
});

describe('its numbers', () => {
  it('recompute: each printed U is k times the u of its chain, within rounding', () => {
    const spoilt = new Set(faults.map(place));
    const honest = misprints.filter(({ certificate }) => !spoilt.has(certificate));
    expect(honest.length).toBeGreaterThan(4000);
    const wrong = honest.filter(({ digits }) => digits > 1.05);
    expect(wrong).toEqual([]);
  });

  it('conserve flow at each node of 200 chains', () => {
    expect(leaks).toHaveLength(200);
    expect(leaks.filter(({ gap }) => !(gap <= 1e-12))).toEqual([]);
  });

  it.each(['TV 0410', 'PA 0412', 'OI 0300-06'])(
    'agree with a million draws for the last value of %s, where correlation matters',
    async (registryNo) => {
      const [value] = await query<{ id: number; uid: string }>(
        `SELECT v.id, v.uid FROM assigned_value v JOIN standard s ON s.id = v.standard_id
         WHERE s.registry_no = '${registryNo}' AND v.quantity = 'conventional mass'
         ORDER BY v.performed_end DESC LIMIT 1`,
      );
      const ancestry = await ancestryOf(own.database, value!.id);
      const chain = await chainOf(makeContext({ database: own.database }), storeOf(own.database), value!.id, {
        day: DAY,
        known: DAY,
      });
      const u = chain.numbers.propagation.standardUncertainty!;
      expect(Math.abs(uWithoutCorrelation(ancestry, value!.id) / u - 1)).toBeGreaterThan(0.05);
      expect(Math.abs(simulatedU(ancestry, value!.id, 20_260_101) / u - 1)).toBeLessThan(0.005);
    },
    120_000,
  );
});
