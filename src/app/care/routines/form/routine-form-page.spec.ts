import type { HarnessLoader } from '@angular/cdk/testing';
import { TestbedHarnessEnvironment } from '@angular/cdk/testing/testbed';
import { provideHttpClient } from '@angular/common/http';
import { provideHttpClientTesting, type HttpTestingController } from '@angular/common/http/testing';
import { TestBed } from '@angular/core/testing';
import { MATERIAL_ANIMATIONS } from '@angular/material/core';
import { MatButtonHarness } from '@angular/material/button/testing';
import { MatInputHarness } from '@angular/material/input/testing';
import { MatRadioButtonHarness } from '@angular/material/radio/testing';
import { MatSelectHarness } from '@angular/material/select/testing';
import { provideRouter, Router, withComponentInputBinding } from '@angular/router';
import { RouterTestingHarness } from '@angular/router/testing';
import { liveSocket } from '../../../core/live-socket';
import { account } from '../../../core/testing/account-builder';
import { inventedId } from '../../../core/testing/board-builder';
import { FakeSocket } from '../../../core/testing/fake-socket';
import { signedInAs } from '../../../core/testing/signed-in';
import { answerAll, members, roomAddress } from '../../testing/answer-all';
import { routine } from '../../testing/routine-builder';
import { RoutineFormPage } from './routine-form-page';

describe('the form of a routine', () => {
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
            { path: 'care/routines/new', component: RoutineFormPage },
            { path: 'care/routines/:routineId/change', component: RoutineFormPage },
            { path: '**', children: [] },
          ],
          withComponentInputBinding(),
        ),
        { provide: liveSocket, useValue: new FakeSocket() },
        { provide: MATERIAL_ANIMATIONS, useValue: { animationsDisabled: true } },
      ],
    });
    server = signedInAs(account());
    harness = await RouterTestingHarness.create(url);
    await answerAll(server, harness.fixture, {
      routines: [routine()],
      racks: [],
      plantings: { plantings: [], nextCursor: null },
      rota: { isKept: false, week: [], days: [], absences: [], uncovered: [] },
      members,
    });
    loader = TestbedHarnessEnvironment.loader(harness.fixture);
    page = harness.routeNativeElement as HTMLElement;
  }
  const input = (label: string): Promise<MatInputHarness> =>
    loader.getHarness(MatInputHarness.with({ label }));
  const press = async (text: string): Promise<void> =>
    (await loader.getHarness(MatButtonHarness.with({ text }))).click();
  const preview = (): string =>
    (page.querySelector('.preview')?.textContent ?? '').replace(/\s+/g, ' ').trim();

  it('shows the next days as they come of what is typed, and sends the rule', async () => {
    await open('/care/routines/new?kind=feed');
    expect(await (await input('Title')).getValue()).toBe('Feed');
    await (await input('Every')).setValue('4');
    expect(preview()).toBe('Due every 4 days Next: today Sat 5 Dec Wed 9 Dec Sun 13 Dec Thu 17 Dec');
    await press('Add the routine');
    const request = server.expectOne(`${roomAddress}/routines`);
    expect(request.request.body).toMatchObject({
      kind: 'feed',
      title: 'Feed',
      timing: { how: 'calendar', rule: 'FREQ=DAILY;INTERVAL=4', startsOn: '2026-12-01' },
      place: { at: 'room' },
      who: { how: 'onDuty' },
    });
    expect(request.request.headers.has('Idempotency-Key')).toBe(true);
    request.flush(routine({ title: 'Feed' }));
    await harness.fixture.whenStable();
    expect(TestBed.inject(Router).url).toBe('/care/routines');
  });

  it('follows a choice of weekdays', async () => {
    await open('/care/routines/new');
    const rhythm = await loader.getHarness(MatSelectHarness.with({ label: 'Comes round' }));
    await rhythm.clickOptions({ text: 'On weekdays' });
    await (await input('Every')).setValue('1');
    page.querySelector<HTMLButtonElement>('[aria-label=Saturday]')?.click();
    await harness.fixture.whenStable();
    expect(preview()).toContain('Due every Tuesday and Saturday Next: today Sat 5 Dec Tue 8 Dec');
  });

  it('says who is missing, and sends nothing', async () => {
    await open('/care/routines/new');
    await (await loader.getHarness(MatRadioButtonHarness.with({ label: 'Two together' }))).check();
    await press('Add the routine');
    server.expectNone(`${roomAddress}/routines`);
    expect(page.querySelector('app-who-part [role=alert]')?.textContent).toBe('Choose two people.');
  });

  it('puts what the server finds wrong at its field', async () => {
    await open('/care/routines/new');
    await press('Add the routine');
    server.expectOne(`${roomAddress}/routines`).flush(
      {
        type: 'about:blank',
        title: 'Not as it is',
        status: 422,
        code: 'INVALID',
        errors: [{ path: 'body.timing.startsOn', message: 'is more than 10 years ago' }],
      },
      { status: 422, statusText: 'x' },
    );
    await harness.fixture.whenStable();
    expect(page.querySelector('mat-error')?.textContent).toBe('Is more than 10 years ago.');
  });

  it('changes a routine and keeps what is not touched', async () => {
    await open(`/care/routines/${routine().id}/change`);
    await (await input('Title')).setValue('Water well');
    await press('Save the changes');
    const request = server.expectOne(`${roomAddress}/routines/${routine().id}`);
    const { id: _, placeLabel: _label, nextDueOn: _next, ...draft } = routine();
    expect(request.request.method).toBe('PUT');
    expect(request.request.body).toEqual({ ...draft, title: 'Water well' });
  });

  it('says that a routine has ended', async () => {
    await open(`/care/routines/${inventedId(999)}/change`);
    expect(page.textContent).toContain('This routine has ended');
  });
});
