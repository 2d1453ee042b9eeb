import { ID, RECORDED, TABLE, type Migration } from './migration.ts';

/** Dry runs kept for a laboratory: the question alone. Its answer is worked out anew for whoever opens it. */
export const dryRuns: Migration = {
  name: '2026-12-01-08-dry-runs',
  up: [
    `CREATE TABLE IF NOT EXISTS dry_run (
      id ${ID} NOT NULL PRIMARY KEY,
      laboratory_id ${ID} NOT NULL,
      account_id ${ID} NOT NULL,
      name VARCHAR(120) NOT NULL,
      question JSON NOT NULL,
      ${RECORDED},
      KEY dry_run_laboratory (laboratory_id, act_seq),
      KEY dry_run_act (act_seq),
      CONSTRAINT dry_run_laboratory FOREIGN KEY (laboratory_id) REFERENCES laboratory (id) ON DELETE RESTRICT,
      CONSTRAINT dry_run_account FOREIGN KEY (account_id) REFERENCES account (id) ON DELETE RESTRICT
    ) ${TABLE}`,
    `CREATE TABLE IF NOT EXISTS dry_run_note (
      id ${ID} NOT NULL PRIMARY KEY,
      dry_run_id ${ID} NOT NULL,
      account_id ${ID} NOT NULL,
      kind ENUM('note', 'discard') NOT NULL,
      text VARCHAR(600) NOT NULL,
      ${RECORDED},
      KEY dry_run_note_run (dry_run_id, act_seq),
      KEY dry_run_note_act (act_seq),
      CONSTRAINT dry_run_note_run FOREIGN KEY (dry_run_id) REFERENCES dry_run (id) ON DELETE RESTRICT,
      CONSTRAINT dry_run_note_account FOREIGN KEY (account_id) REFERENCES account (id) ON DELETE RESTRICT
    ) ${TABLE}`,
  ],
  down: ['DROP TABLE IF EXISTS dry_run_note', 'DROP TABLE IF EXISTS dry_run'],
};
