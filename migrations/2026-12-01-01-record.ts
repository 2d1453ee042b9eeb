import { code, ID, SHA256, TABLE, type Migration } from './migration.ts';

export const record: Migration = {
  name: '2026-12-01-01-record',
  up: [
    `CREATE TABLE IF NOT EXISTS act (
      seq BIGINT UNSIGNED NOT NULL PRIMARY KEY,
      recorded_at DATETIME(6) NOT NULL,
      kind ${code(64)} NOT NULL,
      account_id ${ID} NULL,
      laboratory_id ${ID} NULL,
      subject_type ${code(40)} NOT NULL,
      subject_id ${code(64)} NOT NULL,
      content LONGTEXT NOT NULL,
      content_sha256 ${SHA256} NOT NULL,
      chain_sha256 ${SHA256} NOT NULL,
      KEY act_subject (subject_type, subject_id),
      KEY act_laboratory (laboratory_id, seq)
    ) ${TABLE}`,
    `CREATE TABLE IF NOT EXISTS act_lock (id TINYINT UNSIGNED NOT NULL PRIMARY KEY) ${TABLE}`,
    'INSERT IGNORE INTO act_lock (id) VALUES (1)',
    `CREATE TABLE IF NOT EXISTS document (
      id ${ID} NOT NULL PRIMARY KEY,
      sha256 ${SHA256} NOT NULL,
      media_type ${code(80)} NOT NULL,
      size INT UNSIGNED NOT NULL,
      name VARCHAR(200) NOT NULL,
      laboratory_id ${ID} NOT NULL,
      recorded_at DATETIME(6) NOT NULL,
      act_seq BIGINT UNSIGNED NOT NULL,
      UNIQUE KEY document_content (sha256, laboratory_id)
    ) ${TABLE}`,
  ],
  down: ['DROP TABLE IF EXISTS document', 'DROP TABLE IF EXISTS act_lock', 'DROP TABLE IF EXISTS act'],
};
