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
    /**
     * @param standardId the weight that the first line is about
     * @param first for which laboratory, issued by which, and the registry number of what that line leans on
     */
    href: (standardId?: string, first: { laboratory?: string; issuer?: string; reference?: string } = {}) =>
      `/calibrations/drafts/new${queryText({ ...(standardId && { standard: standardId }), ...first })}`,
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
    /** @param at what is selected there: a value's uid, or child and parent joined by a dot */
    selectedHref: (valueUid: string, asked: { day: string; known: string; verdict: string }, at: string) =>
      `/chains/${valueUid}${queryText({ ...asked, at })}`,
  },
  downstream: {
    path: '/chains/:valueUid/downstream',
    /** @param days in force on, as known on; today where left out */
    href: (valueUid: string, days: Days = {}) => `/chains/${valueUid}/downstream${daysText(days)}`,
  },
  whatIf: {
    path: '/chains/what-if',
    /** @param asked parameters of the question; `changes` as JSON */
    href: (asked: Record<string, string> = {}) => `/chains/what-if${queryText(asked)}`,
  },
  dryRuns: { path: '/chains/dry-runs', href: () => '/chains/dry-runs' },
  dryRun: { path: '/chains/dry-runs/:dryRunId', href: (dryRunId: string) => `/chains/dry-runs/${dryRunId}` },
  dryRunComparison: {
    path: '/chains/dry-runs/compare',
    href: (one: string, other: string) => `/chains/dry-runs/compare${queryText({ one, other })}`,
  },
  together: {
    path: '/chains/together',
    href: (valueUids: readonly string[] = []) =>
      `/chains/together${valueUids.length > 0 ? `?values=${valueUids.join(',')}` : ''}`,
  },
  exposure: {
    path: '/standards/:standardId/exposure',
    /** @param between the last day on which the weight was known to be good, and the first on which it was bad */
    href: (standardId: string, between: { lastGood?: string; firstBad?: string } = {}) =>
      `/standards/${standardId}/exposure${queryText(between)}`,
  },
  audits: { path: '/audits', href: () => '/audits' },
  audit: {
    path: '/audits/:auditId',
    /** @param filter of the findings, by name */
    href: (auditId: string, filter: Record<string, string> = {}) => `/audits/${auditId}${queryText(filter)}`,
  },
  network: { path: '/network', href: () => '/network' },
  massScale: { path: '/network/mass-scale', href: () => '/network/mass-scale' },
  newNotice: {
    path: '/network/notices/new',
    /** @param change what a dry run supposed, to go on from */
    href: (change?: unknown) =>
      change === undefined
        ? '/network/notices/new'
        : `/network/notices/new?change=${encodeURIComponent(JSON.stringify(change))}`,
  },
  notice: {
    path: '/network/notices/:noticeId',
    href: (noticeId: string) => `/network/notices/${noticeId}`,
  },
  laboratory: { path: '/network/:laboratoryId', href: (laboratoryId: string) => `/network/${laboratoryId}` },
} as const;

interface Days {
  day?: string | undefined;
  known?: string | undefined;
}

function queryText(parameters: Record<string, string>): string {
  const text = new URLSearchParams(parameters).toString();
  return text === '' ? '' : `?${text}`;
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
  { label: 'Audits', href: paths.audits.href() },
  { label: 'Network', href: paths.network.href() },
];
