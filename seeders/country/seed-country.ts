import { hashPassword } from '#server/modules/identity/index.ts';
import { DEMO_PASSWORD } from '#seeders/demo/people.ts';
import { bulkLoad } from './bulk-load.ts';
import { planCountry, type Country } from './country.ts';
import { figuresOf, type CountryFigures } from './figures.ts';
import { identifier } from './identifiers.ts';
import { CALIBRATION_TABLES } from './tables-of-calibrations.ts';
import { LINK_TABLES } from './tables-of-links.ts';
import { networkTables } from './tables-of-network.ts';
import { STANDARD_TABLES } from './tables-of-standards.ts';

/** A register as filled, and what it is like. */
export interface SeededCountry extends CountryFigures {
  /** `uid` of the value with everything below it, and of the one with about a tenth of the register below it. */
  rootUid: string;
  wideUid: string;
}

/**
 * Fills an empty, migrated register with a country.
 * @param options.url an account as `bulkLoad` wants it
 * @param options.valueCount 10 000 or more
 */
export async function seedCountry({
  url,
  valueCount,
  seed = 1,
  say,
}: {
  url: string;
  valueCount: number;
  seed?: number;
  say: (line: string) => void;
}): Promise<SeededCountry> {
  const begin = performance.now();
  const country = planCountry(valueCount, seed);
  const figures = figuresOf(country, valueCount / 10);
  say(`  planned in ${((performance.now() - begin) / 1000).toFixed(1)} s`);
  const tables = [
    ...networkTables(await hashPassword(DEMO_PASSWORD)),
    ...STANDARD_TABLES,
    ...CALIBRATION_TABLES,
    ...LINK_TABLES,
  ];
  await bulkLoad(url, country, tables, say);
  say(
    `  ${figures.values} values, ${figures.links} links, ${figures.levels} levels, ${figures.laboratories} laboratories; ` +
      `ancestors ${figures.meanAncestors.toFixed(1)} on average, ${figures.mostAncestors} at most ` +
      `(${((performance.now() - begin) / 1000).toFixed(0)} s)`,
  );
  return {
    ...figures,
    rootUid: uidOf(country, figures.root.value),
    wideUid: uidOf(country, figures.wide.value),
  };
}

/** The `uid` of a value by its number from 0. */
function uidOf(country: Country, value: number): string {
  return identifier(country.seed, 'value', value, country.works[country.workOf[value]!]!.issuedOn);
}
