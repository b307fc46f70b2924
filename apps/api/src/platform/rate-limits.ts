/** At most `hits` in `windowS` seconds from one address, or by one person where somebody is signed in. */
export interface RateLimit {
  hits: number;
  windowS: number;
  /** A further bound on one e-mail address, whoever asks from wherever. */
  hitsPerEmail?: number;
  /** Count only what is refused: a person who knows the password may come back as often as they like. */
  refusalsOnly?: true;
}

const QUARTER_HOUR = 900;
const HOUR = 3600;

/** One per route that answers `too_many`; the frame refuses to mount such a route without. */
export const RATE_LIMITS = {
  signUp: { hits: 20, windowS: HOUR },
  signIn: { hits: 60, windowS: QUARTER_HOUR, hitsPerEmail: 10, refusalsOnly: true },
  requestPasswordReset: { hits: 20, windowS: HOUR, hitsPerEmail: 5 },
  resetPassword: { hits: 30, windowS: QUARTER_HOUR },
  readInvitation: { hits: 60, windowS: QUARTER_HOUR },
  acceptInvitation: { hits: 30, windowS: QUARTER_HOUR },
  changePassword: { hits: 10, windowS: QUARTER_HOUR },
  inviteMember: { hits: 100, windowS: HOUR },
  readSchedule: { hits: 60, windowS: QUARTER_HOUR },
  sendRevision: { hits: 100, windowS: HOUR },
  openInspection: { hits: 60, windowS: QUARTER_HOUR },
  recordDecision: { hits: 60, windowS: HOUR },
} satisfies Record<string, RateLimit>;

export type RateLimits = Readonly<Record<string, RateLimit>>;
