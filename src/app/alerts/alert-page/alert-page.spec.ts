import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { TestBed } from '@angular/core/testing';
import { provideRouter, withComponentInputBinding } from '@angular/router';
import { RouterTestingHarness } from '@angular/router/testing';
import { liveSocket } from '../../core/live-socket';
import { Session } from '../../core/session';
import { account, membership } from '../../core/testing/account-builder';
import { alert, inventedId } from '../../core/testing/board-builder';
import { FakeSocket } from '../../core/testing/fake-socket';
import { AlertPage } from './alert-page';

const room = `/api/v1/rooms/${membership().roomId}`;
const address = `${room}/alerts/${alert().id}`;
const over = alert({
  beganAt: '2025-12-01T14:00:00Z',
  openedAt: '2025-12-01T14:10:00Z',
  toldAt: '2025-12-01T14:11:00Z',
  peakAt: '2025-12-01T15:00:00Z',
  endedAt: '2025-12-01T16:00:00Z',
  clearedAt: '2025-12-01T16:10:00Z',
});

describe('the page of an alert', () => {
  let server: HttpTestingController;
  let socket: FakeSocket;
  let harness: RouterTestingHarness;
  let page: HTMLElement;

  beforeEach(async () => {
    localStorage.clear();
    socket = new FakeSocket();
    TestBed.configureTestingModule({
      providers: [
        provideHttpClient(),
        provideHttpClientTesting(),
        provideRouter([{ path: 'alerts/:alertId', component: AlertPage }], withComponentInputBinding()),
        { provide: liveSocket, useValue: socket },
      ],
    });
    server = TestBed.inject(HttpTestingController);
    TestBed.inject(Session).load().subscribe();
    server.expectOne('/api/v1/account').flush(account());
    harness = await RouterTestingHarness.create(`/alerts/${alert().id}`);
    page = harness.routeNativeElement as HTMLElement;
    TestBed.tick();
    server.expectOne(`${room}/members`).flush([]);
    server
      .match(({ url }) => url === `${room}/alerts`)
      .forEach((one) => one.flush({ alerts: [], nextCursor: null }));
  });

  const told = (): void =>
    server.expectOne(`${address}/time-line`).flush({
      mails: [
        {
          personName: 'Jo Ashdown',
          reason: 'opened',
          writtenAt: '2025-12-01T14:10:00Z',
          sentAt: '2025-12-01T14:11:00Z',
          refusedAt: null,
          dueAt: null,
          attempts: 1,
        },
      ],
      quiets: [],
      assignments: [],
    });

  /** Answers the chart with no readings, and waits. */
  const drawn = async (): Promise<void> => {
    await Promise.resolve();
    TestBed.tick();
    server
      .match(({ url }) => url.includes('/series/'))
      .forEach((one) => one.flush({ quantity: 'airTemperature', lines: [], wanted: [] }));
    await harness.fixture.whenStable();
  };

  it('draws the quantity around a past alert, and leads to the shelf on those days', async () => {
    server.expectOne(address).flush(over);
    told();
    await Promise.resolve();
    TestBed.tick();
    const request = server.expectOne(
      `${room}/shelves/${over.shelfId}/series/airTemperature?from=2025-12-01T13:00:00.000Z&to=2025-12-01T17:00:00.000Z`,
    );
    request.flush({
      quantity: 'airTemperature',
      lines: [
        {
          sensorId: inventedId(700),
          name: 'Rack A node',
          resolution: 'reading',
          points: [[Date.parse(over.beganAt), 27, 27, 27]],
        },
      ],
      wanted: [],
    });
    await harness.fixture.whenStable();
    expect(page.textContent).toContain('Around this alert');
    const steps = [...page.querySelectorAll('ol li > span')].map((step) => step.textContent);
    expect(steps).toEqual([
      'Began',
      'Alert opened',
      'Mail that it opened, to Jo Ashdown',
      'Farthest off: 28.3\u00a0°C',
      'Back where it should be',
      'Over',
    ]);
    expect(page.querySelector('a.shelf')?.getAttribute('href')).toBe(
      `/shelf/${over.shelfId}?from=2025-12-01&to=2025-12-01`,
    );
  });

  it('is fetched again when the alert changes', async () => {
    server.expectOne(address).flush(over);
    told();
    await drawn();
    socket.tell('alert:changed', alert({ id: inventedId(999) }));
    TestBed.tick();
    server.expectNone(address);
    socket.tell('alert:changed', over);
    TestBed.tick();
    told();
    server
      .expectOne(address)
      .flush({ ...over, acknowledgedAt: '2025-12-01T15:00:00Z', acknowledgedByName: 'Jo Ashdown' });
    await harness.fixture.whenStable();
    expect(page.textContent).toContain('Seen by Jo Ashdown');
  });

  it('tells what it knows when the mails can’t be fetched, and tries again', async () => {
    server.expectOne(address).flush(over);
    server.expectOne(`${address}/time-line`).flush(null, { status: 503, statusText: 'x' });
    await drawn();
    expect(page.querySelectorAll('ol li')).toHaveLength(5);
    [...page.querySelectorAll('button')]
      .find(({ textContent }) => textContent?.trim() === 'Try again')
      ?.click();
    TestBed.tick();
    told();
    await harness.fixture.whenStable();
    expect(page.querySelectorAll('ol li')).toHaveLength(6);
  });

  it('of another room says that it is not there', async () => {
    server.expectOne(address).flush(null, { status: 404, statusText: 'x' });
    server.expectOne(`${address}/time-line`).flush(null, { status: 404, statusText: 'x' });
    await harness.fixture.whenStable();
    expect(page.textContent).toContain('no longer there, or you are not a member of its room');
  });
});
