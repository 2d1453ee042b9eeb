import type { Mending } from '#shared/rules/mending.ts';
import { paths } from '#src/app/paths.ts';

/** A laboratory as a finding names it. */
interface Named {
  id: string;
  name: string;
}

/** What is known of the finding's places; what the person may not open is left out. */
export interface MendingPlaces {
  /** The laboratory whose result it is. */
  laboratory: Named;
  /** The laboratory for which this person may enter a new result of the weight; null where there is none. */
  entersFor: string | null;
  /** The weight that the result is about. */
  standardId: string | null;
  /** Its calibration sheet. */
  revisionId: string | null;
  /** What was leaned on, and for which laboratory this person may enter a new result of it. */
  reference: {
    standardId: string | null;
    registryNo: string;
    revisionId: string | null;
    entersFor: string | null;
  } | null;
}

/** Where the next step is taken, and what the link to it says. */
export interface MendingLink {
  href: string;
  label: string;
}

/** The link to the place where a finding is mended; null where that is not this person's to do, or has no place. */
export function mendingLink({ place }: Mending, places: MendingPlaces): MendingLink | null {
  const { laboratory, standardId, revisionId, reference } = places;
  const link = (href: string | null, label: string) => (href === null ? null : { href, label });
  const opened = (id: string | null | undefined, label: string) =>
    link(id ? paths.standard.href(id) : null, label);
  const sheet = (id: string | null | undefined, label: string) =>
    link(id ? paths.calibration.href(id) : null, label);
  switch (place) {
    case 'new calibration':
      return newResult(places);
    case 'calibration of the reference': {
      if (!reference?.entersFor || !reference.standardId) return null;
      return link(
        paths.newDraft.href(reference.standardId, { laboratory: reference.entersFor }),
        `Enter a calibration of ${reference.registryNo}`,
      );
    }
    case 'programme':
    case 'weight of the reference':
      return opened(reference?.standardId, `Open ${reference?.registryNo ?? 'the reference'}`);
    case 'weight':
      return opened(standardId, 'Open the weight');
    case 'certificate':
      return sheet(revisionId, 'Open the certificate');
    case 'certificate of the reference':
      return sheet(reference?.revisionId, 'Open the certificate of the reference');
    case 'laboratory':
      return link(paths.laboratory.href(laboratory.id), `Open ${laboratory.name}`);
    case 'chain':
      return null;
  }
}

/**
 * A draft of the weight's next result. Where another laboratory calibrates it, the draft transcribes that laboratory's
 * new certificate, and what that will lean on is not known before it is read.
 */
function newResult({ laboratory, entersFor, standardId, reference }: MendingPlaces): MendingLink | null {
  if (!entersFor || !standardId) return null;
  const isOwn = entersFor === laboratory.id;
  const leaning = isOwn && reference && { reference: reference.registryNo };
  return {
    href: paths.newDraft.href(standardId, { laboratory: entersFor, issuer: laboratory.id, ...leaning }),
    label: isOwn ? 'Start the calibration' : `Enter the new certificate of ${laboratory.name}`,
  };
}
