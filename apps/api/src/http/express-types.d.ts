import type { InspectionGrant, Person } from './call.ts';

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
