import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { TestBed } from '@angular/core/testing';
import { provideRouter } from '@angular/router';
import { AlertFeed } from './alert-feed';
import { AlertInbox } from './alert-inbox';
import { liveSocket } from './live-socket';
import { RoomClock } from './room-clock';
import { Session } from './session';
import { account } from './testing/account-builder';
import { alert, inventedId } from './testing/board-builder';
import { FakeSocket } from './testing/fake-socket';

const address = `/api/v1/rooms/${account().memberships[0]?.roomId}/alerts`;

describe('the inbox of open alerts', () => {
  let socket: FakeSocket;
  let server: HttpTestingController;
  let feed: AlertFeed;
  let inbox: AlertInbox;

  beforeEach(() => {
    localStorage.clear();
    socket = new FakeSocket();
    TestBed.configureTestingModule({
      providers: [
        provideHttpClient(),
        provideHttpClientTesting(),
        provideRouter([]),
        { provide: liveSocket, useValue: socket },
      ],
    });
    server = TestBed.inject(HttpTestingController);
    TestBed.inject(Session).load().subscribe();
    server.expectOne('/api/v1/account').flush(account());
    feed = TestBed.inject(AlertFeed);
    inbox = TestBed.inject(AlertInbox);
    TestBed.tick();
  });

  const answer = (alerts: unknown[]): void =>
    server
      .expectOne(({ url, params }) => url === address && params.get('open') === 'true')
      .flush({ alerts, nextCursor: null });

  it('counts those that nobody has seen', () => {
    expect(inbox.open()).toBeNull();
    expect(inbox.unseenCount()).toBe(0);
    answer([alert(), alert({ id: inventedId(901), acknowledgedAt: '2026-12-01T14:10:00Z' })]);
    expect(inbox.open()).toHaveLength(2);
    expect(inbox.unseenCount()).toBe(1);
  });

  it('does not count those that are quiet, until that is over', () => {
    const clock = TestBed.inject(RoomClock);
    clock.setBy('2026-12-01T14:20:00Z');
    const quiet = { until: '2026-12-01T17:00:00Z', setAt: '2026-12-01T14:10:00Z', setByName: null };
    answer([alert(), alert({ id: inventedId(901), quiet })]);
    expect(inbox.unseenCount()).toBe(1);
    clock.setBy('2026-12-01T17:00:01Z');
    expect(inbox.unseenCount()).toBe(2);
  });

  it('takes a new alert first, a changed one in its place, and drops one that cleared', () => {
    answer([alert()]);
    socket.tell('alert:changed', alert({ id: inventedId(901), shelfLabel: 'B2' }));
    socket.tell('alert:changed', alert({ peakValue: 30 }));
    expect(inbox.open()?.map(({ shelfLabel, peakValue }) => [shelfLabel, peakValue])).toEqual([
      ['B2', 28.3],
      ['A1', 30],
    ]);
    socket.tell('alert:changed', alert({ clearedAt: '2026-12-01T14:19:00Z' }));
    expect(inbox.open()?.map(({ shelfLabel }) => shelfLabel)).toEqual(['B2']);
  });

  it('is fetched again when the connection is back', async () => {
    answer([alert()]);
    await socket.connectAndWatch();
    answer([]);
    expect(inbox.open()).toEqual([]);
  });

  it('keeps what it holds while it can’t be fetched', async () => {
    answer([alert()]);
    await socket.connectAndWatch();
    server.expectOne(({ url }) => url === address).flush(null, { status: 503, statusText: 'x' });
    expect(inbox.open()).toHaveLength(1);
    expect(feed.failure()).not.toBeNull();
  });
});
