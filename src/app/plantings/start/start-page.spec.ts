import type { HarnessLoader } from '@angular/cdk/testing';
import { TestbedHarnessEnvironment } from '@angular/cdk/testing/testbed';
import { provideHttpClient } from '@angular/common/http';
import { provideHttpClientTesting, type HttpTestingController } from '@angular/common/http/testing';
import { TestBed } from '@angular/core/testing';
import { MatAutocompleteHarness } from '@angular/material/autocomplete/testing';
import { MatButtonHarness } from '@angular/material/button/testing';
import { MatInputHarness } from '@angular/material/input/testing';
import { provideRouter, Router, withComponentInputBinding } from '@angular/router';
import { RouterTestingHarness } from '@angular/router/testing';
import { cropById } from '@shared/growing/crops/crop-library';
import { liveSocket } from '../../core/live-socket';
import { account, membership } from '../../core/testing/account-builder';
import { inventedId } from '../../core/testing/board-builder';
import { FakeSocket } from '../../core/testing/fake-socket';
import { signedInAs } from '../../core/testing/signed-in';
import { plantingDetail } from '../testing/planting-builder';
import { StartPage } from './start-page';

const room = `/api/v1/rooms/${membership().roomId}`;
const lotId = inventedId(600);
const leek = {
  id: 'leek',
  name: 'Leek',
  botanicalName: 'Allium ampeloprasum',
  group: 'alliums',
  habit: 'blades',
  eaten: 'stem',
  isOwn: false,
  copiedFrom: null,
  hasSeed: true,
  hasSowingTimes: true,
  varieties: ['Winter Piper'],
};
const lot = {
  id: lotId,
  cropId: 'leek',
  cropName: 'Leek',
  variety: 'Winter Piper',
  source: '',
  packedYear: 2024,
  unit: 'seeds',
  amount: 100,
  left: 40,
  seedsLeft: 40,
  seedsPerGram: null,
  price: null,
  currency: null,
  lotNumber: '',
  note: '',
  age: { years: 2, lifeYears: null, sources: [], standing: null, useFirst: true },
  expectation: { percent: 80, lowPct: 66, highPct: 90, basis: 'test', source: 'own test: 16 of 20' },
  finishedOn: null,
  photo: null,
};

describe('adding a planting', () => {
  let server: HttpTestingController;
  let harness: RouterTestingHarness;
  let loader: HarnessLoader;
  let page: HTMLElement;

  async function open(url: string): Promise<void> {
    TestBed.configureTestingModule({
      providers: [
        provideHttpClient(),
        provideHttpClientTesting(),
        provideRouter(
          [
            { path: 'plantings/new', component: StartPage },
            { path: '**', children: [] },
          ],
          withComponentInputBinding(),
        ),
        { provide: liveSocket, useValue: new FakeSocket() },
      ],
    });
    server = signedInAs(account());
    harness = await RouterTestingHarness.create(url);
    loader = TestbedHarnessEnvironment.loader(harness.fixture);
    server.expectOne(`${room}/crops`).flush([leek]);
    server.expectOne(`${room}/racks`).flush([]);
    server.expectOne(`${room}/seed-lots`).flush([lot]);
    await answerCrop();
    page = harness.routeNativeElement as HTMLElement;
  }

  /** Answers with the library's leek where it is asked for. */
  async function answerCrop(): Promise<void> {
    for (let turn = 0; turn < 5; turn += 1) {
      harness.fixture.detectChanges();
      await Promise.resolve();
    }
    const crop = { ...cropById('leek'), isOwn: false, copiedFrom: null };
    server.match(`${room}/crops/leek`).forEach((request) => request.flush(crop));
    await harness.fixture.whenStable();
  }

  async function choose(crop: string): Promise<void> {
    const picker = await loader.getHarness(MatAutocompleteHarness.with({ ancestor: 'app-crop-picker' }));
    await picker.focus();
    const options = await picker.getOptions({ text: new RegExp(`^${crop}`) });
    const element = await options[0]?.host();
    // The click awaits no stable page: the crop that it asks for is answered below.
    void element?.click();
    await answerCrop();
  }

  const input = (label: string): Promise<MatInputHarness> =>
    loader.getHarness(MatInputHarness.with({ label }));
  const press = async (text: string): Promise<void> =>
    (await loader.getHarness(MatButtonHarness.with({ text }))).click();

  it('of a lot takes crop and variety from it, suggests the depth and says how many should come up', async () => {
    await open(`/plantings/new?lot=${lotId}&shelf=${inventedId(3)}`);
    expect(await (await input('Depth')).getValue()).toBe('6');
    await (await input('Seeds')).setValue('30');
    expect(page.textContent).toContain('About 24 should come up (own test: 16 of 20: 80 %).');
    await press('Sow it');
    const request = server.expectOne(`${room}/plantings`);
    expect(JSON.parse(JSON.stringify(request.request.body))).toEqual({
      how: 'sown',
      lotId,
      variety: 'Winter Piper',
      count: 30,
      grams: null,
      depthMm: 6,
      shelfId: inventedId(3),
      container: '',
      note: '',
    });
    expect(request.request.headers.has('Idempotency-Key')).toBe(true);
    request.flush(plantingDetail());
    await harness.fixture.whenStable();
    expect(TestBed.inject(Router).url).toBe(`/plantings/${plantingDetail().id}?care=usual`);
  });

  it('says at the field that more is sown than is left, and keeps what was typed', async () => {
    await open(`/plantings/new?lot=${lotId}`);
    await (await input('Seeds')).setValue('60');
    await press('Sow it');
    server.expectOne(`${room}/plantings`).flush(
      {
        type: 'about:blank',
        title: 'Not as it is',
        status: 422,
        code: 'INVALID',
        errors: [{ path: 'body.count', message: 'is more than is left of the lot: 40 seeds' }],
      },
      { status: 422, statusText: 'x' },
    );
    await harness.fixture.whenStable();
    expect(page.querySelector('mat-error')?.textContent).toBe('Is more than is left of the lot: 40 seeds.');
    expect(await (await input('Seeds')).getValue()).toBe('60');
  });

  it('suggests the depth of a crop that is chosen, unless somebody typed one', async () => {
    await open('/plantings/new');
    await choose('Leek');
    expect(await (await input('Depth')).getValue()).toBe('6');
    TestBed.resetTestingModule();
    await open('/plantings/new');
    await (await input('Depth')).setValue('15');
    await choose('Leek');
    expect(await (await input('Depth')).getValue()).toBe('15');
  });

  it('sends nothing while crop or count are missing', async () => {
    await open('/plantings/new');
    await press('Sow it');
    server.expectNone(`${room}/plantings`);
    expect([...page.querySelectorAll('mat-error')].map(({ textContent }) => textContent)).toEqual([
      'Choose a crop from the list.',
      'A whole number from 1 to 100 000.',
    ]);
  });
});
