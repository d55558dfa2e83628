import { Location } from '@angular/common';
import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { Component } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { provideRouter, Router } from '@angular/router';
import { getAccount } from '@shared/contracts/people';
import type { Account } from '@shared/contracts/people';
import { account, membership } from './testing/account-builder';
import { ApiClient } from './api-client';
import { Session } from './session';
import { signedInGuard, signedOutGuard } from './signed-in-guard';

@Component({ template: '' })
class Page {}

const second = membership({
  roomId: '0b6f6c0e-0000-4000-8000-000000000002',
  roomName: 'Cellar',
  role: 'viewer',
});
const wrong = { status: 401, statusText: 'Unauthorized' };

describe('the session', () => {
  let session: Session;
  let server: HttpTestingController;
  let router: Router;

  beforeEach(() => {
    localStorage.clear();
    TestBed.configureTestingModule({
      providers: [
        provideHttpClient(),
        provideHttpClientTesting(),
        provideRouter([
          { path: 'sign-in', component: Page, canActivate: [signedOutGuard] },
          { path: 'unreachable', component: Page },
          { path: '**', component: Page, canActivate: [signedInGuard] },
        ]),
      ],
    });
    session = TestBed.inject(Session);
    server = TestBed.inject(HttpTestingController);
    router = TestBed.inject(Router);
  });
  afterEach(() => server.verify());

  function signedInAs(person: Account): void {
    session.load().subscribe();
    server.expectOne('/api/v1/account').flush(person);
  }

  async function visit(url: string, answer: (server: HttpTestingController) => void): Promise<void> {
    const arrival = router.navigateByUrl(url);
    await new Promise((routed) => setTimeout(routed));
    answer(server);
    await arrival;
  }

  it('asks once who is signed in, however many want to know', () => {
    const told: (Account | null)[] = [];
    session.load().subscribe((person) => told.push(person));
    session.load().subscribe((person) => told.push(person));
    server.expectOne('/api/v1/account').flush(account());
    session.load().subscribe((person) => told.push(person));
    expect(told.map((person) => person?.name)).toEqual(['Maren Oxley', 'Maren Oxley', 'Maren Oxley']);
  });

  it('without a session holds nobody and lets nobody do anything', () => {
    session.load().subscribe();
    server.expectOne('/api/v1/account').flush(null, wrong);
    expect(session.account()).toBeNull();
    expect(session.roomId()).toBeNull();
    expect(session.may('viewer')).toBe(false);
  });

  it('asks again after the server could not be reached', () => {
    let failures = 0;
    session.load().subscribe({ error: () => (failures += 1) });
    server.expectOne('/api/v1/account').error(new ProgressEvent('error'));
    expect(failures).toBe(1);
    signedInAs(account());
    expect(session.account()?.name).toBe('Maren Oxley');
  });

  it('gives a role all that the roles below it may', () => {
    signedInAs(account({ memberships: [membership({ role: 'grower' })] }));
    expect((['viewer', 'helper', 'grower', 'keeper'] as const).map((role) => session.may(role))).toEqual([
      true,
      true,
      true,
      false,
    ]);
  });

  it('goes to a chosen room and remembers it, but not to a room of others', () => {
    signedInAs(account({ memberships: [membership(), second] }));
    expect(session.room()?.roomName).toBe('Kestrel Lane growing room');
    session.chooseRoom(second.roomId);
    expect(session.room()?.roomName).toBe('Cellar');
    expect(session.may('helper')).toBe(false);
    session.chooseRoom('0b6f6c0e-0000-4000-8000-0000000000ff');
    expect(session.room()?.roomName).toBe('Cellar');
    expect(localStorage.getItem('lampmeadow.room')).toBe(second.roomId);
  });

  it('reads temperatures as the person wants them', () => {
    signedInAs(account());
    expect(session.temperatureUnit()).toBe('°C');
    session.change({ temperatureUnit: 'fahrenheit' }).subscribe();
    const change = server.expectOne('/api/v1/account');
    expect(change.request.headers.get('X-CSRF-Token')).toBe('token-1');
    change.flush(account({ temperatureUnit: 'fahrenheit' }));
    expect(session.temperatureUnit()).toBe('°F');
  });

  it('takes over a changed membership and leaves the others', () => {
    signedInAs(account({ memberships: [membership(), second] }));
    session.takeOver({ ...second, mails: { ...second.mails, cleared: true } });
    expect(session.account()?.memberships.map((one) => one.mails.cleared)).toEqual([false, true]);
  });

  it('signs in, and goes to the sign-in page after signing out', async () => {
    session.signIn('maren@example.org', 'a long enough secret').subscribe();
    server.expectOne('/api/v1/session').flush(account());
    expect(session.account()?.email).toBe('maren@example.org');
    session.signOut().subscribe();
    server.expectOne('/api/v1/session').flush(null, { status: 204, statusText: 'No Content' });
    await router.navigateByUrl('/sign-in');
    expect(session.account()).toBeNull();
    expect(router.url).toBe('/sign-in');
  });

  it('that the server has ended leads to signing in and back to the same page', async () => {
    await visit('/alerts', (s) => s.expectOne('/api/v1/account').flush(account()));
    TestBed.inject(ApiClient)
      .call(getAccount)
      .subscribe({ error: () => undefined });
    server.expectOne('/api/v1/account').flush(null, wrong);
    await new Promise((done) => setTimeout(done));
    expect(router.url).toBe('/sign-in?to=%2Falerts&ended=true');
  });

  describe('guarding a page', () => {
    it('keeps the address that was asked for', async () => {
      await visit('/shelf/a1?span=week', (s) => s.expectOne('/api/v1/account').flush(null, wrong));
      expect(router.url).toBe('/sign-in?to=%2Fshelf%2Fa1%3Fspan%3Dweek');
    });

    it('shows that the server is out of reach without changing the address', async () => {
      await visit('/alerts', (s) => s.expectOne('/api/v1/account').error(new ProgressEvent('error')));
      expect(router.url).toContain('/unreachable?to=%2Falerts');
      expect(TestBed.inject(Location).path()).toBe('');
    });

    it('chooses the room that the address names', async () => {
      await visit(`/alerts?room=${second.roomId}`, (s) =>
        s.expectOne('/api/v1/account').flush(account({ memberships: [membership(), second] })),
      );
      expect(session.room()?.roomName).toBe('Cellar');
    });

    it('sends a person who is signed in on from the sign-in page, never elsewhere', async () => {
      signedInAs(account());
      await router.navigateByUrl('/sign-in?to=//elsewhere.example');
      expect(router.url).toBe('/room');
    });
  });
});
