import type { FirmRole } from '@farlug/contract/route';

export const ROLE_NAMES: Record<FirmRole, string> = {
  admin: 'Administrator',
  contractor: 'Contractor',
  estimator: 'Estimator',
};
export const ROLE_DUTIES: Record<FirmRole, string> = {
  admin: 'People, presets, defaults and wording, and all that a contractor does.',
  contractor: 'Enters and fixes jobs, issues and sends reports, records decisions.',
  estimator: 'Enters jobs and compares sizes; issues nothing.',
};
