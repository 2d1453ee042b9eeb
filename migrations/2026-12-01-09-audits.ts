import { code, ID, RECORDED, SHA256, TABLE, type Migration } from './migration.ts';

const QUESTION = `scope ENUM('value', 'laboratory', 'network') NOT NULL,
      value_uid ${ID} NULL,
      laboratory_id ${ID} NULL,
      day DATE NOT NULL,
      known DATE NOT NULL,
      as_of CHAR(27) CHARACTER SET ascii COLLATE ascii_bin NOT NULL COMMENT 'last instant that counts, UTC',
      as_of_act BIGINT UNSIGNED NOT NULL`;

/** Audits: jobs that are worked on, and the runs they end in, with what they found and what the rules saw. */
export const audits: Migration = {
  name: '2026-12-01-09-audits',
  up: [
    `CREATE TABLE IF NOT EXISTS audit_job (
      id ${ID} NOT NULL PRIMARY KEY,
      ${QUESTION},
      repeat_of ${ID} NULL,
      asked_by ${ID} NOT NULL,
      asked_at DATETIME(6) NOT NULL,
      state ENUM('waiting', 'running', 'done', 'failed', 'stopped') NOT NULL,
      done INT UNSIGNED NOT NULL,
      total INT UNSIGNED NULL,
      message VARCHAR(500) NULL,
      runner ${ID} NULL COMMENT 'the process that works on it',
      heartbeat DATETIME(6) NULL,
      attempts TINYINT UNSIGNED NOT NULL,
      KEY audit_job_state (state, asked_at),
      KEY audit_job_laboratory (laboratory_id, asked_at),
      KEY audit_job_asked (asked_at, id),
      KEY audit_job_repeat (repeat_of, asked_at)
    ) ${TABLE}`,
    `CREATE TABLE IF NOT EXISTS audit_run (
      id ${ID} NOT NULL PRIMARY KEY,
      ${QUESTION},
      repeat_of ${ID} NULL,
      asked_by ${ID} NOT NULL,
      rule_set ${code(40)} NOT NULL,
      engine ${code(40)} NOT NULL,
      began_at DATETIME(6) NOT NULL,
      ended_at DATETIME(6) NOT NULL,
      chains INT UNSIGNED NOT NULL,
      value_count INT UNSIGNED NOT NULL,
      link_count INT UNSIGNED NOT NULL,
      finding_count INT UNSIGNED NOT NULL,
      counts LONGTEXT NOT NULL COMMENT 'JSON',
      rules LONGTEXT NOT NULL COMMENT 'JSON: the rules in words, as they were',
      result_sha256 ${SHA256} NOT NULL,
      facts_sha256 ${SHA256} NOT NULL,
      ${RECORDED},
      KEY audit_run_laboratory (laboratory_id, scope, act_seq),
      KEY audit_run_scope (scope, act_seq),
      KEY audit_run_act (act_seq)
    ) ${TABLE}`,
    `CREATE TABLE IF NOT EXISTS audit_finding (
      run_id ${ID} NOT NULL,
      n INT UNSIGNED NOT NULL,
      rule ${code(16)} NOT NULL,
      verdict ENUM('conduct', 'today') NOT NULL,
      outcome ENUM('fails', 'cannot be judged') NOT NULL,
      severity ENUM('block', 'critical', 'major', 'minor', 'information') NOT NULL,
      subject ENUM('value', 'link', 'chain') NOT NULL,
      value_uid ${ID} NOT NULL COMMENT 'the value, the one that leans, or the focus of the chain',
      parent_uid ${ID} NULL,
      focus_uid ${ID} NOT NULL,
      laboratory_id ${ID} NOT NULL COMMENT 'whose result it is',
      sentence ${code(120)} NOT NULL,
      parameters LONGTEXT NOT NULL COMMENT 'JSON',
      facts_n INT UNSIGNED NOT NULL,
      PRIMARY KEY (run_id, n),
      KEY audit_finding_rule (run_id, rule, n),
      KEY audit_finding_value (run_id, outcome, value_uid)
    ) ${TABLE}`,
    `CREATE TABLE IF NOT EXISTS audit_facts (
      run_id ${ID} NOT NULL,
      block INT UNSIGNED NOT NULL,
      body LONGTEXT CHARACTER SET ascii COLLATE ascii_bin NOT NULL COMMENT 'base64 of zlib of a JSON list',
      PRIMARY KEY (run_id, block)
    ) ${TABLE}`,
  ],
  down: [
    'DROP TABLE IF EXISTS audit_facts',
    'DROP TABLE IF EXISTS audit_finding',
    'DROP TABLE IF EXISTS audit_run',
    'DROP TABLE IF EXISTS audit_job',
  ],
};
