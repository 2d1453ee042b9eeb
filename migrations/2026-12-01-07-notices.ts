import { code, GRAMS, ID, RECORDED, TABLE, type Migration } from './migration.ts';

/** Notices: published acts that map one version of the mass scale to another without re-issuing certificates. */
export const notices: Migration = {
  name: '2026-12-01-07-notices',
  up: [
    `CREATE TABLE IF NOT EXISTS notice (
      id ${ID} NOT NULL PRIMARY KEY,
      issuer_id ${ID} NOT NULL,
      number ${code(40)} NOT NULL,
      kind ENUM('unit correction', 'uncertainty added', 'consensus value') NOT NULL,
      title VARCHAR(160) NOT NULL,
      reason TEXT NOT NULL,
      from_scale_id ${ID} NOT NULL,
      to_scale_id ${ID} NULL COMMENT 'NULL: the scale version stays',
      effective_on DATE NOT NULL,
      made_known_on DATE NOT NULL,
      threshold VARCHAR(400) NULL COMMENT 'in words: from where on it matters',
      replaces_id ${ID} NULL COMMENT 'the notice that this one ends',
      ${RECORDED},
      UNIQUE KEY notice_number (issuer_id, number),
      UNIQUE KEY notice_replaces (replaces_id),
      KEY notice_act (act_seq),
      CONSTRAINT notice_issuer FOREIGN KEY (issuer_id) REFERENCES laboratory (id) ON DELETE RESTRICT,
      CONSTRAINT notice_from_scale FOREIGN KEY (from_scale_id) REFERENCES scale_version (id) ON DELETE RESTRICT,
      CONSTRAINT notice_to_scale FOREIGN KEY (to_scale_id) REFERENCES scale_version (id) ON DELETE RESTRICT,
      CONSTRAINT notice_replaced FOREIGN KEY (replaces_id) REFERENCES notice (id) ON DELETE RESTRICT
    ) ${TABLE}`,
    `CREATE TABLE IF NOT EXISTS notice_term (
      notice_id ${ID} NOT NULL,
      n TINYINT UNSIGNED NOT NULL,
      quantity ENUM('mass', 'conventional mass') NULL COMMENT 'NULL: either',
      performed_from DATE NULL,
      performed_to DATE NULL,
      nominal_from ${GRAMS} NULL,
      nominal_to ${GRAMS} NULL,
      added_u DOUBLE NOT NULL COMMENT 'g per kg of nominal, standard uncertainty',
      PRIMARY KEY (notice_id, n),
      CONSTRAINT notice_term_notice FOREIGN KEY (notice_id) REFERENCES notice (id) ON DELETE RESTRICT
    ) ${TABLE}`,
    `CREATE TABLE IF NOT EXISTS notice_shift (
      notice_id ${ID} NOT NULL,
      n TINYINT UNSIGNED NOT NULL,
      performed_on DATE NOT NULL COMMENT 'day of calibration; linear between the days',
      shift ${GRAMS} NOT NULL COMMENT 'g per kg of nominal',
      PRIMARY KEY (notice_id, n, performed_on),
      CONSTRAINT notice_shift_term FOREIGN KEY (notice_id, n) REFERENCES notice_term (notice_id, n) ON DELETE RESTRICT
    ) ${TABLE}`,
  ],
  down: ['notice_shift', 'notice_term', 'notice'].map((table) => `DROP TABLE IF EXISTS ${table}`),
};
