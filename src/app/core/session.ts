import { computed, inject, Injectable, signal } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { Router } from '@angular/router';
import {
  account as accountSchema,
  changeAccount,
  getAccount,
  roleSuffices,
  signIn,
  signOut,
  type Account,
  type Membership,
  type Role,
} from '@shared/contracts/people';
import { catchError, defer, of, share, tap, throwError, type Observable } from 'rxjs';
import type * as z from 'zod';
import { ApiClient } from './api-client';
import { asApiFailure } from './api-failure';
import { forget, readStored, store } from './device-storage';

const roomKey = 'lampmeadow.room';
const accountKey = 'lampmeadow.account';

/** Who is signed in, in which room they are, and what they may there. One for the whole application. */
@Injectable({ providedIn: 'root' })
export class Session {
  private readonly api = inject(ApiClient);
  private readonly router = inject(Router);
  private readonly held = signal<Account | null>(null);
  private readonly chosenRoomId = signal(readStored(roomKey));
  private isKnown = false;

  /** The person; null while nobody is signed in. */
  readonly account = this.held.asReadonly();

  /** The room the person is in: the one chosen on this device, else their first; null without any. */
  readonly room = computed<Membership | null>(() => {
    const memberships = this.held()?.memberships ?? [];
    return memberships.find(({ roomId }) => roomId === this.chosenRoomId()) ?? memberships[0] ?? null;
  });

  /** Its id; null without a room. */
  readonly roomId = computed(() => this.room()?.roomId ?? null);

  /** Its time zone; UTC without a room. */
  readonly timeZone = computed(() => this.room()?.timeZone ?? 'UTC');

  /** How the person reads temperatures. */
  readonly temperatureUnit = computed(() =>
    this.held()?.temperatureUnit === 'fahrenheit' ? ('°F' as const) : ('°C' as const),
  );

  private readonly loading = defer(() => this.api.call(getAccount)).pipe(
    catchError((error: unknown) => {
      const failure = asApiFailure(error);
      return failure.kind === 'signedOut' ? of(null) : throwError(() => failure);
    }),
    tap((account) => this.hold(account)),
    share(),
  );

  constructor() {
    this.api.signedOut.pipe(takeUntilDestroyed()).subscribe(() => this.leaveExpired());
  }

  /**
   * Finds out who is signed in, asking the server only the first time.
   *
   * @returns The person, or null when nobody is. Fails with an `ApiFailure` when the server can't be asked.
   */
  load(): Observable<Account | null> {
    return defer(() => (this.isKnown ? of(this.held()) : this.loading));
  }

  /**
   * Goes on as the person whom this device knew last, for pages that work without the server. The server is asked again
   * at the next chance; until then nothing can be written.
   *
   * @returns The person; null when nobody was signed in here.
   */
  resume(): Account | null {
    if (!this.isKnown && this.held() === null) this.held.set(keptAccount());
    return this.held();
  }

  /** Whether this device knows somebody who could go on without the server. */
  get isSomebodyKnown(): boolean {
    return this.held() !== null || keptAccount() !== null;
  }

  /** Signs in. Fails with an `ApiFailure`: `signedOut` for a wrong e-mail or password, `tooMany`, `offline`, ... */
  signIn(email: string, password: string): Observable<Account> {
    return this.api.call(signIn, { body: { email, password } }).pipe(tap((account) => this.hold(account)));
  }

  /** Signs out, and goes to the sign-in page even when the server has already forgotten this session. */
  signOut(): Observable<void> {
    return this.api.call(signOut).pipe(
      catchError((error: unknown) =>
        asApiFailure(error).kind === 'signedOut' ? of(undefined) : throwError(() => error),
      ),
      tap(() => {
        this.hold(null);
        void this.router.navigate(['/sign-in']);
      }),
    );
  }

  /** Changes the person's name, unit or theme. */
  change(changes: z.input<typeof changeAccount.body>): Observable<Account> {
    return this.api.call(changeAccount, { body: changes }).pipe(tap((account) => this.hold(account)));
  }

  /** Takes over a membership that the server has changed. */
  takeOver(changed: Membership): void {
    this.held.update(
      (account) =>
        account && {
          ...account,
          memberships: account.memberships.map((one) => (one.roomId === changed.roomId ? changed : one)),
        },
    );
  }

  /** Goes to another room of the person's; others don't exist for them and change nothing. */
  chooseRoom(roomId: string): void {
    if (this.held()?.memberships.some((membership) => membership.roomId === roomId) !== true) return;
    this.chosenRoomId.set(roomId);
    store(roomKey, roomId);
  }

  /** Whether the person may what the role may, in this room. Reads signals, so templates follow it. */
  may(needed: Role): boolean {
    const role = this.room()?.role;
    return role !== undefined && roleSuffices(role, needed);
  }

  private hold(account: Account | null): void {
    this.isKnown = true;
    this.held.set(account);
    if (account === null) forget(accountKey);
    else store(accountKey, JSON.stringify({ ...account, csrfToken: '' }));
    this.api.useCsrfToken(account?.csrfToken ?? null);
  }

  /** The server ended the session: sign in again and come back to the same page. */
  private leaveExpired(): void {
    if (this.held() === null) return;
    this.hold(null);
    void this.router.navigate(['/sign-in'], { queryParams: { to: this.router.url, ended: true } });
  }
}

function keptAccount(): Account | null {
  try {
    return accountSchema.safeParse(JSON.parse(readStored(accountKey) ?? 'null')).data ?? null;
  } catch {
    // Somebody else wrote there; then nobody is known.
    return null;
  }
}
