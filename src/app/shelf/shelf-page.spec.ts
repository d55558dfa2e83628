import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { TestbedHarnessEnvironment } from '@angular/cdk/testing/testbed';
import { TestBed } from '@angular/core/testing';
import { MatButtonHarness } from '@angular/material/button/testing';
import { MatInputHarness } from '@angular/material/input/testing';
import { NavigationEnd, provideRouter, Router, withComponentInputBinding } from '@angular/router';
import { RouterTestingHarness } from '@angular/router/testing';
import { filter, firstValueFrom } from 'rxjs';
import type { Role } from '@shared/contracts/people';
import type { ShelfDetail, ShelfReport } from '@shared/contracts/series';
import { liveSocket } from '../core/live-socket';
import { Session } from '../core/session';
import { account, membership } from '../core/testing/account-builder';
import { alert, board, boardAt, boardShelf, inventedId, planting } from '../core/testing/board-builder';
import { FakeSocket } from '../core/testing/fake-socket';
import { ShelfPage } from './shelf-page';

const room = `/api/v1/rooms/${membership().roomId}`;
const shelfId = inventedId(1);
const now = Date.parse(boardAt);

function detail(changes: Partial<ShelfDetail> = {}): ShelfDetail {
  return {
    shelf: {
      id: shelfId,
      rackId: inventedId(300),
      label: 'A1',
      position: 0,
      widthCm: 120,
      depthCm: 45,
      leafOffsetC: -1,
      lamps: [{ id: inventedId(310), kind: 'whiteLed', watts: 46, luxPerUmol: 68, fittedOn: '2026-03-02' }],
      lampHours: { switchesOn: '06:00', switchesOff: '22:00' },
      heatMat: null,
    },
    rackName: 'Rack A',
    tier: 1,
    tiers: 4,
    plantings: [planting()],
    wantedLight: null,
    wantedRanges: [
      {
        quantity: 'airTemperature',
        lampsOn: { low: 20, high: 26 },
        lampsOff: { low: 16, high: 20 },
        holdMinutes: 10,
        urgency: { by: 4, afterMinutes: 360 },
        source: 'shelf',
        clearingMargin: 0.5,
        reason: 'Where both plantings’ ranges meet',
        since: '2026-11-01T00:00:00Z',
      },
    ],
    quantities: ['airTemperature'],
    firstAt: '2026-08-23T10:00:00Z',
    ...changes,
  };
}

const report: ShelfReport = {
  statistics: [
    { quantity: 'airTemperature', min: 16.4, mean: 21.9, max: 29.1, inRange: 0.91, coverage: 0.992 },
  ],
  light: [],
  plannedLamps: [],
  measuredLamps: [],
  events: [],
};

describe('the page of a shelf', () => {
  let server: HttpTestingController;
  let socket: FakeSocket;
  let harness: RouterTestingHarness;
  let page: HTMLElement;

  beforeEach(() => jest.useFakeTimers({ now, doNotFake: ['setTimeout', 'queueMicrotask', 'nextTick'] }));
  afterEach(() => jest.useRealTimers());

  async function open(query = '', role: Role = 'grower', changes: Partial<ShelfDetail> = {}): Promise<void> {
    localStorage.clear();
    socket = new FakeSocket();
    TestBed.configureTestingModule({
      providers: [
        provideHttpClient(),
        provideHttpClientTesting(),
        provideRouter([{ path: 'shelf/:shelfId', component: ShelfPage }], withComponentInputBinding()),
        { provide: liveSocket, useValue: socket },
      ],
    });
    server = TestBed.inject(HttpTestingController);
    TestBed.inject(Session).load().subscribe();
    server.expectOne('/api/v1/account').flush(account({ memberships: [membership({ role })] }));
    harness = await RouterTestingHarness.create(`/shelf/${shelfId}${query}`);
    page = harness.routeNativeElement as HTMLElement;
    TestBed.tick();
    server.expectOne(`${room}/shelves/${shelfId}`).flush(detail(changes));
    server.expectOne(`${room}/board`).flush(board());
    server.expectOne(({ url }) => url === `${room}/alerts`).flush({ alerts: [alert()], nextCursor: null });
    server.expectOne(({ url }) => url.endsWith('/report')).flush(report);
    TestBed.tick();
    await Promise.resolve();
  }

  const answerCharts = async (points: unknown[] = [[now - 60_000, 21, 21, 21]]): Promise<URLSearchParams> => {
    TestBed.tick();
    const chart = server.expectOne(({ url }) => url.endsWith('/series/airTemperature'));
    chart.flush({
      quantity: 'airTemperature',
      lines: [{ sensorId: inventedId(700), name: 'Rack A node', resolution: 'reading', points }],
      wanted: [],
    });
    server
      .match(({ url }) => url.endsWith('/degree-days'))
      .forEach((one) =>
        one.flush({
          quantity: 'airTemperature',
          baseC: Number(one.request.params.get('baseC')),
          upperC: null,
          degreeDaysCD: 83.4,
          coverage: 0.992,
          perDay: [],
        }),
      );
    await harness.fixture.whenStable();
    return new URLSearchParams(chart.request.params.toString());
  };

  it('says where the shelf is, what grows there and what is wanted', async () => {
    await open();
    await answerCharts();
    expect(page.querySelector('h1')?.textContent).toBe('Shelf A1');
    expect(page.textContent).toContain('Rack A, top tier · 120 × 45\u00a0cm · lamp 46\u00a0W');
    expect(page.textContent).toContain('Dwarf tomato');
    expect(page.textContent).toContain('Lamps 06:00–22:00');
    expect(page.textContent).toContain('want 20–26\u00a0°C lamps on, 16–20\u00a0°C lamps off');
    expect(page.textContent).toContain('Too warm since');
  });

  it('shows the week unless the address says otherwise', async () => {
    await open();
    const asked = await answerCharts();
    expect(asked.get('from')).toBe('2026-11-25T00:00:00.000Z');
    expect(asked.get('to')).toBe(new Date(now).toISOString());
    expect(page.querySelector('[aria-pressed=true]')?.textContent?.trim()).toBe('Week');
  });

  it('shows the days in the address, and keeps a chosen span there', async () => {
    await open('?from=2026-11-01&to=2026-11-07');
    const asked = await answerCharts();
    expect([asked.get('from'), asked.get('to')]).toEqual([
      '2026-11-01T00:00:00.000Z',
      '2026-11-08T00:00:00.000Z',
    ]);
    expect(page.textContent).toContain('1 to 7 Nov 2026');
    const navigated = firstValueFrom(
      TestBed.inject(Router).events.pipe(filter((e) => e instanceof NavigationEnd)),
    );
    [...page.querySelectorAll('button')].find((one) => one.textContent?.trim() === 'Month')?.click();
    expect((await navigated).url).toBe(`/shelf/${shelfId}?span=month`);
  });

  it('has low, mean, high, time in range and coverage', async () => {
    await open();
    await answerCharts();
    const cells = [...page.querySelectorAll('app-span-table tbody td')].map((cell) => cell.textContent);
    expect(cells).toEqual(['16.4', '21.9', '29.1', '91\u00a0%', '99\u00a0%']);
  });

  it('follows the newest value as it is told', async () => {
    await open();
    await answerCharts();
    expect(page.querySelector('app-shelf-chart b')?.textContent).toBe('28.3\u00a0°C');
    const { now: told } = boardShelf();
    const measures = told.measures.map((one) => ({ ...one, value: 24.2, at: new Date(now).toISOString() }));
    socket.tell('shelf:measured', { ...told, measures });
    socket.tell('shelf:measured', { ...told, shelfId: inventedId(2), measures: [] });
    await harness.fixture.whenStable();
    expect(page.querySelector('app-shelf-chart b')?.textContent).toBe('24.2\u00a0°C');
  });

  it('offers the nearest readings where the span has none', async () => {
    await open('?from=2025-01-01&to=2025-01-07');
    await answerCharts([]);
    expect(page.textContent).toContain('No readings in this span');
    expect(page.textContent).toContain('Show 23 to 29 Aug 2026');
  });

  it('says what to do where nothing was ever measured', async () => {
    await open('', 'grower', { quantities: [], firstAt: null });
    await harness.fixture.whenStable();
    expect(page.textContent).toContain('No sensor has measured here yet');
  });

  it('counts warmth from the base in the address, and keeps another there', async () => {
    await open('?base=5');
    await answerCharts();
    expect(page.textContent).toContain('83.4\u00a0°C·d above 5\u00a0°C');
    const navigated = firstValueFrom(
      TestBed.inject(Router).events.pipe(filter((e) => e instanceof NavigationEnd)),
    );
    const base = page.querySelector<HTMLInputElement>('app-shelf-warmth input')!;
    base.value = '8';
    base.dispatchEvent(new Event('input'));
    base.dispatchEvent(new Event('change'));
    expect((await navigated).url).toBe(`/shelf/${shelfId}?base=8`);
  });

  it('takes a note and shows the report again', async () => {
    await open('', 'helper');
    await answerCharts();
    const loader = TestbedHarnessEnvironment.loader(harness.fixture);
    await (await loader.getHarness(MatButtonHarness.with({ text: /Add a note/ }))).click();
    const text = await loader.getHarness(MatInputHarness.with({ selector: 'textarea' }));
    await text.setValue(' Leaves curl ');
    await (await loader.getHarness(MatButtonHarness.with({ text: 'Note it' }))).click();
    const request = server.expectOne(`${room}/shelves/${shelfId}/events`);
    expect(request.request.body).toEqual({ kind: 'observed', text: 'Leaves curl' });
    expect(request.request.headers.get('Idempotency-Key')).toMatch(/^[0-9a-f]{32}$/);
    request.flush(
      {
        id: inventedId(600),
        shelfId,
        at: boardAt,
        kind: 'observed',
        text: 'Leaves curl',
        personName: 'Maren Oxley',
      },
      { status: 201, statusText: 'Created' },
    );
    TestBed.tick();
    expect(server.match(({ url }) => url === `${room}/board`)).toHaveLength(1);
  });

  it('lets helpers look at what is wanted, not change it', async () => {
    await open('', 'helper');
    await answerCharts();
    expect(page.querySelector('app-shelf-wants button')).toBeNull();
  });
});
