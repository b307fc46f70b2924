import type { InspectionGrant, Person } from '../platform/caller.ts';

declare global {
  namespace Express {
    interface User extends Person {}
  }
}

declare module 'express-session' {
  interface SessionData {
    inspection: InspectionGrant;
  }
}
