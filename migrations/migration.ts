/**
 * One step of the schema. Statements run one by one, since MariaDB commits at each; every one is guarded
 * (`IF NOT EXISTS`), so a step that failed half-way can run again. A merged migration is never edited.
 */
export interface Migration {
  /** Sortable: `2026-12-01-01-identity`. */
  name: string;
  up: readonly string[];
  down: readonly string[];
}

/** Every table: utf8mb4, InnoDB; text compares without case unless a column says `ascii_bin`. */
export const TABLE = 'ENGINE=InnoDB DEFAULT CHARSET=utf8mb4 COLLATE=utf8mb4_uca1400_ai_ci';

/** An identifier: UUID version 7 as text. */
export const ID = 'CHAR(36) CHARACTER SET ascii COLLATE ascii_bin';

/** A code, number or hash that compares byte by byte. */
export const code = (length: number): string =>
  `VARCHAR(${length}) CHARACTER SET utf8mb4 COLLATE utf8mb4_bin`;
export const SHA256 = 'CHAR(64) CHARACTER SET ascii COLLATE ascii_bin';

/** Masses, nominals, deviations, expanded uncertainties: grams, to a picogram. */
export const GRAMS = 'DECIMAL(20,12)';

/** When the register did it, and in which act. */
export const RECORDED = 'recorded_at DATETIME(6) NOT NULL, act_seq BIGINT UNSIGNED NOT NULL';

/** The days of the world that an assertion covers; an open end has no `valid_to`. */
export const VALID = 'valid_from DATE NOT NULL, valid_to DATE NULL';
