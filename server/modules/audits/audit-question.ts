/** What an audit asks. Fixed when it is asked for, so that it can be asked again. */
export interface AuditQuestion {
  scope: 'value' | 'laboratory' | 'network';
  /** The value whose chain it is; null for other scopes. */
  valueUid: string | null;
  /** The laboratory it is of; null for other scopes. */
  laboratoryId: string | null;
  /** In force on (ISO day). */
  day: string;
  /** As known on (ISO day). */
  known: string;
  /** The last instant that counts: the end of `known`, or the instant of asking where that day was not over. */
  asOf: string;
  /** The newest act when it was asked. */
  asOfAct: number;
}

/** Instants as the register writes them, UTC with microseconds. */
export function instantText(instant: Date): string {
  return instant.toISOString().replace('Z', '000Z');
}
