import type { Mending } from '#shared/rules/mending.ts';
import { paths } from '#src/app/paths.ts';

/** What is known of the finding's places; what the person may not open is left out. */
export interface MendingPlaces {
  /** The laboratory whose result it is. */
  laboratory: { id: string; name: string };
  /** Whether the person writes in that laboratory's name. */
  isOurs: boolean;
  /** The weight that the result is about. */
  standardId: string | null;
  /** Its calibration sheet. */
  revisionId: string | null;
  /** What was leaned on. */
  reference: { standardId: string | null; registryNo: string; revisionId: string | null } | null;
}

/** Where the next step is taken, and what the link to it says. */
export interface MendingLink {
  href: string;
  label: string;
}

/** The link to the place where a finding is mended; null where that is not this person's to do, or has no place. */
export function mendingLink({ place }: Mending, places: MendingPlaces): MendingLink | null {
  const { laboratory, isOurs, standardId, revisionId, reference } = places;
  const link = (href: string | null, label: string) => (href === null ? null : { href, label });
  const opened = (id: string | null | undefined, label: string) =>
    link(id ? paths.standard.href(id) : null, label);
  const sheet = (id: string | null | undefined, label: string) =>
    link(id ? paths.calibration.href(id) : null, label);
  switch (place) {
    case 'new calibration': {
      if (!isOurs || !standardId) return null;
      const leaning = reference && { reference: reference.registryNo };
      return link(
        paths.newDraft.href(standardId, { laboratory: laboratory.id, ...leaning }),
        'Start the calibration',
      );
    }
    case 'calibration of the reference': {
      if (!isOurs || !reference?.standardId) return null;
      return link(
        paths.newDraft.href(reference.standardId, { laboratory: laboratory.id }),
        `Start a calibration of ${reference.registryNo}`,
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
