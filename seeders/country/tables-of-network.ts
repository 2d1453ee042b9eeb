import { canonicalJson } from '#shared/canonical-json.ts';
import { sha256 } from '#server/db/act.ts';
import type { Country } from './country.ts';
import { actOf, dayOf, dayText, FIRST_DAY, instantOf, instantText, LAST_DAY } from './days.ts';
import { FIGURES } from './grades.ts';
import { identifier } from './identifiers.ts';
import { emailOf, type CountryLaboratory } from './laboratories.ts';
import { PIECES } from './pieces.ts';
import { line, NULL, type CountryTable } from './table.ts';

/** When the network was admitted: everything of it belongs to act 1. */
export const NETWORK_DAY = dayOf('2003-12-01');
const SINCE = dayText(NETWORK_DAY);
const RECORDED = [instantText(NETWORK_DAY), 1] as const;
const ROLES = ['metrologist', 'signatory', 'reader'] as const;
/** Accounts of a laboratory, one for each role. */
const PEOPLE = ROLES.length;

/** Identifier of a laboratory. */
export function laboratoryId(country: Country, index: number): string {
  return identifier(country.seed, 'laboratory', index, NETWORK_DAY);
}

/** Identifier of the account that signs for a laboratory. */
export function signatoryId(country: Country, laboratory: number): string {
  return accountId(country, laboratory * PEOPLE + ROLES.indexOf('signatory'));
}

/** Identifier of the country's one version of the scale. */
export function scaleVersionId(country: Country): string {
  return identifier(country.seed, 'scale version', 0, NETWORK_DAY);
}

function accountId(country: Country, index: number): string {
  return identifier(country.seed, 'account', index, NETWORK_DAY);
}

/** The network's own people: they stand after the laboratories'. */
const NETWORK_PEOPLE = [
  { email: 'registrar@network.example', name: 'Registrar of the network', role: 'registrar' },
  { email: 'assessor@network.example', name: 'Assessor of the network', role: 'assessor' },
] as const;

interface Person {
  email: string;
  name: string;
  role: string;
  laboratory: number | null;
}

function peopleOf(country: Country): Person[] {
  const staff = country.laboratories.flatMap((laboratory) =>
    ROLES.map((role) => ({
      email: emailOf(role, laboratory),
      name: `${role} of ${laboratory.code}`,
      role,
      laboratory: laboratory.index,
    })),
  );
  return [
    ...staff,
    ...NETWORK_PEOPLE.map((person) => ({ ...person, laboratory: person.role === 'assessor' ? 1 : null })),
  ];
}

/** The step that a laboratory's calibrations for others deliver at best; null where it has no scope. */
function bestStep({ tier, isAccredited }: CountryLaboratory): number | null {
  if (!isAccredited) return tier === 'institute' ? 5 : null;
  return tier === 'first' ? 7 : tier === 'second' ? 9 : 11;
}

/** Ranges of nominals in grams with the places of their pieces. */
const RANGES = [
  '0.001 0.005',
  '0.01 0.05',
  '0.1 0.5',
  '1 5',
  '10 50',
  '100 500',
  '1000 5000',
  '10000 20000',
].map((text) => {
  const [from, to] = text.split(' ').map(Number) as [number, number];
  const places = PIECES.flatMap(({ nominal }, at) =>
    Number(nominal) >= from && Number(nominal) <= to ? [at] : [],
  );
  return { from, to, places };
});

/**
 * Tables of the network: acts, laboratories, people, recognitions, scopes.
 * @param passwordHash of the one password of every account
 */
export function networkTables(passwordHash: string): CountryTable[] {
  return [
    {
      table: 'act',
      columns: columns(
        'seq recorded_at kind account_id laboratory_id subject_type subject_id content content_sha256 chain_sha256',
      ),
      rows: actRows,
    },
    {
      table: 'laboratory',
      columns: columns('id code name kind country place recorded_at act_seq'),
      *rows(country) {
        for (const { index, code, name, tier, place } of country.laboratories) {
          const kind = tier === 'institute' ? 'national institute' : 'calibration laboratory';
          yield line(laboratoryId(country, index), code, name, kind, 'XA', place, ...RECORDED);
        }
      },
    },
    {
      table: 'account',
      columns: columns('id email name recorded_at act_seq'),
      *rows(country) {
        for (const [n, { email, name }] of peopleOf(country).entries()) {
          yield line(accountId(country, n), email, name, ...RECORDED);
        }
      },
    },
    {
      table: 'account_password',
      columns: columns('account_id recorded_at act_seq argon2id'),
      *rows(country) {
        for (const n of peopleOf(country).keys())
          yield line(accountId(country, n), ...RECORDED, passwordHash);
      },
    },
    {
      table: 'membership',
      columns: columns('id account_id laboratory_id role state valid_from valid_to recorded_at act_seq'),
      *rows(country) {
        for (const [n, { role, laboratory }] of peopleOf(country).entries()) {
          const id = identifier(country.seed, 'membership', n, NETWORK_DAY);
          const place = laboratory === null ? NULL : laboratoryId(country, laboratory);
          yield line(id, accountId(country, n), place, role, 'granted', SINCE, NULL, ...RECORDED);
        }
      },
    },
    {
      table: 'policy_version',
      columns: columns('id name edition content valid_from valid_to recorded_at act_seq'),
      *rows(country) {
        const id = identifier(country.seed, 'policy version', 0, NETWORK_DAY);
        const content =
          '{"note": "Every laboratory, person, weight and value of this register is invented."}';
        yield line(id, 'demo network', '1', content, SINCE, NULL, ...RECORDED);
      },
    },
    {
      table: 'scale_version',
      columns: columns('id name basis valid_from valid_to recorded_at act_seq'),
      *rows(country) {
        const basis = 'Disseminated from one realization of the kilogram';
        yield line(scaleVersionId(country), 'Kilogram as realized', basis, SINCE, NULL, ...RECORDED);
      },
    },
    {
      table: 'recognition',
      columns: columns(
        'id laboratory_id kind body number arrangement state valid_from valid_to recorded_at act_seq',
      ),
      *rows(country) {
        for (const laboratory of country.laboratories) {
          if (bestStep(laboratory) === null) continue;
          const [kind, body, arrangement] =
            laboratory.tier === 'institute'
              ? ['institute arrangement', 'Assembly of Mass Institutes', 'Mutual Trust of Institutes']
              : ['accreditation', 'Accreditation Council', 'Round Table of Accreditors'];
          const id = identifier(country.seed, 'recognition', laboratory.index, NETWORK_DAY);
          const owner = laboratoryId(country, laboratory.index);
          yield line(
            id,
            owner,
            kind!,
            body!,
            `${laboratory.code}-1`,
            arrangement!,
            'granted',
            SINCE,
            NULL,
            ...RECORDED,
          );
        }
      },
    },
    {
      table: 'authorisation',
      columns: columns('id account_id laboratory_id what state valid_from valid_to recorded_at act_seq'),
      *rows(country) {
        for (const { index } of country.laboratories) {
          const id = identifier(country.seed, 'authorisation', index, NETWORK_DAY);
          const owner = laboratoryId(country, index);
          yield line(
            id,
            signatoryId(country, index),
            owner,
            'sign calibrations',
            'granted',
            SINCE,
            NULL,
            ...RECORDED,
          );
        }
      },
    },
    {
      table: 'scope_line',
      columns: columns(
        'id laboratory_id line quantity nominal_from nominal_to method best_u_constant best_u_relative k coverage state valid_from valid_to recorded_at act_seq',
      ),
      rows: scopeRows,
    },
  ];
}

/** The columns of a table, written as one text. */
export function columns(text: string): string[] {
  return text.split(' ');
}

function* scopeRows(country: Country): Iterable<string> {
  for (const laboratory of country.laboratories) {
    const step = bestStep(laboratory);
    if (step === null) continue;
    for (const [n, { from, to, places }] of RANGES.entries()) {
      const best = Math.min(...places.map((place) => FIGURES[step]![place]!.expandedU));
      const id = identifier(country.seed, 'scope line', laboratory.index * 16 + n, NETWORK_DAY);
      const range = ['conventional mass', from.toFixed(12), to.toFixed(12), 'Substitution weighing'];
      const owner = laboratoryId(country, laboratory.index);
      yield line(
        id,
        owner,
        n + 1,
        ...range,
        (0.9 * best).toFixed(12),
        0,
        '2.0000',
        '0.95450',
        'granted',
        SINCE,
        NULL,
        ...RECORDED,
      );
    }
  }
}

/**
 * The network's act and one a month, each chained to the one before. Their contents say what they stand for and not
 * what rows they wrote: the check of the record names the rows of every table as claimed by no act.
 */
function* actRows(): Iterable<string> {
  let chain = '0'.repeat(64);
  const lastDays = new Map<number, number>([[1, NETWORK_DAY]]);
  for (let day = FIRST_DAY; day <= LAST_DAY; day += 1) lastDays.set(actOf(day), day);
  for (const [seq, day] of lastDays) {
    const kind = seq === 1 ? 'network.load' : 'month.load';
    const subject = { type: 'register', id: dayText(day).slice(0, 7) };
    const recordedAt = new Date(instantOf(day));
    const content = canonicalJson({
      seq,
      kind,
      recordedAt,
      subject,
      before: null,
      after: 'loaded in bulk',
      rows: {},
    });
    const contentSha256 = sha256(content);
    chain = sha256(chain + contentSha256);
    yield line(
      seq,
      instantText(day),
      kind,
      NULL,
      NULL,
      subject.type,
      subject.id,
      content,
      contentSha256,
      chain,
    );
  }
}
