import { provideHttpClient, type HttpParams } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { TestBed } from '@angular/core/testing';
import { provideRouter, Router, withComponentInputBinding } from '@angular/router';
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
    if (role !== 'viewer') server.expectOne(({ url: asked }) => asked.endsWith('/members')).flush([]);
    return harness.routeNativeElement as HTMLElement;
  }

  const answer = async (isOpen: boolean, alerts: Alert[], nextCursor: string | null = null) => {
    const request = server.expectOne(
      ({ url, params }) => url === address && (params.get('open') === 'true') === isOpen,
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
    expect(page.textContent).toContain('Mail written');
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

  it('puts what is quiet last, however urgent', async () => {
    const page = await open('/alerts');
    const until = new Date(Date.now() + 3_600_000).toISOString();
    const quiet = { until, setAt: '2026-12-01T14:10:00Z', setByName: 'Jo Ashdown' };
    await answer(true, [alert({ ...urgent, quiet }), alert()]);
    expect(titles(page)).toEqual(['A1', 'A3']);
  });

  it('shows at once what somebody did about an alert', async () => {
    const page = await open('/alerts');
    await answer(true, [alert()]);
    await press(page, 'Acknowledge');
    server
      .expectOne(`${address}/${alert().id}/acknowledgement`)
      .flush(alert({ acknowledgedAt: '2026-12-01T14:20:00Z', acknowledgedByName: 'Maren Oxley' }));
    await harness.fixture.whenStable();
    expect(page.textContent).toContain('Seen by Maren Oxley');
  });

  it('lets a viewer read, not acknowledge', async () => {
    const page = await open('/alerts', 'viewer');
    await answer(true, [alert()]);
    expect(titles(page)).toEqual(['A1']);
    expect(page.textContent).not.toContain('Acknowledge');
  });

  describe('with those that are over', () => {
    const counts = {
      total: 2,
      byShelf: [{ shelfId: inventedId(1), shelfLabel: 'A1', count: 2 }],
      byKind: [
        { kind: 'aboveRange', count: 2 },
        { kind: 'lampDark', count: 1 },
      ],
      byMonth: [{ month: '2026-12', count: 2 }],
    };
    const over = { endedAt: '2026-12-01T14:16:00Z', clearedAt: '2026-12-01T14:21:00Z' };

    /** Opens them at an address, and answers what is asked. */
    async function openAll(
      query: string,
      first: Alert[],
      nextCursor: string | null = null,
    ): Promise<{ page: HTMLElement; asked: HttpParams }> {
      const page = await open(`/alerts?show=all${query}`);
      server.expectOne(({ url }) => url.endsWith('/alert-counts')).flush(counts);
      return { page, asked: (await answer(false, first, nextCursor)).params };
    }

    it('pages through those that the address asks for', async () => {
      const shelf = inventedId(1);
      const { page, asked } = await openAll(
        `&shelf=${shelf}&kind=aboveRange&month=2026-12`,
        [alert(over)],
        'next',
      );
      const filter = { shelfId: shelf, kind: 'aboveRange', month: '2026-12' };
      for (const [name, value] of Object.entries(filter))
        expect([name, asked.get(name)]).toEqual([name, value]);
      await press(page, 'Show earlier alerts');
      const second = await answer(false, [alert({ ...over, id: inventedId(903) })]);
      expect(second.params.get('cursor')).toBe('next');
      expect(second.params.get('kind')).toBe('aboveRange');
      expect(titles(page)).toHaveLength(2);
      expect(page.textContent).not.toContain('Show earlier alerts');
    });

    it('tells how many there were, and narrows the list to what is pressed', async () => {
      const { page } = await openAll('', [alert(over)]);
      expect(page.querySelector('.total')?.textContent).toContain('2 alerts');
      const kinds = [...page.querySelectorAll<HTMLElement>('app-alert-facets button')];
      expect(kinds.map((one) => one.textContent?.trim())).toEqual([
        'December 2026 2 alerts',
        'A1 2 alerts',
        'Above the wanted range 2 alerts',
        'Dark when lit was planned 1 alert',
      ]);
      const press = async (): Promise<HttpParams> => {
        kinds.at(-1)?.click();
        // Until the router has been there; what it asks for then keeps the page from being stable.
        await new Promise((resolve) => setTimeout(resolve));
        TestBed.tick();
        server.expectOne(({ url }) => url.endsWith('/alert-counts')).flush(counts);
        return (await answer(false, [])).params;
      };
      expect((await press()).get('kind')).toBe('lampDark');
      expect(TestBed.inject(Router).url).toBe('/alerts?show=all&kind=lampDark');
      expect(page.textContent).toContain('No alert like that');
      expect((await press()).get('kind')).toBeNull();
      expect(TestBed.inject(Router).url).toBe('/alerts?show=all');
    });

    it('says plainly what was found later', async () => {
      const { page } = await openAll('', [alert({ ...over, foundLater: true, toldAt: null })]);
      expect(page.querySelector('.later')?.textContent).toBe('Found later');
      expect(page.textContent).toContain('when readings were brought in; nobody was written to');
    });

    it('takes over an alert that opens only if the filter lets it through', async () => {
      const { page } = await openAll('&kind=lampDark', []);
      socket.tell('alert:changed', alert());
      await harness.fixture.whenStable();
      expect(titles(page)).toEqual([]);
      socket.tell('alert:changed', alert({ kind: 'lampDark' }));
      await harness.fixture.whenStable();
      expect(titles(page)).toEqual(['A1']);
    });
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
