import { code, ID, RECORDED, TABLE, VALID, type Migration } from './migration.ts';

export const identity: Migration = {
  name: '2026-12-01-02-identity',
  up: [
    `CREATE TABLE IF NOT EXISTS laboratory (
      id ${ID} NOT NULL PRIMARY KEY,
      code ${code(12)} NOT NULL,
      name VARCHAR(160) NOT NULL,
      kind ENUM('national institute', 'calibration laboratory', 'external institute') NOT NULL,
      country CHAR(2) CHARACTER SET ascii NOT NULL,
      place VARCHAR(120) NOT NULL,
      ${RECORDED},
      UNIQUE KEY laboratory_code (code)
    ) ${TABLE}`,
    `CREATE TABLE IF NOT EXISTS account (
      id ${ID} NOT NULL PRIMARY KEY,
      email VARCHAR(254) NOT NULL,
      name VARCHAR(120) NOT NULL,
      ${RECORDED},
      UNIQUE KEY account_email (email)
    ) ${TABLE}`,
    `CREATE TABLE IF NOT EXISTS account_password (
      account_id ${ID} NOT NULL,
      ${RECORDED},
      argon2id VARCHAR(200) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
      PRIMARY KEY (account_id, act_seq),
      CONSTRAINT account_password_account FOREIGN KEY (account_id) REFERENCES account (id) ON DELETE RESTRICT
    ) ${TABLE}`,
    `CREATE TABLE IF NOT EXISTS membership (
      id ${ID} NOT NULL PRIMARY KEY,
      account_id ${ID} NOT NULL,
      laboratory_id ${ID} NULL,
      role ENUM('registrar', 'laboratory administrator', 'metrologist', 'signatory', 'reader', 'assessor', 'comparison pilot') NOT NULL,
      state ENUM('granted', 'ended') NOT NULL,
      ${VALID},
      ${RECORDED},
      KEY membership_account (account_id),
      KEY membership_laboratory (laboratory_id),
      CONSTRAINT membership_account FOREIGN KEY (account_id) REFERENCES account (id) ON DELETE RESTRICT,
      CONSTRAINT membership_laboratory FOREIGN KEY (laboratory_id) REFERENCES laboratory (id) ON DELETE RESTRICT
    ) ${TABLE}`,
    `CREATE TABLE IF NOT EXISTS session (
      sid VARCHAR(64) CHARACTER SET ascii COLLATE ascii_bin NOT NULL PRIMARY KEY,
      expires DATETIME(3) NULL,
      data TEXT NULL,
      createdAt DATETIME(3) NOT NULL,
      updatedAt DATETIME(3) NOT NULL,
      KEY session_expires (expires)
    ) ${TABLE}`,
  ],
  down: ['session', 'membership', 'account_password', 'account', 'laboratory'].map(
    (table) => `DROP TABLE IF EXISTS ${table}`,
  ),
};
