import { TestbedHarnessEnvironment } from '@angular/cdk/testing/testbed';
import type { HarnessLoader } from '@angular/cdk/testing';
import { provideHttpClient } from '@angular/common/http';
import {
  HttpTestingController,
  provideHttpClientTesting,
  type TestRequest,
} from '@angular/common/http/testing';
import { TestBed } from '@angular/core/testing';
import { MATERIAL_ANIMATIONS } from '@angular/material/core';
import { MatDialogHarness } from '@angular/material/dialog/testing';
import { MatInputHarness } from '@angular/material/input/testing';
import { MatSelectHarness } from '@angular/material/select/testing';
import { provideRouter, withComponentInputBinding } from '@angular/router';
import { RouterTestingHarness } from '@angular/router/testing';
import type { GerminationView } from '@shared/contracts/germination';
import type { Role } from '@shared/contracts/people';
import type { PlantingDetail } from '@shared/contracts/plantings';
import type { Shelf } from '@shared/contracts/rooms';
import { liveSocket } from '../../core/live-socket';
import { account, membership } from '../../core/testing/account-builder';
import { inventedId } from '../../core/testing/board-builder';
import { FakeSocket } from '../../core/testing/fake-socket';
import { signedInAs } from '../../core/testing/signed-in';
import { germination, plantingDetail, plantingEvent } from '../testing/planting-builder';
import { PlantingPage } from './planting-page';

const room = `/api/v1/rooms/${membership().roomId}`;
const address = `${room}/plantings/${plantingDetail().id}`;
const counted = plantingEvent({ id: inventedId(511), kind: 'counted', count: 1 });
const oneUp = plantingDetail({
  stage: 'emerging',
  stageSince: '2026-12-01',
  up: 1,
  events: [...plantingDetail().events, counted],
  undoableEventId: counted.id,
});

function shelf(number: number, label: string): Shelf {
  return {
    id: inventedId(number),
    rackId: inventedId(300),
    label,
    position: number,
    widthCm: null,
    depthCm: null,
    leafOffsetC: 0,
    lamps: [],
    lampHours: { switchesOn: null, switchesOff: null },
    heatMat: null,
  };
}

describe('the page of a planting', () => {
  let server: HttpTestingController;
  let harness: RouterTestingHarness;
  let loader: HarnessLoader;
  let page: HTMLElement;

  async function start(plantingId: string, role: Role): Promise<void> {
    TestBed.configureTestingModule({
      providers: [
        provideHttpClient(),
        provideHttpClientTesting(),
        provideRouter(
          [{ path: 'plantings/:plantingId', component: PlantingPage }],
          withComponentInputBinding(),
        ),
        { provide: liveSocket, useValue: new FakeSocket() },
        { provide: MATERIAL_ANIMATIONS, useValue: { animationsDisabled: true } },
      ],
    });
    server = signedInAs(account({ memberships: [membership({ role })] }));
    harness = await RouterTestingHarness.create(`/plantings/${plantingId}`);
    loader = TestbedHarnessEnvironment.documentRootLoader(harness.fixture);
    page = harness.routeNativeElement as HTMLElement;
    await settle();
  }

  async function open(
    planting: PlantingDetail = plantingDetail(),
    role: Role = 'grower',
    found: GerminationView = germination(),
  ): Promise<void> {
    await start(planting.id, role);
    await answer(planting, found);
  }

  /** Answers all that the page asks about the planting, until it asks no more. */
  async function answer(planting: PlantingDetail, found: GerminationView): Promise<void> {
    await settle();
    server.match(address).forEach((request) => request.flush(planting));
    await settle();
    server.match(`${address}/germination`).forEach((request) => request.flush(found));
    server
      .match(`${address}/progress`)
      .forEach((request) =>
        request.flush({ at: '2026-12-01T14:20:00Z', degreeDays: null, light: null, transplant: null }),
      );
    server
      .match(({ url }) => url === `${room}/routines` || url === `${room}/ready-made-routines`)
      .forEach((request) => request.flush([]));
    server
      .match(({ url }) => url.includes('/series/'))
      .forEach((request) => request.flush({ quantity: 'airTemperature', lines: [], wanted: [] }));
    await harness.fixture.whenStable();
  }

  /** A page that waits for an answer is not stable. */
  async function settle(): Promise<void> {
    for (let turn = 0; turn < 5; turn += 1) {
      harness.fixture.detectChanges();
      await Promise.resolve();
    }
  }

  /** A harness would wait for the answer to what the button asks, which is given later. */
  async function press(text: RegExp): Promise<void> {
    const button = [...document.querySelectorAll('button')].find((one) =>
      text.test(one.textContent?.trim() ?? ''),
    );
    if (button === undefined) throw new Error(`No button ${String(text)}`);
    button.click();
    await settle();
  }

  /** Opens the dialog of a deed, with two shelves to choose from. */
  async function begin(deed: RegExp): Promise<MatDialogHarness> {
    await press(deed);
    const shelves = [shelf(2, 'A2'), shelf(3, 'A3')];
    server
      .expectOne(`${room}/racks`)
      .flush([{ id: inventedId(300), name: 'Rack A', note: '', position: 1, shelves }]);
    return loader.getHarness(MatDialogHarness);
  }

  const sent = (request: TestRequest): unknown => JSON.parse(JSON.stringify(request.request.body));
  const number = (): HTMLInputElement =>
    page.querySelector<HTMLInputElement>('app-quick-count [type=number]')!;
  function type(value: string): void {
    number().value = value;
    number().dispatchEvent(new Event('input'));
    harness.fixture.detectChanges();
  }

  it('says what it is, how far it is and where', async () => {
    await open();
    expect(page.querySelector('h1')?.textContent).toBe('Leek Winter Piper');
    expect(page.querySelector('header p')?.textContent?.replace(/\s+/g, ' ').trim()).toBe(
      'Sown 21 Nov · 40 seeds · shelf A3',
    );
    expect(page.querySelector('app-germination-card')?.textContent).toContain(
      'First seedlings expected from Tue 1 Dec to Mon 7 Dec.',
    );
  });

  it('takes a count by one more at a time, and takes it back', async () => {
    await open();
    page.querySelector<HTMLButtonElement>('[aria-label="One more"]')?.click();
    await settle();
    await press(/^Note 1 up/);
    const request = server.expectOne(`${address}/observations`);
    expect(sent(request)).toEqual({ kind: 'counted', up: 1, isLast: false });
    expect(request.request.headers.get('Idempotency-Key')).toMatch(/^[0-9a-f]{32}$/);
    request.flush({ event: counted, stage: 'emerging', sown: 40, up: 1, count: 40, shelfId: inventedId(3) });
    await answer(oneUp, germination({ up: 1, percent: 2.5, forecast: null }));
    expect(page.querySelector('header p')?.textContent).toContain('1 of 40 up');

    await press(/^Undo/);
    server.expectOne({ method: 'DELETE', url: `${address}/events/${counted.id}` }).flush(null);
    await answer(plantingDetail(), germination());
    expect(page.querySelector('header p')?.textContent).toContain('40 seeds');
  });

  it('sends no count above the number sown, nor an empty one', async () => {
    await open();
    for (const [typed, button] of [
      ['41', /^Note 41 up/],
      ['', /^Note the count/],
      ['2.5', /^Note 2.5 up/],
    ] as const) {
      type(typed);
      await press(button);
      expect(page.querySelector('app-quick-count [role=alert]')?.textContent).toContain('from 0 to 40');
    }
    server.expectNone(`${address}/observations`);
  });

  it('keeps a count that the server refuses, with the server’s words', async () => {
    await open(oneUp);
    type('0');
    await press(/^Note 0 up/);
    server.expectOne(`${address}/observations`).flush(
      {
        type: 'about:blank',
        title: 'Not as it is',
        status: 422,
        code: 'INVALID',
        errors: [{ path: 'body.up', message: 'is fewer than the 1 counted before' }],
      },
      { status: 422, statusText: 'x' },
    );
    await harness.fixture.whenStable();
    expect(page.querySelector('app-quick-count [role=alert]')?.textContent).toContain(
      'Is fewer than the 1 counted before.',
    );
    expect(number().value).toBe('0');
  });

  it('that is late says so with what it may be', async () => {
    const forecast = { ...germination().forecast!, isLate: true, causes: ['Too cold: 9 °C'] };
    await open(plantingDetail(), 'grower', germination({ forecast }));
    const card = page.querySelector('app-germination-card')?.textContent;
    expect(card).toContain('Late.');
    expect(card).toContain('Too cold: 9 °C');
  });

  it('shows a viewer everything and lets them change nothing', async () => {
    await open(plantingDetail({ undoableEventId: plantingDetail().events[0]?.id ?? null }), 'viewer');
    expect(page.querySelector('app-quick-count')).toBeNull();
    expect([...page.querySelectorAll('button')].map(({ textContent }) => textContent)).not.toEqual(
      expect.arrayContaining([expect.stringMatching(/Note|Undo|Move|Add a photo|Remove/)]),
    );
  });

  it('lets a helper remove the photo that they added, and a grower any', async () => {
    const photo = { at: '2026-11-30T09:00:00Z', width: 1600, height: 1200, personName: 'x' };
    const planting = plantingDetail({
      photos: [
        { ...photo, id: inventedId(601), caption: 'Mine', personId: account().id },
        { ...photo, id: inventedId(602), caption: 'Another’s', personId: inventedId(9) },
      ],
    });
    const removable = (): (string | null)[] =>
      [...page.querySelectorAll('app-photo-strip .remove')].map((one) => one.getAttribute('aria-label'));
    await open(planting, 'helper');
    expect(removable()).toEqual(['Remove the photo: Mine']);
    await press(/^delete$/);
    await press(/^Remove the photo/);
    server.expectOne(`${room}/photos/${inventedId(601)}`).flush(null, { status: 204, statusText: '' });
    await harness.fixture.whenStable();
    expect(removable()).toEqual([]);
    expect(page.querySelectorAll('app-photo-strip img')).toHaveLength(1);

    TestBed.resetTestingModule();
    await open(planting, 'grower');
    expect(removable()).toHaveLength(2);
  });

  it('notes a harvest by weight', async () => {
    await open(
      plantingDetail({ stage: 'growingOn', up: 31, count: 31 }),
      'helper',
      germination({ isOpen: false }),
    );
    const dialog = await begin(/Harvest$/);
    await press(/^Note the harvest/);
    expect(await dialog.getText()).toContain('Give a weight, a number of pieces, or both.');
    await (await dialog.getHarness(MatInputHarness.with({ label: 'Weight' }))).setValue('85');
    await press(/^Note the harvest/);
    const request = server.expectOne(`${address}/observations`);
    expect(sent(request)).toEqual({ kind: 'harvested', grams: 85, count: null, note: '' });
    request.flush({ event: plantingEvent(), stage: 'growingOn', sown: 40, up: 31, count: 31, shelfId: null });
    await answer(plantingDetail({ stage: 'growingOn', harvestedGrams: 85 }), germination());
    expect(await loader.getAllHarnesses(MatDialogHarness)).toEqual([]);
    expect(page.textContent).toContain('85\u00a0g');
  });

  it('moves to a shelf of the room, not to where it stands', async () => {
    await open();
    const dialog = await begin(/Move$/);
    const select = await dialog.getHarness(MatSelectHarness);
    await select.open();
    const here = (await select.getOptions({ text: /A3/ }))[0];
    expect(await here?.isDisabled()).toBe(true);
    await select.clickOptions({ text: 'A2' });
    await press(/^Move it/);
    expect(sent(server.expectOne(`${address}/steps`))).toEqual({
      kind: 'moved',
      shelfId: inventedId(2),
      note: '',
    });
  });

  it('is corrected where it was written down wrongly', async () => {
    await open();
    await press(/^Correct it$/);
    const dialog = await loader.getHarness(MatDialogHarness);
    await (await dialog.getHarness(MatInputHarness.with({ label: 'Variety' }))).setValue(' Slate Harbour ');
    await (await dialog.getHarness(MatInputHarness.with({ label: 'Depth' }))).setValue('0');
    document.querySelector<HTMLButtonElement>('mat-dialog-container [type=submit]')?.click();
    const request = server.expectOne({ method: 'PATCH', url: address });
    expect(request.request.body).toEqual({ variety: 'Slate Harbour', depthMm: 0, source: '' });
    request.flush(plantingDetail({ variety: 'Slate Harbour', depthMm: 0 }));
    await harness.fixture.whenStable();
    expect(page.querySelector('h1')?.textContent).toBe('Leek Slate Harbour');
    expect(page.textContent).toContain('0\u00a0mm');
  });

  it('that is not there says so', async () => {
    await start(plantingDetail().id, 'grower');
    for (const url of [address, `${address}/progress`])
      server.expectOne(url).flush(null, { status: 404, statusText: 'x' });
    await harness.fixture.whenStable();
    expect(page.textContent).toContain('It is no longer there');
  });
});
