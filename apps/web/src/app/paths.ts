/** Every address of the application; links and the router are made from these. */
export const PATTERNS = {
  front: '/',
  about: '/about/:part',
  signUp: '/sign-up',
  signIn: '/sign-in',
  forgot: '/forgotten',
  reset: '/reset',
  invitation: '/invitation',
  account: '/account',
  mailbox: '/mailbox',
  inspect: '/i',
  inspection: '/inspection',
  firm: '/firms/:firm',
  jobs: 'jobs',
  newJob: 'jobs/new',
  uploadJob: 'jobs/upload',
  firmPart: 'firm/:part',
  job: 'jobs/:job',
  schedule: 'schedule',
  sizes: 'sizes',
  equations: 'equations',
  reports: 'reports',
  settings: 'settings',
} as const;

export const FIRM_PARTS = [
  'people',
  'limits',
  'defaults',
  'wording',
  'conductors',
  'tables',
  'audit',
] as const;
export type FirmPart = (typeof FIRM_PARTS)[number];
export const ABOUT_PARTS = ['method', 'tables', 'limits'] as const;
export type AboutPart = (typeof ABOUT_PARTS)[number];

const inFirm = (firm: string, rest: string) => `/firms/${firm}/${rest}`;
const inJob = (firm: string, job: string, place: string) => inFirm(firm, `jobs/${job}/${place}`);
const withQuery = (path: string, query: Record<string, string | null | undefined>) => {
  const given = Object.entries(query).filter((pair): pair is [string, string] => Boolean(pair[1]));
  return given.length === 0 ? path : `${path}?${new URLSearchParams(given)}`;
};

export interface JobSelection {
  panel?: string | null;
  /** The chosen circuit or run. */
  circuit?: string | null;
  run?: string | null;
  scenario?: string | null;
}

export const paths = {
  front: () => PATTERNS.front,
  about: (part: AboutPart) => `/about/${part}`,
  signUp: () => PATTERNS.signUp,
  signIn: (next?: string) => withQuery(PATTERNS.signIn, { next }),
  forgot: () => PATTERNS.forgot,
  account: () => PATTERNS.account,
  mailbox: (message?: string) => withQuery(PATTERNS.mailbox, { message }),
  inspection: () => PATTERNS.inspection,
  jobs: (firm: string) => inFirm(firm, 'jobs'),
  newJob: (firm: string) => inFirm(firm, 'jobs/new'),
  uploadJob: (firm: string) => inFirm(firm, 'jobs/upload'),
  firm: (firm: string, part: FirmPart = 'people') => inFirm(firm, `firm/${part}`),
  schedule: (firm: string, job: string, selection: JobSelection = {}) =>
    withQuery(inJob(firm, job, 'schedule'), { ...selection }),
  sizes: (firm: string, job: string, selection: JobSelection = {}) =>
    withQuery(inJob(firm, job, 'sizes'), { ...selection }),
  equations: (firm: string, job: string, selection: JobSelection = {}) =>
    withQuery(inJob(firm, job, 'equations'), { ...selection }),
  reports: (firm: string, job: string) => inJob(firm, job, 'reports'),
  settings: (firm: string, job: string) => inJob(firm, job, 'settings'),
};
