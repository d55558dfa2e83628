import { TestbedHarnessEnvironment } from '@angular/cdk/testing/testbed';
import type { HttpTestingController } from '@angular/common/http/testing';
import { TestBed, type ComponentFixture } from '@angular/core/testing';
import { MATERIAL_ANIMATIONS } from '@angular/material/core';
import { MatButtonHarness } from '@angular/material/button/testing';
import { MatSnackBarHarness } from '@angular/material/snack-bar/testing';
import type { Role } from '@shared/contracts/people';
import { account, membership } from '../../core/testing/account-builder';
import { airConflict, shelfAdvice } from '../../core/testing/advice-builder';
import { board, boardShelf, inventedId, task } from '../../core/testing/board-builder';
import { FakeSocket } from '../../core/testing/fake-socket';
import { providePlayedServer, signedInAs } from '../../core/testing/signed-in';
import { ShelfData } from '../shelf-data';
import { ShelfAdviceCard } from './shelf-advice-card';

const base = `/api/v1/rooms/${membership().roomId}`;
const lampsOn = {
  state: 'on' as const,
  hours: 12,
  reason: 'Leek is up and wants 12–16 h of light.',
  change: 'switchOn' as const,
};

describe('what grows on a shelf asks for', () => {
  let fixture: ComponentFixture<ShelfAdviceCard>;
  let server: HttpTestingController;
  let socket: FakeSocket;
  const text = (): string =>
    (fixture.nativeElement as HTMLElement).textContent.replace(/[\s\u00a0\u2060]+/g, ' ');

  async function shown(advice = shelfAdvice(), role: Role = 'helper', tasks = [task()]): Promise<void> {
    socket = new FakeSocket();
    TestBed.configureTestingModule({
      providers: [
        ...providePlayedServer(socket),
        ShelfData,
        { provide: MATERIAL_ANIMATIONS, useValue: { animationsDisabled: true } },
      ],
    });
    server = signedInAs(account({ memberships: [membership({ role })] }));
    TestBed.inject(ShelfData).shelfId.set(inventedId(1));
    fixture = TestBed.createComponent(ShelfAdviceCard);
    TestBed.tick();
    const racks = [{ id: inventedId(300), name: 'Rack A', note: '', shelves: [boardShelf({ advice })] }];
    server.expectOne(`${base}/board`).flush(board({ racks, tasks }));
    // The rest of the page's data is not what this is about.
    const gone = { status: 404, statusText: 'x' };
    server
      .match(({ url }) => url.includes('/shelves/') || url.endsWith('/alerts'))
      .forEach((one) => one.flush(null, gone));
    await fixture.whenStable();
  }

  it('says what to do with the lamps and why, and follows what is told', async () => {
    await shown(shelfAdvice({ lamps: lampsOn }));
    expect(text()).toContain('Lamps on, 12 h a day');
    expect(text()).toContain('switch on now');
    expect(text()).toContain(lampsOn.reason);
    socket.tell('shelf:advised', shelfAdvice({ lamps: { ...lampsOn, change: null } }));
    socket.tell('shelf:advised', shelfAdvice({ shelfId: inventedId(2), notes: ['Of another shelf.'] }));
    await fixture.whenStable();
    expect(text()).not.toContain('switch on now');
    expect(text()).not.toContain('Of another shelf.');
  });

  it('names what does not go together and where something fits', async () => {
    const sentence = 'B2 fits Lettuce: move it there.';
    const moves = [{ shelfId: inventedId(2), shelf: 'B2', plantingIds: [inventedId(501)], sentence }];
    await shown(shelfAdvice({ conflicts: [airConflict()], moves }));
    expect(text()).toContain('2.8 °C apart');
    expect(text()).toContain(sentence);
    const link = (fixture.nativeElement as HTMLElement).querySelector('.move a');
    expect(link?.getAttribute('href')).toBe(`/shelf/${inventedId(2)}`);
  });

  it('shows ranges with who says so', async () => {
    const wanted = {
      quantity: 'airTemperature' as const,
      when: 'lampsOn' as const,
      range: { low: 18, high: 21 },
      reason: 'Leek seedlings',
      source: 'Extension table',
      isSet: true,
    };
    await shown(shelfAdvice({ wanted: [wanted] }));
    expect(text()).toContain('Air with lamps on: 18 – 21 °C');
    expect(text()).toContain('Leek seedlings. Alerts go by it.');
    expect(text()).toContain('Source: Extension table.');
  });

  it('has its open care ticked, with a way back', async () => {
    await shown(shelfAdvice(), 'helper', [
      task(),
      task({ id: inventedId(801), shelfId: inventedId(2), title: 'Elsewhere' }),
      task({ id: inventedId(802), dueOn: '2026-12-03', title: 'In two days' }),
    ]);
    expect(text()).toContain('Feed strawberries Half strength');
    expect(text()).not.toContain('Elsewhere');
    expect(text()).not.toContain('In two days');
    const loader = TestbedHarnessEnvironment.documentRootLoader(fixture);
    await (await loader.getHarness(MatButtonHarness.with({ text: 'Done' }))).click();
    const completion = `${base}/tasks/${task().id}/completion`;
    server.expectOne(completion).flush(task({ doneAt: '2026-12-01T14:21:00Z' }));
    TestBed.tick();
    server.expectOne(`${base}/board`).flush(board({ tasks: [task({ doneAt: '2026-12-01T14:21:00Z' })] }));
    await (await loader.getHarness(MatSnackBarHarness)).dismissWithAction();
    expect(server.expectOne(completion).request.method).toBe('DELETE');
  });

  it('lets a viewer look only', async () => {
    await shown(shelfAdvice(), 'viewer');
    expect((fixture.nativeElement as HTMLElement).querySelector('.task button')).toBeNull();
  });
});
