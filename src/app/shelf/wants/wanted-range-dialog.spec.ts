import { TestbedHarnessEnvironment } from '@angular/cdk/testing/testbed';
import type { HttpTestingController, TestRequest } from '@angular/common/http/testing';
import { TestBed, type ComponentFixture } from '@angular/core/testing';
import { MatButtonHarness } from '@angular/material/button/testing';
import { MAT_DIALOG_DATA, MatDialogRef } from '@angular/material/dialog';
import { MatInputHarness } from '@angular/material/input/testing';
import { MatRadioButtonHarness } from '@angular/material/radio/testing';
import { MatFormFieldHarness } from '@angular/material/form-field/testing';
import type { RangeTrial, WantedRange } from '@shared/contracts/rooms';
import { membership } from '../../core/testing/account-builder';
import { inventedId } from '../../core/testing/board-builder';
import { providePlayedServer, signedInAs } from '../../core/testing/signed-in';
import { WantedRangeDialog, type WantedRangeSubject } from './wanted-range-dialog';

const params = { roomId: membership().roomId, shelfId: inventedId(1) };
const address = `/api/v1/rooms/${params.roomId}/shelves/${params.shelfId}`;
const range: WantedRange = {
  quantity: 'airTemperature',
  lampsOn: { low: 20, high: 26 },
  lampsOff: { low: 16, high: 20 },
  holdMinutes: 10,
  clearingMargin: 0.5,
  urgency: { by: 4, afterMinutes: 360 },
  source: 'plantings',
  since: '2026-11-01T00:00:00Z',
  reason: '',
};
const trial: RangeTrial = {
  days: 14,
  above: { count: 9, totalMs: 31 * 3_600_000, urgentCount: 0 },
  below: { count: 0, totalMs: 0, urgentCount: 0 },
  episodes: [],
  coverage: 1,
};

describe('setting a wanted range', () => {
  let server: HttpTestingController;
  let fixture: ComponentFixture<WantedRangeDialog>;
  const closed: unknown[] = [];
  const text = (): string =>
    ((fixture.nativeElement as HTMLElement).textContent ?? '').replace(/[\s\u00a0]+/g, ' ');

  async function shown(): Promise<void> {
    closed.length = 0;
    TestBed.configureTestingModule({
      providers: [
        ...providePlayedServer(),
        {
          provide: MAT_DIALOG_DATA,
          useValue: { params, range, quantities: ['airTemperature'] } satisfies WantedRangeSubject,
        },
        { provide: MatDialogRef, useValue: { close: (answer: unknown) => closed.push(answer) } },
      ],
    });
    server = signedInAs();
    fixture = TestBed.createComponent(WantedRangeDialog);
    TestBed.tick();
    server
      .expectOne(({ url }) => url === `${address}/series/airTemperature`)
      .flush({ quantity: 'airTemperature', lines: [], wanted: [] });
    server
      .expectOne(({ url }) => url === `${address}/report`)
      .flush({
        statistics: [],
        light: [],
        plannedLamps: [],
        measuredLamps: [],
        events: [],
      });
  }
  /** The next trial, asked once typing rests. */
  async function asked(): Promise<TestRequest> {
    for (;;) {
      const [request] = server.match(`${address}/wanted-ranges/airTemperature/trial`);
      if (request !== undefined) return request;
      await new Promise((resolve) => setTimeout(resolve, 50));
    }
  }
  const type = async (label: string, value: string): Promise<void> => {
    const loader = TestbedHarnessEnvironment.loader(fixture);
    const [field] = await loader.getAllHarnesses(MatFormFieldHarness.with({ floatingLabelText: label }));
    await ((await field?.getControl(MatInputHarness)) as MatInputHarness).setValue(value);
  };

  it('says where the range comes from, and how often it would have opened an alert', async () => {
    await shown();
    const request = await asked();
    const { quantity: _q, since: _s, source: _o, reason: _r, ...rule } = range;
    expect(request.request.body).toEqual(rule);
    request.flush(trial);
    await fixture.whenStable();
    expect(text()).toContain('This one comes from what grows here');
    expect(text()).toContain('This rule would have opened 9 times in the last 14 days, 31 h in all.');
  });

  it('tries it anew as it is typed, and not while it can’t be kept', async () => {
    await shown();
    (await asked()).flush(trial);
    await type('Highest', '27.5');
    const second = await asked();
    expect(second.request.body).toMatchObject({ lampsOn: { low: 20, high: 27.5 } });
    second.flush({ ...trial, above: { count: 0, totalMs: 0, urgentCount: 0 } });
    await fixture.whenStable();
    expect(text()).toContain('This rule would not have opened in the last 14 days.');

    await type('Highest', '19');
    expect(text()).toContain('Give a range that can be kept');
    const save = await TestbedHarnessEnvironment.loader(fixture).getHarness(
      MatButtonHarness.with({ text: 'Save the range' }),
    );
    await save.click();
    expect(text()).toContain('With lamps on, the lowest must be below the highest.');
    expect(closed).toEqual([]);
  });

  it('saves what is typed, urgency included', async () => {
    await shown();
    (await asked()).flush(trial);
    await type('Or after', '');
    const save = await TestbedHarnessEnvironment.loader(fixture).getHarness(
      MatButtonHarness.with({ text: 'Save the range' }),
    );
    await save.click();
    const request = server.expectOne({ method: 'PUT', url: `${address}/wanted-ranges/airTemperature` });
    expect(request.request.body).toMatchObject({ urgency: { by: 4, afterMinutes: null } });
    request.flush({ ...range, source: 'shelf' });
    expect(closed).toEqual([true]);
  });

  it('can be for the whole room', async () => {
    await shown();
    (await asked()).flush(trial);
    const loader = TestbedHarnessEnvironment.loader(fixture);
    await (await loader.getHarness(MatRadioButtonHarness.with({ label: 'In the whole room' }))).check();
    await (await loader.getHarness(MatButtonHarness.with({ text: 'Save the range' }))).click();
    server
      .expectOne({ method: 'PUT', url: `/api/v1/rooms/${params.roomId}/wanted-ranges/airTemperature` })
      .flush(range);
    expect(closed).toEqual([true]);
  });

  it('says why it could not be tried, and can be saved all the same', async () => {
    await shown();
    (await asked()).flush(null, { status: 503, statusText: 'x' });
    await fixture.whenStable();
    expect(text()).toContain('The server can’t be reached.');
  });
});
