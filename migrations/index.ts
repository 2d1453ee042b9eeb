import { record } from './2026-12-01-01-record.ts';
import { identity } from './2026-12-01-02-identity.ts';
import { network } from './2026-12-01-03-network.ts';
import { standards } from './2026-12-01-04-standards.ts';
import { calibrations } from './2026-12-01-05-calibrations.ts';
import { find } from './2026-12-01-06-find.ts';
import { notices } from './2026-12-01-07-notices.ts';
import { dryRuns } from './2026-12-01-08-dry-runs.ts';
import { audits } from './2026-12-01-09-audits.ts';
import type { Migration } from './migration.ts';

/** In the order they run. Handed to the migrator as an array: a folder scan finds nothing in the bundled server. */
export const migrations: readonly Migration[] = [
  record,
  identity,
  network,
  standards,
  calibrations,
  find,
  notices,
  dryRuns,
  audits,
];
