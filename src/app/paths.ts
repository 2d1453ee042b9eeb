/** Every screen's place: `path` for the router, `href` for links. No other file writes an address by hand. */
export const paths = {
  home: { path: '/', href: () => '/' },
  signIn: {
    path: '/sign-in',
    /** @param from relative path to come back to after sign-in */
    href: (from?: string) =>
      from && from !== '/' ? `/sign-in?from=${encodeURIComponent(from)}` : '/sign-in',
  },
  desk: { path: '/desk', href: () => '/desk' },
  standards: { path: '/standards', href: () => '/standards' },
  newStandard: { path: '/standards/new', href: () => '/standards/new' },
  newSet: { path: '/standards/new-set', href: () => '/standards/new-set' },
  standard: { path: '/standards/:standardId', href: (standardId: string) => `/standards/${standardId}` },
  calibrations: { path: '/calibrations', href: () => '/calibrations' },
  newDraft: {
    path: '/calibrations/drafts/new',
    /** @param standardId the weight that the first line is about */
    href: (standardId?: string) =>
      standardId ? `/calibrations/drafts/new?standard=${standardId}` : '/calibrations/drafts/new',
  },
  calibrationDraft: {
    path: '/calibrations/drafts/:draftId',
    href: (draftId: string) => `/calibrations/drafts/${draftId}`,
  },
  calibration: {
    path: '/calibrations/:revisionId',
    href: (revisionId: string) => `/calibrations/${revisionId}`,
  },
  chains: { path: '/chains', href: () => '/chains' },
  chain: {
    path: '/chains/:valueUid',
    /** @param days in force on, as known on; today where left out */
    href: (valueUid: string, days: Days = {}) => `/chains/${valueUid}${daysText(days)}`,
  },
  downstream: {
    path: '/chains/:valueUid/downstream',
    /** @param days in force on, as known on; today where left out */
    href: (valueUid: string, days: Days = {}) => `/chains/${valueUid}/downstream${daysText(days)}`,
  },
  network: { path: '/network', href: () => '/network' },
  laboratory: { path: '/network/:laboratoryId', href: (laboratoryId: string) => `/network/${laboratoryId}` },
} as const;

interface Days {
  day?: string | undefined;
  known?: string | undefined;
}

function daysText({ day, known }: Days): string {
  const parameters = new URLSearchParams({ ...(day && { day }), ...(known && { known }) });
  return parameters.size > 0 ? `?${parameters.toString()}` : '';
}

/** State of a navigation that gives the screen an address of its own and leaves the focus where it is. */
export const SAME_SCREEN = 'same screen';

/** The sections of the rail that exist. */
export const SECTIONS = [
  { label: 'Desk', href: paths.desk.href() },
  { label: 'Standards', href: paths.standards.href() },
  { label: 'Calibrations', href: paths.calibrations.href() },
  { label: 'Chains', href: paths.chains.href() },
  { label: 'Network', href: paths.network.href() },
];
