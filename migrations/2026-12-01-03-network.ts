import { code, GRAMS, ID, RECORDED, TABLE, VALID, type Migration } from './migration.ts';

export const network: Migration = {
  name: '2026-12-01-03-network',
  up: [
    `CREATE TABLE IF NOT EXISTS policy_version (
      id ${ID} NOT NULL PRIMARY KEY,
      name ${code(60)} NOT NULL,
      edition ${code(40)} NOT NULL,
      content JSON NOT NULL,
      ${VALID},
      ${RECORDED},
      KEY policy_version_name (name, recorded_at)
    ) ${TABLE}`,
    `CREATE TABLE IF NOT EXISTS recognition (
      id ${ID} NOT NULL PRIMARY KEY,
      laboratory_id ${ID} NOT NULL,
      kind ENUM('institute arrangement', 'accreditation') NOT NULL,
      body VARCHAR(160) NOT NULL,
      number ${code(60)} NOT NULL,
      arrangement VARCHAR(160) NOT NULL,
      state ENUM('granted', 'suspended', 'withdrawn') NOT NULL,
      ${VALID},
      ${RECORDED},
      KEY recognition_laboratory (laboratory_id, kind, recorded_at),
      KEY recognition_act (act_seq),
      CONSTRAINT recognition_laboratory FOREIGN KEY (laboratory_id) REFERENCES laboratory (id) ON DELETE RESTRICT
    ) ${TABLE}`,
    `CREATE TABLE IF NOT EXISTS scope_line (
      id ${ID} NOT NULL PRIMARY KEY,
      laboratory_id ${ID} NOT NULL,
      line SMALLINT UNSIGNED NOT NULL,
      quantity ENUM('mass', 'conventional mass') NOT NULL,
      nominal_from ${GRAMS} NOT NULL,
      nominal_to ${GRAMS} NOT NULL,
      method ${code(80)} NOT NULL,
      best_u_constant ${GRAMS} NOT NULL,
      best_u_relative DOUBLE NOT NULL,
      k DECIMAL(6,4) NOT NULL,
      coverage DECIMAL(6,5) NOT NULL,
      state ENUM('granted', 'suspended', 'withdrawn') NOT NULL,
      ${VALID},
      ${RECORDED},
      KEY scope_line_laboratory (laboratory_id, quantity, nominal_from, nominal_to),
      KEY scope_line_act (act_seq),
      CONSTRAINT scope_line_laboratory FOREIGN KEY (laboratory_id) REFERENCES laboratory (id) ON DELETE RESTRICT
    ) ${TABLE}`,
    `CREATE TABLE IF NOT EXISTS authorisation (
      id ${ID} NOT NULL PRIMARY KEY,
      account_id ${ID} NOT NULL,
      laboratory_id ${ID} NOT NULL,
      what ENUM('sign calibrations') NOT NULL,
      state ENUM('granted', 'ended') NOT NULL,
      ${VALID},
      ${RECORDED},
      KEY authorisation_account (account_id, laboratory_id),
      CONSTRAINT authorisation_account FOREIGN KEY (account_id) REFERENCES account (id) ON DELETE RESTRICT,
      CONSTRAINT authorisation_laboratory FOREIGN KEY (laboratory_id) REFERENCES laboratory (id) ON DELETE RESTRICT
    ) ${TABLE}`,
    `CREATE TABLE IF NOT EXISTS scale_version (
      id ${ID} NOT NULL PRIMARY KEY,
      name ${code(60)} NOT NULL,
      basis VARCHAR(200) NOT NULL,
      ${VALID},
      ${RECORDED},
      UNIQUE KEY scale_version_name (name)
    ) ${TABLE}`,
  ],
  down: ['scale_version', 'authorisation', 'scope_line', 'recognition', 'policy_version'].map(
    (table) => `DROP TABLE IF EXISTS ${table}`,
  ),
};
