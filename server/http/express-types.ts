import 'express-session';
import type { SignedInPerson } from './route';

declare global {
  // eslint-disable-next-line @typescript-eslint/no-namespace -- the only way to tell Express what passport puts there
  namespace Express {
    // eslint-disable-next-line @typescript-eslint/no-empty-object-type -- declared by merging
    interface User extends SignedInPerson {}
  }
}

declare module 'express-session' {
  interface SessionData {
    csrfToken: string;
  }
}
