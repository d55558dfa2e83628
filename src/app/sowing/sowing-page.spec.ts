import { TestbedHarnessEnvironment } from '@angular/cdk/testing/testbed';
import type { HarnessLoader } from '@angular/cdk/testing';
import type { HttpTestingController } from '@angular/common/http/testing';
import { TestBed, type ComponentFixture } from '@angular/core/testing';
import { MATERIAL_ANIMATIONS } from '@angular/material/core';
import { MatButtonHarness } from '@angular/material/button/testing';
import { MatDialogHarness } from '@angular/material/dialog/testing';
import { MatInputHarness } from '@angular/material/input/testing';
import { MatSelectHarness } from '@angular/material/select/testing';
import { MatSnackBarHarness } from '@angular/material/snack-bar/testing';
import type { Role } from '@shared/contracts/people';
import type { SowingCalendar } from '@shared/contracts/sowing';
import { account, membership } from '../core/testing/account-builder';
import { inventedId, task } from '../core/testing/board-builder';
import { providePlayedServer, signedInAs } from '../core/testing/signed-in';
import { SowingPage } from './sowing-page';
import { frostDates, sowingCalendar, sowingPlan } from './testing/sowing-builder';

const base = `/api/v1/rooms/${membership().roomId}`;
const noPlace = {
  latitudeDeg: null,
  year: 2026,
  days: [],
  longest: null,
  shortest: null,
  onionClasses: [],
  bulbing: [],
};

describe('the sowing page', () => {
  let fixture: ComponentFixture<SowingPage>;
  let server: HttpTestingController;
  let document: HarnessLoader;
  const page = (): HTMLElement => fixture.nativeElement as HTMLElement;
  const text = (): string => page().textContent.replace(/[\s\u00a0]+/g, ' ');
  const press = async (name: string | RegExp): Promise<void> =>
    (await document.getHarness(MatButtonHarness.with({ text: name }))).click();

  async function shown(calendar: SowingCalendar = sowingCalendar(), role: Role = 'grower'): Promise<void> {
    TestBed.configureTestingModule({
      providers: [
        ...providePlayedServer(),
        { provide: MATERIAL_ANIMATIONS, useValue: { animationsDisabled: true } },
      ],
    });
    server = signedInAs(account({ memberships: [membership({ role })] }));
    fixture = TestBed.createComponent(SowingPage);
    document = TestbedHarnessEnvironment.documentRootLoader(fixture);
    TestBed.tick();
    server.expectOne(`${base}/sowing`).flush(calendar);
    server.expectOne(`${base}/day-length`).flush(noPlace);
    server.expectOne(base).flush({
      id: membership().roomId,
      name: 'Kestrel Lane growing room',
      timeZone: 'Europe/Dublin',
      latitudeDeg: null,
      longitudeDeg: null,
    });
    await fixture.whenStable();
  }
  afterEach(() => server.verify());

  it('says first what this week asks for', async () => {
    const thisWeek = [
      { cropId: 'leek', cropName: 'Leek', on: '2026-12-01', closes: '2026-12-20' },
      { cropId: 'celery', cropName: 'Celery', on: '2026-12-04', closes: '2026-12-30' },
    ];
    await shown(sowingCalendar({ thisWeek }));
    expect(text()).toContain('Sow this week: Leek (today), Celery (4 Dec 2026).');
    expect(page().querySelector('section h2')?.textContent).toBe('This week');
  });

  it('offers the first crop where none is chosen, and only to those who may', async () => {
    await shown(sowingCalendar({ plans: [] }), 'helper');
    expect(text()).toContain('No crop stands on the calendar yet');
    expect(text()).not.toContain('Choose the first crop');
  });

  it('asks for the frost date that everything is counted from', async () => {
    const frost = frostDates({ lastSpring: null, lastSpringRisk: null });
    await shown(sowingCalendar({ frost }));
    expect(text()).toContain('The last frost of this place is not known yet');
  });

  it('makes a care task of a sowing day, once', async () => {
    await shown();
    await press('Make a care task');
    const request = server.expectOne(`${base}/sowing/crops/leek/task`);
    expect(request.request.body).toEqual({ on: '2027-02-03' });
    request.flush(task({ kind: 'sow', dueOn: '2027-02-03' }), { status: 201, statusText: 'Created' });
    TestBed.tick();
    server.expectOne(`${base}/sowing`).flush(sowingCalendar({ plans: [sowingPlan({ taskId: task().id })] }));
    await fixture.whenStable();
    expect(await document.getHarnessOrNull(MatButtonHarness.with({ text: 'Make a care task' }))).toBeNull();
    expect(text()).toContain('task made');
  });

  it('leads to a planting of the crop, or of the seed that is left', async () => {
    const lots = [{ lotId: inventedId(600), name: 'Leek, packed 2025', useFirst: true }];
    await shown(sowingCalendar({ plans: [sowingPlan({ lots })] }));
    const links = [...page().querySelectorAll('a')].map((link) => link.getAttribute('href'));
    expect(links).toContain('/plantings/new?crop=leek');
    expect(links).toContain(`/plantings/new?lot=${inventedId(600)}`);
    expect(text()).toContain('use first');
  });

  it('takes a crop off with a way back that keeps its interval', async () => {
    await shown(sowingCalendar({ plans: [sowingPlan({ everyDays: 14 })] }));
    await press('Take it off');
    const off = server.expectOne(`${base}/sowing/crops/leek`);
    expect(off.request.method).toBe('DELETE');
    off.flush(sowingCalendar({ plans: [] }));
    await fixture.whenStable();
    await (await document.getHarness(MatSnackBarHarness)).dismissWithAction();
    const back = server.expectOne(`${base}/sowing/crops/leek`);
    expect(back.request.body).toEqual({ everyDays: 14 });
    back.flush(sowingCalendar());
  });

  it('explains a frost date while it is typed, and saves it', async () => {
    await shown();
    await press('Change the frost dates');
    const dialog = await document.getHarness(MatDialogHarness);
    expect(await dialog.getText()).toContain('In 10 of 100 springs frost still comes after it.');
    const [kind] = await dialog.getAllHarnesses(
      MatSelectHarness.with({ selector: '[formControlName=kind]' }),
    );
    await kind?.open();
    await kind?.clickOptions({ text: /percentile/ });
    expect(await dialog.getText()).toContain('In 90 of 100 springs frost still comes after it.');
    expect(await dialog.getText()).toContain('early, risky date');
    const [day] = await dialog.getAllHarnesses(MatInputHarness);
    await day?.setValue('32');
    await press('Save the dates');
    expect(await dialog.getText()).toContain('that month has no day 32');
    await day?.setValue('20');
    await press('Save the dates');
    const saving = server.expectOne(`${base}/frost-dates`);
    expect(saving.request.body).toEqual({
      lastSpring: { on: '05-20', wording: { kind: 'percentile', percent: 10 } },
      firstAutumn: null,
      note: '',
    });
    saving.flush(frostDates());
    TestBed.tick();
    server.expectOne(`${base}/sowing`).flush(sowingCalendar());
  });
});
