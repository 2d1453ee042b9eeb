import type { Person } from './session.ts';

/** What somebody may withdraw: a certificate that their laboratory issued, or the entry of another laboratory's. */
export type Withdrawal = 'certificate' | 'entry';

/** Which of the two it is: who signs for the issuer withdraws the certificate itself. */
export function withdrawalOf({ roles }: Person, issuerId: string): Withdrawal {
  const signs = roles.some(({ role, laboratory }) => role === 'signatory' && laboratory?.id === issuerId);
  return signs ? 'certificate' : 'entry';
}

/** The act in words. */
export function withdrawalText(withdrawal: Withdrawal, certificateNo: string): string {
  return withdrawal === 'certificate'
    ? `Withdraw certificate ${certificateNo}`
    : `Withdraw the entry of certificate ${certificateNo}`;
}
