import 'express-session';
import type { SignedInPerson } from './route';

declare global {
  namespace Express {
    interface User extends SignedInPerson {}
  }
}

declare module 'express-session' {
  interface SessionData {
    csrfToken: string;
  }
}
