import type { HttpTestingController } from '@angular/common/http/testing';
import { TestBed } from '@angular/core/testing';
import { RoomClock } from '../../core/room-clock';
import { Session } from '../../core/session';
import { account, membership } from '../../core/testing/account-builder';
import { alert, board, boardShelf, inventedId, measure, task } from '../../core/testing/board-builder';
import { shelfAdvice } from '../../core/testing/advice-builder';
import { FakeSocket } from '../../core/testing/fake-socket';
import { providePlayedServer, signedInAs } from '../../core/testing/signed-in';
import { RoomBoard } from './room-board';

const second = membership({ roomId: inventedId(2), roomName: 'Cellar' });
const path = `/api/v1/rooms/${membership().roomId}/board`;

describe('the board of the room', () => {
  let socket: FakeSocket;
  let server: HttpTestingController;
  let room: RoomBoard;

  beforeEach(() => {
    socket = new FakeSocket();
    TestBed.configureTestingModule({ providers: [...providePlayedServer(socket), RoomBoard] });
    server = signedInAs(account({ memberships: [membership(), second] }));
    room = TestBed.inject(RoomBoard);
    TestBed.tick();
  });
  afterEach(() => server.verify());

  const air = (): number | undefined => room.board()?.racks[0]?.shelves[0]?.now.measures[0]?.value;
  const warmer = { ...boardShelf().now, measures: [measure('airTemperature', 29.5)] };

  it('is fetched once at first, and sets the clock', () => {
    server.expectOne(path).flush(board({ at: '2026-12-01T15:00:00Z' }));
    expect(air()).toBe(28.3);
    expect(TestBed.inject(RoomClock).now()).toBe(Date.parse('2026-12-01T15:00:00Z'));
  });

  it('takes what is told, and knows the alerts of each shelf', () => {
    server.expectOne(path).flush(board({ openAlerts: [] }));
    expect(room.alertsByShelf().size).toBe(0);
    socket.tell('shelf:measured', warmer);
    socket.tell('alert:changed', alert());
    socket.tell('task:changed', task({ doneAt: '2026-12-01T14:21:00Z' }));
    expect(air()).toBe(29.5);
    expect(room.alertsByShelf().get(inventedId(1))).toEqual([alert()]);
    expect(room.board()?.tasks[0]?.doneAt).toBe('2026-12-01T14:21:00Z');
  });

  it('knows what shelves need, as it is told', () => {
    server.expectOne(path).flush(board());
    expect(room.needsByShelf().size).toBe(0);
    const heatMat = { state: 'off' as const, reason: 'All are up.', change: 'switchOff' as const };
    socket.tell('shelf:advised', shelfAdvice({ heatMat }));
    expect(room.needsByShelf().get(inventedId(1))).toMatchObject([{ title: 'A1 heat mat off' }]);
  });

  it('keeps what was told while an older answer was on its way', () => {
    const fetching = server.expectOne(path);
    socket.tell('shelf:measured', warmer);
    fetching.flush(board());
    expect(air()).toBe(29.5);
  });

  it('fetches again what it may have missed, once the connection is back', async () => {
    server.expectOne(path).flush(board());
    await socket.connectAndWatch();
    server.expectOne(path).flush(board({ sensorsReporting: 2 }));
    expect(room.board()?.sensorsReporting).toBe(2);
    socket.tell('room:changed', { roomId: membership().roomId });
    server.expectOne(path).flush(board({ sensorsReporting: 3 }));
    expect(room.board()?.sensorsReporting).toBe(3);
  });

  it('stays as it was when it can’t be fetched again, and says why', () => {
    server.expectOne(path).flush(board());
    room.refresh();
    server.expectOne(path).flush(null, { status: 503, statusText: 'x' });
    expect(air()).toBe(28.3);
    expect(room.failure()).toHaveProperty('kind', 'offline');
    room.refresh();
    server.expectOne(path).flush(board());
    expect(room.failure()).toBeNull();
  });

  it('of another room never shows the first one’s shelves', () => {
    server.expectOne(path).flush(board());
    TestBed.inject(Session).chooseRoom(second.roomId);
    TestBed.tick();
    expect(room.board()).toBeNull();
    server.expectOne(`/api/v1/rooms/${second.roomId}/board`).flush(board({ roomId: second.roomId }));
    expect(room.board()?.roomId).toBe(second.roomId);
  });

  it('begins anew at the room’s midnight', () => {
    server.expectOne(path).flush(board());
    TestBed.inject(RoomClock).setBy('2026-12-02T00:00:00Z');
    TestBed.tick();
    server.expectOne(path).flush(board({ today: '2026-12-02', dayEnd: '2026-12-03T00:00:00Z' }));
    expect(room.board()?.today).toBe('2026-12-02');
  });

  it('has news only of alerts that open or clear', () => {
    server.expectOne(path).flush(board());
    socket.tell('alert:changed', alert({ peakValue: 29 }));
    expect(room.news()).toBeNull();
    const opened = alert({ id: inventedId(901) });
    socket.tell('alert:changed', opened);
    expect(room.news()).toEqual(opened);
    const cleared = alert({ endedAt: '2026-12-01T14:19:00Z', clearedAt: '2026-12-01T14:21:00Z' });
    socket.tell('alert:changed', cleared);
    expect(room.news()).toEqual(cleared);
  });

  it('acknowledges an alert', () => {
    server.expectOne(path).flush(board());
    room.acknowledge(alert()).subscribe();
    const acknowledgement = server.expectOne(
      `/api/v1/rooms/${membership().roomId}/alerts/${alert().id}/acknowledgement`,
    );
    expect(acknowledgement.request.method).toBe('POST');
    acknowledgement.flush(alert({ acknowledgedByName: 'Maren Oxley' }));
    expect(room.board()?.openAlerts[0]?.acknowledgedByName).toBe('Maren Oxley');
  });
});
