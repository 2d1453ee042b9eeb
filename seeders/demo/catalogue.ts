/** A line of a certificate: how the catalogue points into the register. */
export interface LineOfCertificate {
  certificateNo: string;
  /** 1 for the first issue. */
  revision: number;
  line: number;
}

/** What was put into the network on purpose, and the rule that speaks of it. */
export interface CatalogueEntry extends LineOfCertificate {
  /** A fault has to be found by its rule; a look-alike must not be. */
  is: 'fault' | 'look-alike';
  kind: string;
  rule: string;
  /** Under which verdict a fault has to be found; of a look-alike: the one that it might be mistaken under. */
  verdict: 'conduct' | 'today';
  /** Where the rule speaks of a link: the reference that was leaned on. */
  reference: LineOfCertificate | null;
  /** Other rules that report the same slip; they are no false alarms. */
  alsoFoundBy: string[];
}

/** Where a value stands. */
export function placeOf({ certificateNo, revision, line }: LineOfCertificate): LineOfCertificate {
  return { certificateNo, revision, line };
}
