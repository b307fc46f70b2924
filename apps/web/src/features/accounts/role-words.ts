import type { FirmRole } from '@farlug/contract/route';

export const ROLE_WORDS: Record<FirmRole, string> = {
  admin: 'administrator',
  contractor: 'contractor',
  estimator: 'estimator',
};

/** What each role is for, said where a person is invited. */
export const ROLE_DUTIES: Record<FirmRole, string> = {
  admin: 'people, presets, defaults and wording, and all that a contractor does',
  contractor: 'enters and fixes jobs, issues and sends reports, records decisions',
  estimator: 'enters jobs and compares sizes; issues nothing',
};
