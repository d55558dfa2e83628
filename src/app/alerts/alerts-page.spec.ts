import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { TestBed } from '@angular/core/testing';
import { provideRouter, withComponentInputBinding } from '@angular/router';
import { RouterTestingHarness } from '@angular/router/testing';
import type { Alert } from '@shared/contracts/alerts';
import type { Role } from '@shared/contracts/people';
import { liveSocket } from '../core/live-socket';
import { Session } from '../core/session';
import { account, membership } from '../core/testing/account-builder';
import { alert, inventedId } from '../core/testing/board-builder';
import { FakeSocket } from '../core/testing/fake-socket';
import { AlertsPage } from './alerts-page';

const address = `/api/v1/rooms/${membership().roomId}/alerts`;
const urgent = alert({ id: inventedId(901), shelfLabel: 'A3', shelfId: inventedId(3), urgency: 'goNow' });

describe('the alerts page', () => {
  let server: HttpTestingController;
  let socket: FakeSocket;
  let harness: RouterTestingHarness;

  async function open(url: string, role: Role = 'helper'): Promise<HTMLElement> {
    localStorage.clear();
    socket = new FakeSocket();
    TestBed.configureTestingModule({
      providers: [
        provideHttpClient(),
        provideHttpClientTesting(),
        provideRouter([{ path: 'alerts', component: AlertsPage }], withComponentInputBinding()),
        { provide: liveSocket, useValue: socket },
      ],
    });
    server = TestBed.inject(HttpTestingController);
    TestBed.inject(Session).load().subscribe();
    server.expectOne('/api/v1/account').flush(account({ memberships: [membership({ role })] }));
    harness = await RouterTestingHarness.create(url);
    server.expectOne(({ url: asked }) => asked.endsWith('/racks')).flush([]);
    return harness.routeNativeElement as HTMLElement;
  }

  const answer = async (open: boolean, alerts: Alert[], nextCursor: string | null = null) => {
    const request = server.expectOne(
      ({ url, params }) => url === address && (params.get('open') === 'true') === open,
    );
    request.flush({ alerts, nextCursor });
    await harness.fixture.whenStable();
    return request.request;
  };
  const titles = (page: HTMLElement): (string | undefined)[] =>
    [...page.querySelectorAll('app-alert-card h2')].map((title) => title.textContent?.trim().slice(0, 2));
  const press = async (page: HTMLElement, text: string): Promise<void> => {
    const button = [...page.querySelectorAll('button')].find((one) => one.textContent?.trim() === text);
    if (button === undefined) throw new Error(`No button ${text}`);
    button.click();
    await harness.fixture.whenStable();
  };

  it('lists what is open with words and advice, urgent first', async () => {
    const page = await open('/alerts');
    await answer(true, [alert(), urgent]);
    expect(titles(page)).toEqual(['A3', 'A1']);
    expect(page.textContent).toContain('Too warm since');
    expect(page.textContent).toContain('raise it or open the vent');
    expect(page.textContent).toContain('mail sent');
  });

  it('follows what is told: a new alert appears, one that cleared goes', async () => {
    const page = await open('/alerts');
    await answer(true, [alert()]);
    socket.tell('alert:changed', alert({ id: inventedId(902), shelfLabel: 'B2' }));
    socket.tell('alert:changed', alert({ clearedAt: '2026-12-01T14:20:00Z' }));
    await harness.fixture.whenStable();
    expect(titles(page)).toEqual(['B2']);
  });

  it('says when nothing needs a look', async () => {
    const page = await open('/alerts');
    await answer(true, []);
    expect(page.textContent).toContain('Nothing needs a look');
  });

  it('takes an acknowledgement with a note, and shows who has seen it', async () => {
    const page = await open('/alerts');
    await answer(true, [alert()]);
    await press(page, 'Acknowledge');
    const note = page.querySelector('input')!;
    note.value = ' Vent opened ';
    await press(page, 'I have seen it');
    const request = server.expectOne(`${address}/${alert().id}/acknowledgement`);
    expect(request.request.body).toEqual({ note: 'Vent opened' });
    request.flush(
      alert({
        acknowledgedAt: '2026-12-01T14:20:00Z',
        acknowledgedByName: 'Maren Oxley',
        acknowledgeNote: 'Vent opened',
      }),
    );
    await harness.fixture.whenStable();
    expect(page.textContent).toContain('Seen by Maren Oxley');
    expect(page.textContent).toContain('“Vent opened”');
  });

  it('lets a viewer read, not acknowledge', async () => {
    const page = await open('/alerts', 'viewer');
    await answer(true, [alert()]);
    expect(titles(page)).toEqual(['A1']);
    expect(page.textContent).not.toContain('Acknowledge');
  });

  it('pages through the history of one shelf', async () => {
    const page = await open(`/alerts?show=all&shelf=${inventedId(1)}`);
    server.expectOne(({ params }) => params.get('open') === 'true').flush({ alerts: [], nextCursor: null });
    const first = await answer(false, [alert()], 'next');
    expect(first.params.get('shelfId')).toBe(inventedId(1));
    await press(page, 'Show earlier alerts');
    const second = await answer(false, [alert({ id: inventedId(903) })]);
    expect(second.params.get('cursor')).toBe('next');
    expect(titles(page)).toHaveLength(2);
    expect(page.textContent).not.toContain('Show earlier alerts');
  });

  it('says why it could not be loaded, and tries again', async () => {
    const page = await open('/alerts');
    server.expectOne(({ url }) => url === address).flush(null, { status: 503, statusText: 'x' });
    await harness.fixture.whenStable();
    await press(page, 'Try again');
    await answer(true, [alert()]);
    expect(titles(page)).toEqual(['A1']);
  });
});
