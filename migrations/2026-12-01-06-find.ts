import type { Migration } from './migration.ts';

/** What the search box and the holdings of a laboratory are looked up by. */
export const find: Migration = {
  name: '2026-12-01-06-find',
  up: [
    'CREATE INDEX IF NOT EXISTS standard_marking ON standard (marking)',
    'CREATE INDEX IF NOT EXISTS standard_serial ON standard (serial)',
    'CREATE INDEX IF NOT EXISTS standard_fact_laboratory ON standard_fact (laboratory_id, kind, standard_id)',
    'CREATE INDEX IF NOT EXISTS calibration_certificate_no ON calibration (certificate_no)',
    'CREATE INDEX IF NOT EXISTS programme_of_laboratory ON programme (laboratory_id, standard_id)',
  ],
  down: [
    'DROP INDEX IF EXISTS programme_of_laboratory ON programme',
    'DROP INDEX IF EXISTS calibration_certificate_no ON calibration',
    'DROP INDEX IF EXISTS standard_fact_laboratory ON standard_fact',
    'DROP INDEX IF EXISTS standard_serial ON standard',
    'DROP INDEX IF EXISTS standard_marking ON standard',
  ],
};
