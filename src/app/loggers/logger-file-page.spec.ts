import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { TestbedHarnessEnvironment } from '@angular/cdk/testing/testbed';
import { TestBed } from '@angular/core/testing';
import { MatButtonHarness } from '@angular/material/button/testing';
import { MATERIAL_ANIMATIONS } from '@angular/material/core';
import { MatDialogHarness } from '@angular/material/dialog/testing';
import { MatRadioButtonHarness } from '@angular/material/radio/testing';
import { MatSelectHarness } from '@angular/material/select/testing';
import { provideRouter, withComponentInputBinding } from '@angular/router';
import { RouterTestingHarness } from '@angular/router/testing';
import type { LoggerFileDetail } from '@shared/contracts/logger-files';
import type { Role } from '@shared/contracts/people';
import { liveSocket } from '../core/live-socket';
import { Session } from '../core/session';
import { account, membership } from '../core/testing/account-builder';
import { board, boardShelf, inventedId } from '../core/testing/board-builder';
import { FakeSocket } from '../core/testing/fake-socket';
import { LoggerFilePage } from './logger-file-page';
import { fileSeries, loggerFile, loggerFileDetail, loggerFileResult } from './testing/logger-file-builder';

const room = `/api/v1/rooms/${membership().roomId}`;
const file = `${room}/logger-files/${loggerFile().id}`;
const shelfId = inventedId(3);
const sensor = (number: number) => ({
  id: inventedId(number),
  deviceId: inventedId(400),
  key: `k${number}`,
  quantity: 'rootZoneTemperature',
  expectedIntervalS: 300,
  lightThreshold: null,
  shelfId,
  latestAt: null,
});
const devices = [
  {
    id: inventedId(400),
    name: 'Rack A node',
    lastSeenAt: null,
    batteryPct: null,
    revokedAt: null,
    sensors: [sensor(702), sensor(703)],
  },
];

describe('a logger file on its way in', () => {
  let server: HttpTestingController;
  let socket: FakeSocket;
  let harness: RouterTestingHarness;
  let page: HTMLElement;

  async function open(
    detail: LoggerFileDetail,
    role: Role = 'grower',
    meanwhile: () => void = () => undefined,
  ): Promise<void> {
    localStorage.clear();
    socket = new FakeSocket();
    TestBed.configureTestingModule({
      providers: [
        provideHttpClient(),
        provideHttpClientTesting(),
        provideRouter([{ path: 'loggers/:fileId', component: LoggerFilePage }], withComponentInputBinding()),
        { provide: liveSocket, useValue: socket },
        { provide: MATERIAL_ANIMATIONS, useValue: { animationsDisabled: true } },
      ],
    });
    server = TestBed.inject(HttpTestingController);
    TestBed.inject(Session).load().subscribe();
    server.expectOne('/api/v1/account').flush(account({ memberships: [membership({ role })] }));
    harness = await RouterTestingHarness.create(`/loggers/${detail.id}`);
    meanwhile();
    server.expectOne(file).flush(detail);
    const racks = [
      { id: inventedId(300), name: 'Rack A', note: '', shelves: [boardShelf({ id: shelfId, label: 'A3' })] },
    ];
    server.expectOne(`${room}/board`).flush(board({ racks }));
    server.expectOne(`${room}/devices`).flush(devices);
    await harness.fixture.whenStable();
    page = harness.routeNativeElement as HTMLElement;
  }

  const press = async (text: string): Promise<void> => {
    const button = [...page.querySelectorAll('button')].find((one) => one.textContent?.trim() === text);
    if (button === undefined) throw new Error(`No button ${text} in ${page.textContent}`);
    button.click();
    await harness.fixture.whenStable();
  };
  const answerMatch = async (body: object, changes: Partial<LoggerFileDetail> = {}): Promise<void> => {
    const request = server.expectOne(`${file}/matches`);
    expect(request.request.body).toEqual(body);
    request.flush(loggerFileDetail(changes));
    await harness.fixture.whenStable();
  };
  const step = (): string | undefined => page.querySelector('[aria-current=step] span')?.textContent?.trim();

  it('shows the proposal with its reason and sends another choice', async () => {
    await open(loggerFileDetail());
    expect(step()).toBe('Match columns');
    expect(page.textContent).toContain('names the shelf “A3”');
    expect(page.textContent).toContain('→ 19.39');
    const loader = TestbedHarnessEnvironment.loader(harness.fixture);
    const select = await loader.getHarness(MatSelectHarness.with({ ancestor: 'app-series-choice' }));
    expect(await select.getValueText()).toBe('A3 root zone');
    await select.clickOptions({ text: /New sensor on A3/ });
    await answerMatch(
      { series: [{ key: '1', sensorId: null, newSensor: { shelfId } }] },
      { series: [fileSeries({ sensorId: null, newSensor: { shelfId } })] },
    );
    expect(await select.getValueText()).toBe('New sensor on A3');
  });

  it('asks what only the person knows, and can’t be checked before', async () => {
    const question = {
      code: 'AMBIGUOUS_DAY_MONTH',
      text: 'Day or month first?',
      column: 0,
      options: [
        { value: 'dayFirst', label: '1 November' },
        { value: 'monthFirst', label: '11 January' },
      ],
      answer: 'dayFirst',
    };
    await open(loggerFileDetail({ questions: [question] }));
    expect(page.textContent).toContain('Answer the question above first.');
    const loader = TestbedHarnessEnvironment.loader(harness.fixture);
    await (await loader.getHarness(MatRadioButtonHarness.with({ label: /11 January/ }))).check();
    await answerMatch(
      { dateOrder: 'monthFirst' },
      { questions: [{ ...question, answer: 'monthFirst' }], timeFormat: 'monthFirst' },
    );
    expect(page.textContent).not.toContain('Answer the question above first.');
  });

  it('takes all proposals at once', async () => {
    await open(loggerFileDetail({ series: [fileSeries({ sensorId: null })] }));
    expect(page.textContent).toContain('Say of at least one column which sensor it is.');
    await press('Take the proposals');
    await answerMatch({ series: [{ key: '1', sensorId: inventedId(702) }] });
    expect(page.textContent).not.toContain('Take the proposals');
    expect(page.textContent).not.toContain('Say of at least one column');
  });

  it('needs no answer about dates where a profile has one', async () => {
    const question = {
      code: 'AMBIGUOUS_DAY_MONTH',
      text: 'Which?',
      column: 0,
      options: [],
      answer: 'dayFirst',
    };
    await open(loggerFileDetail({ questions: [question], profileId: inventedId(1100) }));
    expect(page.textContent).not.toContain('Answer the question above first.');
  });

  it('is checked with progress that is told live, and says what it found', async () => {
    await open(loggerFileDetail());
    await press('Check all lines');
    server.expectOne(`${file}/check`).flush(loggerFile({ status: 'checking' }));
    await harness.fixture.whenStable();
    expect(step()).toBe('Check');
    socket.tell(
      'loggerFile:changed',
      loggerFile({ status: 'checking', progress: { done: 498_073, total: 1_992_294 } }),
    );
    await harness.fixture.whenStable();
    expect(page.textContent).toContain('24 % of 2.0\u00a0MB');

    const result = loggerFileResult({ rejected: 0, rejectedByCode: {} });
    socket.tell('loggerFile:changed', loggerFile({ status: 'checked', result }));
    await harness.fixture.whenStable();
    expect(page.textContent).toContain('Bring in 120\u202f214 readings');
  });

  it('says what no shelf would show, and reads again once the sensor is known to have been there', async () => {
    const off = {
      sensorId: inventedId(702),
      when: 'beforeFirstShelf',
      count: 1440,
      from: '2026-11-01T00:00:00Z',
      to: '2026-11-01T23:59:00Z',
      firstShelf: { label: 'A3', since: '2026-11-02T00:00:00Z' },
    } as const;
    const result = loggerFileResult({ rejected: 0, rejectedByCode: {}, offShelf: [off] });
    await open(loggerFileDetail({ status: 'checked', result }));
    expect(page.textContent).toContain(
      '1\u202f440 readings of A3 root zone (Sun 1 Nov, 00:00 to Sun 1 Nov, 23:59) will show on no shelf: the sensor is on A3 only since Mon 2 Nov, 00:00.',
    );
    await press('It was there already');
    const loader = TestbedHarnessEnvironment.documentRootLoader(harness.fixture);
    const dialog = await loader.getHarness(MatDialogHarness);
    expect(await dialog.getText()).toContain(
      'A3 root zone then counts as on shelf A3 since Sun 1 Nov, 00:00.',
    );
    await (await dialog.getHarness(MatButtonHarness.with({ text: 'It was there' }))).click();
    const placed = server.expectOne(`${room}/sensors/${inventedId(702)}/placements/first`);
    expect(placed.request.body).toEqual({ since: '2026-11-01T00:00:00Z' });
    server.expectNone(`${file}/check`);
    placed.flush(sensor(702));
    server.expectOne(`${file}/check`).flush(loggerFile({ status: 'checking' }));
    await harness.fixture.whenStable();
    expect(step()).toBe('Check');
  });

  it('leaves a sensor where it is when only a keeper can say where it was', async () => {
    const off = {
      sensorId: inventedId(702),
      when: 'neverOnShelf',
      count: 1,
      from: '2026-11-01T00:00:00Z',
      to: '2026-11-01T00:00:00Z',
      firstShelf: null,
    } as const;
    const result = loggerFileResult({ rejected: 0, rejectedByCode: {}, offShelf: [off] });
    await open(loggerFileDetail({ status: 'checked', result }));
    expect(page.textContent).toContain('1 reading of A3 root zone (Sun 1 Nov, 00:00) will show on no shelf');
    expect(page.textContent).not.toContain('there already');
  });

  it('brings in what was chosen for differing values', async () => {
    const result = loggerFileResult({ rejected: 0, rejectedByCode: {} });
    await open(loggerFileDetail({ status: 'checked', result }));
    const loader = TestbedHarnessEnvironment.loader(harness.fixture);
    await (await loader.getHarness(MatRadioButtonHarness.with({ label: /Replace/ }))).check();
    await press('Bring in 120\u202f226 readings');
    const request = server.expectOne(`${file}/bring-in`);
    expect(request.request.body).toEqual({ differing: 'replace' });
    request.flush(loggerFile({ status: 'bringingIn', result }));
    await harness.fixture.whenStable();
    expect(step()).toBe('Bring in');
    await press('Stop');
    const working = { status: 'bringingIn', result, isStopping: true } as const;
    server.expectOne(`${file}/cancel`).flush(loggerFile(working));
    await harness.fixture.whenStable();
    expect(page.querySelector('app-file-progress [role=status]')?.textContent).toContain('Stopping');
    expect(page.querySelector<HTMLButtonElement>('app-file-progress button')?.disabled).toBe(true);
    socket.tell('loggerFile:changed', loggerFile({ status: 'cancelled' }));
    await harness.fixture.whenStable();
    expect(page.textContent).toContain('Nothing was stored');
    expect(step()).toBe('Match columns');
  });

  it('goes back to the columns and is checked again', async () => {
    await open(
      loggerFileDetail({ status: 'checked', result: loggerFileResult({ rejected: 0, rejectedByCode: {} }) }),
    );
    await press('Back to the columns');
    expect(step()).toBe('Match columns');
    await press('Check all lines');
    server.expectOne(`${file}/check`).flush(loggerFile({ status: 'checking' }));
    await harness.fixture.whenStable();
    expect(step()).toBe('Check');
  });

  it('once in, leads to the shelf on the days of the file', async () => {
    const result = loggerFileResult({ rejected: 0, rejectedByCode: {} });
    await open(loggerFileDetail({ status: 'broughtIn', result, differing: 'keep' }));
    expect(page.textContent).toContain('120\u202f214 readings brought in');
    const link = page.querySelector('app-bring-in-result a[href*=shelf]')?.getAttribute('href');
    expect(link).toBe(`/shelf/${shelfId}?from=2026-11-01&to=2026-11-28`);
  });

  it('that was refused says why and where, and offers another', async () => {
    const failure = {
      code: 'SPREADSHEET_FILE',
      message: 'This is a spreadsheet. Save it as CSV.',
      line: 1,
      column: null,
    };
    await open(loggerFileDetail({ status: 'failed', failure, columns: [], series: [], preview: [] }));
    expect(page.textContent).toContain('This is a spreadsheet. Save it as CSV. (line 1) Nothing was stored.');
    expect(page.querySelector('a[href="/loggers/new"]')).not.toBeNull();
  });

  it('is shown although news of it come before the file itself', async () => {
    await open(loggerFileDetail({ status: 'bringingIn' }), 'grower', () =>
      socket.tell('loggerFile:changed', loggerFile({ status: 'bringingIn' })),
    );
    expect(step()).toBe('Bring in');
  });

  it('says a failed answer and keeps what was there', async () => {
    await open(loggerFileDetail());
    await press('Check all lines');
    server.expectOne(`${file}/check`).flush(null, { status: 503, statusText: 'x' });
    await harness.fixture.whenStable();
    expect(page.querySelector('[role=alert]')?.textContent).toContain('can’t be reached');
    expect(step()).toBe('Match columns');
  });

  it('can be looked at by a viewer, not changed', async () => {
    await open(loggerFileDetail(), 'viewer');
    expect(page.textContent).toContain('Growers and keepers of the room may bring files in.');
    const check = [...page.querySelectorAll('button')].find((one) => /Check all/.test(one.textContent ?? ''));
    expect(check?.disabled).toBe(true);
  });
});
