import type { Account, Membership } from '@shared/contracts/people';
import { usualMailChoice } from '@shared/mail/mail-choice';

/** An invented membership for specs. */
export function membership(changes: Partial<Membership> = {}): Membership {
  return {
    roomId: '0b6f6c0e-0000-4000-8000-000000000001',
    roomName: 'Kestrel Lane growing room',
    timeZone: 'Europe/Dublin',
    role: 'keeper',
    mails: usualMailChoice,
    ...changes,
  };
}

/** An invented person for specs. */
export function account(changes: Partial<Account> = {}): Account {
  return {
    id: '0b6f6c0e-0000-4000-8000-0000000000aa',
    email: 'maren@example.org',
    name: 'Maren Oxley',
    temperatureUnit: 'celsius',
    theme: 'system',
    memberships: [membership()],
    mailRefused: null,
    csrfToken: 'token-1',
    ...changes,
  };
}
