import type { FirmRole } from '@farlug/contract/route';

export interface Person {
  id: string;
  name: string;
  email: string;
}

/** A signed-in person as one firm knows them. */
export interface Member {
  firmId: string;
  role: FirmRole;
  person: Person;
}

/** What an opened inspection link left in the browser's session. */
export interface InspectionGrant {
  firmId: string;
  jobId: string;
  deliveryId: string;
  epoch: number;
}
