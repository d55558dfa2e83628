import type { HttpTestingController } from '@angular/common/http/testing';
import type { HarnessLoader } from '@angular/cdk/testing';
import { TestbedHarnessEnvironment } from '@angular/cdk/testing/testbed';
import { TestBed, type ComponentFixture } from '@angular/core/testing';
import { MatButtonHarness } from '@angular/material/button/testing';
import { MatSelectHarness } from '@angular/material/select/testing';
import type { ScenarioListResponse } from '@shared/contracts/simulation';
import { Notices } from '../../core/notices';
import { membership } from '../../core/testing/account-builder';
import { boardAt } from '../../core/testing/board-builder';
import { providePlayedServer, signedInAs } from '../../core/testing/signed-in';
import { ScenarioPanel } from './scenario-panel';

const { roomId } = membership();
const path = `/api/v1/rooms/${roomId}/scenarios`;
const list = (changes: Partial<ScenarioListResponse> = {}): ScenarioListResponse => ({
  roomTime: boardAt,
  scenarios: [
    { scenario: 'timer-fails', title: 'Lamp timer fails', description: 'Stays dark.', parameters: ['shelf'] },
  ],
  running: [],
  ...changes,
});
const run = {
  run: 'run-7',
  scenario: 'timer-fails' as const,
  shelf: 'A1',
  from: boardAt,
  to: '2026-12-01T14:50:00Z',
};

describe('the scenarios of the demonstration', () => {
  let fixture: ComponentFixture<ScenarioPanel>;
  let server: HttpTestingController;
  let loader: HarnessLoader;
  const sayFailure = jest.fn();
  const page = (): HTMLElement => fixture.nativeElement as HTMLElement;

  beforeEach(async () => {
    sayFailure.mockReset();
    TestBed.configureTestingModule({
      providers: [...providePlayedServer(), { provide: Notices, useValue: { sayFailure } }],
    });
    server = signedInAs();
    fixture = TestBed.createComponent(ScenarioPanel);
    fixture.componentRef.setInput('roomId', roomId);
    fixture.componentRef.setInput('shelfLabels', ['A1', 'A2']);
    await fixture.whenStable();
    loader = TestbedHarnessEnvironment.loader(fixture);
  });
  afterEach(() => server.verify());

  it('are not shown in a room that nobody simulates', async () => {
    server.expectOne(path).flush(list({ scenarios: [] }));
    await fixture.whenStable();
    expect(page().textContent.trim()).toBe('');
  });

  it('are not shown while the simulator is away, nor complained about', async () => {
    server.expectOne(path).flush(null, { status: 503, statusText: 'x' });
    await fixture.whenStable();
    expect(page().textContent.trim()).toBe('');
    expect(sayFailure).not.toHaveBeenCalled();
  });

  it('are started on a shelf for some minutes, and listed while they run', async () => {
    server.expectOne(path).flush(list());
    await fixture.whenStable();
    const [scenario, shelf] = await loader.getAllHarnesses(MatSelectHarness);
    await scenario?.clickOptions({ text: 'Lamp timer fails' });
    await shelf?.clickOptions({ text: 'A1' });
    expect(page().querySelector('mat-hint')?.textContent).toBe('Stays dark.');
    await (await loader.getHarness(MatButtonHarness.with({ text: 'Start' }))).click();
    const start = server.expectOne({ method: 'POST', url: path });
    expect(start.request.body).toEqual({ scenario: 'timer-fails', shelf: 'A1', minutes: 30 });
    start.flush(run, { status: 201, statusText: 'Created' });
    server.expectOne({ method: 'GET', url: path }).flush(list({ running: [run] }));
    await fixture.whenStable();
    expect(page().querySelector('.running')?.textContent).toContain('Lamp timer fails on A1 until 14:50');
  });

  it('are not started before one is chosen', async () => {
    server.expectOne(path).flush(list());
    await fixture.whenStable();
    await (await loader.getHarness(MatButtonHarness.with({ text: 'Start' }))).click();
    expect(page().querySelector('mat-error')?.textContent).toBe('Choose a scenario.');
  });

  it('are stopped before their time, and a failure is said', async () => {
    server.expectOne(path).flush(list({ running: [run] }));
    await fixture.whenStable();
    const stop = await loader.getHarness(MatButtonHarness.with({ text: 'Stop' }));
    await stop.click();
    server.expectOne(`${path}/run-7`).flush(null, { status: 503, statusText: 'x' });
    expect(sayFailure).toHaveBeenCalledTimes(1);
    await stop.click();
    server.expectOne(`${path}/run-7`).flush(null, { status: 204, statusText: 'No Content' });
    server.expectOne(path).flush(list());
    await fixture.whenStable();
    expect(page().querySelector('.running')).toBeNull();
  });
});
