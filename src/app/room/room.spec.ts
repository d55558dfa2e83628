import type { HttpTestingController, TestRequest } from '@angular/common/http/testing';
import { TestbedHarnessEnvironment } from '@angular/cdk/testing/testbed';
import type { HarnessLoader } from '@angular/cdk/testing';
import { DeferBlockBehavior, DeferBlockState, TestBed, type ComponentFixture } from '@angular/core/testing';
import { MATERIAL_ANIMATIONS } from '@angular/material/core';
import { MatButtonHarness } from '@angular/material/button/testing';
import { MatDialogHarness } from '@angular/material/dialog/testing';
import { MatInputHarness } from '@angular/material/input/testing';
import { MatSelectHarness } from '@angular/material/select/testing';
import { MatSnackBarHarness } from '@angular/material/snack-bar/testing';
import type { Role } from '@shared/contracts/people';
import { account, membership } from '../core/testing/account-builder';
import { alert, board, boardShelf, inventedId, measure, task } from '../core/testing/board-builder';
import { FakeSocket } from '../core/testing/fake-socket';
import { providePlayedServer, signedInAs } from '../core/testing/signed-in';
import { Room } from './room';

const base = `/api/v1/rooms/${membership().roomId}`;

describe('the room screen', () => {
  let fixture: ComponentFixture<Room>;
  let server: HttpTestingController;
  let socket: FakeSocket;
  let loader: HarnessLoader;
  let document: HarnessLoader;
  const page = (): HTMLElement => fixture.nativeElement as HTMLElement;
  const text = (selector: string): string =>
    (page().querySelector(selector)?.textContent ?? '').replace(/[\s\u00a0]+/g, ' ').trim();

  async function opened(role: Role | null): Promise<void> {
    socket = new FakeSocket();
    TestBed.configureTestingModule({
      deferBlockBehavior: DeferBlockBehavior.Manual,
      providers: [
        ...providePlayedServer(socket),
        { provide: MATERIAL_ANIMATIONS, useValue: { animationsDisabled: true } },
      ],
    });
    server = signedInAs(account({ memberships: role === null ? [] : [membership({ role })] }));
    fixture = TestBed.createComponent(Room);
    await fixture.whenStable();
    loader = TestbedHarnessEnvironment.loader(fixture);
    document = TestbedHarnessEnvironment.documentRootLoader(fixture);
  }
  async function shown(answer = board(), role: Role = 'helper'): Promise<void> {
    await opened(role);
    server.expectOne(`${base}/board`).flush(answer);
    await fixture.whenStable();
  }
  /** What goes through the queue is kept before it is sent: it takes a few turns of the event loop. */
  async function settled(): Promise<void> {
    for (let turn = 0; turn < 5; turn += 1) await new Promise((resolve) => setTimeout(resolve));
    await fixture.whenStable();
  }
  async function sent(url: string): Promise<TestRequest> {
    await settled();
    return server.expectOne(url);
  }
  afterEach(() => server.verify());

  it('holds its place while it is fetched, then draws racks and shelves', async () => {
    await opened('viewer');
    expect(text('app-room-skeleton')).toBe('Loading the room');
    server.expectOne(`${base}/board`).flush(board());
    await fixture.whenStable();
    expect(text('h1')).toBe('Kestrel Lane growing room');
    expect(text('section h2')).toBe('Rack A window wall');
    expect(page().querySelectorAll('app-shelf-bay')).toHaveLength(1);
    expect(text('app-shelf-bay app-note-line')).toContain('Too warm since 13:54');
  });

  it('that can’t be fetched says so and tries again', async () => {
    await opened('viewer');
    server.expectOne(`${base}/board`).flush(null, { status: 503, statusText: 'x' });
    await fixture.whenStable();
    expect(text('[role=alert]')).toContain('The room could not be fetched');
    await (await loader.getHarness(MatButtonHarness.with({ text: 'Try again' }))).click();
    server.expectOne(`${base}/board`).flush(board());
    await fixture.whenStable();
    expect(text('h1')).toBe('Kestrel Lane growing room');
  });

  it('without racks says what belongs there', async () => {
    await shown(board({ racks: [], openAlerts: [], tasks: [] }));
    expect(text('app-empty-state')).toContain('The room is still empty');
  });

  it('of a person without a room asks nothing and says who can help', async () => {
    await opened(null);
    expect(text('app-empty-state')).toContain('Ask a keeper to add you');
  });

  it('shows a value as it changes, in the same place', async () => {
    await shown();
    const bay = page().querySelector('app-shelf-bay');
    socket.tell('shelf:measured', {
      ...boardShelf().now,
      measures: [measure('airTemperature', 24.4), ...boardShelf().now.measures.slice(1)],
    });
    await fixture.whenStable();
    expect(text('app-measure-strip .value')).toBe('24.4 °C');
    expect(page().querySelector('app-shelf-bay')).toBe(bay);
    expect(text('[role=status]')).toBe('');
  });

  it('reads out what opens and what is over, and nothing else', async () => {
    await shown(board({ openAlerts: [] }));
    socket.tell('alert:changed', alert());
    await fixture.whenStable();
    expect(text('[role=status]')).toBe('Needs a look: A1 air is 2.3 °C too warm.');
    const times = { endedAt: '2026-12-01T14:19:00Z', clearedAt: '2026-12-01T14:24:00Z' };
    socket.tell('alert:changed', alert(times));
    await fixture.whenStable();
    expect(text('[role=status]')).toBe('Over: A1 air was 2.3 °C too warm.');
    expect(text('app-needs-a-look')).toContain('Every shelf is as it should be');
  });

  it('acknowledges', async () => {
    await shown();
    await (await loader.getHarness(MatButtonHarness.with({ text: 'Acknowledge' }))).click();
    server
      .expectOne(`${base}/alerts/${alert().id}/acknowledgement`)
      .flush(alert({ acknowledgedAt: '2026-12-01T14:20:00Z', acknowledgedByName: 'Maren Oxley' }));
    await fixture.whenStable();
    expect(text('.standing')).toContain('Seen by Maren Oxley');
  });

  it('ticks a task and takes the tick back', async () => {
    await shown();
    const box = (): HTMLElement | null => page().querySelector('[role=checkbox]');
    const completion = `${base}/tasks/${task().id}/completion`;
    box()?.click();
    const tick = await sent(completion);
    expect(box()?.getAttribute('aria-checked')).toBe('true');
    tick.flush(task({ outcome: 'done', doneAt: '2026-12-01T14:21:00Z' }));
    await settled();
    expect(box()?.getAttribute('aria-checked')).toBe('true');
    await (await document.getHarness(MatSnackBarHarness)).dismissWithAction();
    const undo = await sent(completion);
    expect(undo.request.method).toBe('DELETE');
    undo.flush(task());
    await settled();
    expect(box()?.getAttribute('aria-checked')).toBe('false');
  });

  it('keeps a tick that nobody answers, and says that it waits', async () => {
    await shown();
    page().querySelector<HTMLElement>('[role=checkbox]')?.click();
    const tick = await sent(`${base}/tasks/${task().id}/completion`);
    tick.flush(null, { status: 503, statusText: 'x' });
    await settled();
    expect(page().querySelector('[role=checkbox]')?.getAttribute('aria-checked')).toBe('true');
    expect(text('app-todays-care li p')).toContain('Waits for signal.');
  });

  it('notes an observation on a shelf, and keeps what was written until it is saved', async () => {
    await shown();
    await (await loader.getHarness(MatButtonHarness.with({ text: 'Note an observation' }))).click();
    const dialog = await document.getHarness(MatDialogHarness);
    const [, kind] = await dialog.getAllHarnesses(MatSelectHarness);
    await kind?.clickOptions({ text: 'Watered' });
    await (await dialog.getHarness(MatInputHarness)).setValue('0.8 L from below');
    expect(await dialog.getText()).toContain('Usual caution');
    const save = await dialog.getHarness(MatButtonHarness.with({ text: 'Note it' }));
    await save.click();
    const events = `${base}/shelves/${inventedId(1)}/events`;
    const first = server.expectOne(events);
    first.flush(null, { status: 503, statusText: 'x' });
    expect(await dialog.getText()).toContain('Nothing was lost');

    await save.click();
    const again = server.expectOne(events);
    expect(again.request.body).toEqual({ kind: 'watered', text: '0.8 L from below' });
    expect(again.request.headers.get('Idempotency-Key')).toBe(first.request.headers.get('Idempotency-Key'));
    again.flush(
      {
        id: inventedId(600),
        shelfId: inventedId(1),
        at: '2026-12-01T14:21:00Z',
        kind: 'watered',
        text: '0.8 L from below',
        personName: 'Maren Oxley',
      },
      { status: 201, statusText: 'Created' },
    );
    await fixture.whenStable();
    expect(await (await document.getHarness(MatSnackBarHarness)).getMessage()).toBe('Noted');
    expect(await document.getAllHarnesses(MatDialogHarness)).toHaveLength(0);
  });

  it('lets a viewer look only, and asks for scenarios only for a keeper', async () => {
    await shown(board(), 'viewer');
    const buttons = await loader.getAllHarnesses(MatButtonHarness);
    expect(await Promise.all(buttons.map((button) => button.getText()))).toEqual(['dark_modeLamps-off view']);
    TestBed.resetTestingModule();
    await shown(board(), 'keeper');
    const [scenarios] = await fixture.getDeferBlocks();
    await scenarios?.render(DeferBlockState.Complete);
    server.expectOne(`${base}/scenarios`).flush(null, { status: 404, statusText: 'x' });
  });
});
