import type { FirmRole } from '@farlug/contract/route';

export interface DemoAccount {
  role: FirmRole;
  name: string;
  email: string;
  password: string;
}

/** An invented firm; it exists only where the product was started for one machine by itself. */
export const DEMO_FIRM = 'Millrace Electric';

export const DEMO_ACCOUNTS: readonly DemoAccount[] = [
  {
    role: 'admin',
    name: 'Ines Hollin',
    email: 'ines@millrace-electric.example',
    password: 'admin-at-millrace',
  },
  {
    role: 'contractor',
    name: 'Tobin Ashgrove',
    email: 'tobin@millrace-electric.example',
    password: 'contractor-at-millrace',
  },
  {
    role: 'estimator',
    name: 'Maren Quill',
    email: 'maren@millrace-electric.example',
    password: 'estimator-at-millrace',
  },
];
