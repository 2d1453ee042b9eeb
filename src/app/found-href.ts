import type { Found } from '#src/features/desk/api.ts';
import { paths } from './paths.ts';

/** Where a thing found by the search box is shown; a set is the list of its weights. */
export function foundHref(found: Found): string {
  switch (found.kind) {
    case 'standard':
      return paths.standard.href(found.id);
    case 'set':
      return `${paths.standards.href()}?q=${encodeURIComponent(found.label)}`;
    case 'certificate':
      return paths.calibration.href(found.id);
    case 'laboratory':
      return paths.laboratory.href(found.id);
  }
}
