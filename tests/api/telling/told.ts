import { pdfPages } from '#tests/support/pdf-text.ts';
import type { LaboratoryName, Planted, Teller, TellingScene, ValueName } from './scene.ts';

/** How much of a value somebody may be told; `full` of who issued the certificate says nothing of other certificates. */
export type Level = 'full' | 'statement' | 'warning' | 'none';

type Levels = Partial<Record<ValueName, Level>>;

const TOP: Levels = { root: 'statement', working: 'statement' };

/** By laboratory; what is left out is `none`. */
const OF_LABORATORY: Record<LaboratoryName, Levels> = {
  institute: {
    ...{ root: 'full', working: 'full', homes: 'full', others: 'full' },
    ...{ customers: 'warning', seconds: 'warning', again: 'warning', below: 'warning', beyonds: 'warning' },
  },
  home: { ...TOP, homes: 'full', customers: 'full', seconds: 'full', below: 'warning' },
  customer: {
    ...TOP,
    ...{ homes: 'statement', others: 'statement', customers: 'full', again: 'full', below: 'full' },
  },
  second: { ...TOP, homes: 'statement', seconds: 'full' },
  another: { ...TOP, others: 'full', again: 'full', beyonds: 'full' },
  beyond: { ...TOP, others: 'statement', beyonds: 'full' },
  nowhere: { unseen: 'full' },
};

/** The laboratory whose sight a person has; null: of none. */
export function sightOf(teller: Teller): LaboratoryName | null {
  if (teller.endsWith('of the holder')) return 'customer';
  if (teller.endsWith('of the issuer')) return 'home';
  if (teller.endsWith('of the institute')) return 'institute';
  if (teller.endsWith('of nowhere')) return 'nowhere';
  if (teller === 'metrologist of the other issuer') return 'another';
  if (teller === 'metrologist of the second customer') return 'second';
  return teller === 'metrologist beyond' ? 'beyond' : null;
}

/** A text that must not be told, and what it would give away. */
export interface Secret {
  what: string;
  text: string;
  isNumber: boolean;
}

/** Everything planted that this person must not be told. The registrar may be told all. */
export function secretsFrom(teller: Teller, { values, laboratories, epochNote }: TellingScene): Secret[] {
  if (teller === 'registrar') return [];
  const sight = sightOf(teller);
  const levels = sight === null ? {} : OF_LABORATORY[sight];
  const named = Object.entries(values) as [ValueName, Planted][];
  const levelOf = (name: ValueName): Level => levels[name] ?? 'none';
  const known = named.filter(([name]) => levelOf(name) !== 'none');
  const stated = known.filter(([name]) => levelOf(name) !== 'warning');
  const texts = new Map<string, Secret>();
  const add = (what: string, text: string, isNumber = false) => texts.set(text, { what, text, isNumber });
  for (const [name, value] of named) {
    const level = levelOf(name);
    if (level !== 'full') add(`address of the certificate of ${name}`, value.revisionId);
    if (level === 'full' || level === 'statement') continue;
    add(`deviation of ${name}`, value.digits, true);
    add(`U of ${name}`, value.uDigits, true);
    add(`certificate number of ${name}`, value.certificateNo);
    add(`day of ${name}`, value.day);
    add(`uid of ${name}`, value.uid);
    add(`marking of ${name}`, value.marking);
    add(`address of the weight of ${name}`, value.standardId);
    if (level === 'none') add(`registry number of ${name}`, value.registryNo);
  }
  // Of one weight several values may be known, each to others.
  for (const [, value] of stated) {
    texts.delete(value.marking);
    texts.delete(value.standardId);
  }
  for (const [, value] of known) texts.delete(value.registryNo);
  // Whoever is signed in may read who publishes notices on the mass scale.
  const mayName = new Set<LaboratoryName | null>([sight, 'institute']);
  for (const [name, value] of known) {
    mayName.add(value.issuer);
    if (levelOf(name) === 'full') mayName.add(value.holder);
  }
  for (const [name, { id, code }] of Object.entries(laboratories)) {
    if (mayName.has(name as LaboratoryName)) continue;
    add(`identifier of laboratory ${name}`, id);
    add(`name of laboratory ${name}`, code);
  }
  if (sight !== 'customer') {
    add('what the customer noted of its weight', epochNote);
    add('the day on which the customer’s weight was damaged', '2024-12-20');
  }
  return [...texts.values()];
}

/** The secrets found in a reply. Numbers count in whatever unit they are set. */
export function foundIn(reply: Told, secrets: readonly Secret[]): string[] {
  const text = textOf(reply);
  const numbers = new Set((joined(text, '.').match(/\d+/g) ?? []).map((digits) => digits.replace(/^0+/, '')));
  const apart = reply.isDocument ? joined(text, '. \u2009\u202f\u00a0') : '';
  const isTold = ({ text: secret, isNumber }: Secret) => {
    if (!isNumber) return text.includes(secret);
    return [...numbers].some((number) => number.startsWith(secret)) || apart.includes(secret);
  };
  return secrets.filter(isTold).map(({ what }) => what);
}

/** A reply as it came. */
export interface Told {
  headers: Record<string, string>;
  body: Buffer;
  isDocument: boolean;
}

/** Everything there is to read of a reply, its headers and its hidden parts included. */
function textOf({ headers, body, isDocument }: Told): string {
  const head = JSON.stringify(headers);
  const raw = body.toString('utf8');
  if (!isDocument) return `${head}\n${raw}\n${opened(raw)}`;
  if (raw.startsWith('%PDF')) return `${head}\n${pdfPages(body).join('\n')}`;
  return `${head}\n${raw}\n${raw.replace(/<[^>]*>/g, '')}`;
}

/** What the cursors of a reply hold. */
function opened(raw: string): string {
  return [...raw.matchAll(/"nextCursor":"([^"]+)"/g)]
    .map(([, cursor]) => Buffer.from(cursor!, 'base64url').toString('utf8'))
    .join('\n');
}

/** Text whose numbers are not broken by any of these signs. */
function joined(text: string, signs: string): string {
  return text.replace(new RegExp(`(?<=\\d)[${signs}](?=\\d)`, 'g'), '');
}
