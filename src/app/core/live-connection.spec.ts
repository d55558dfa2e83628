import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { TestBed } from '@angular/core/testing';
import { provideRouter } from '@angular/router';
import { account, membership } from './testing/account-builder';
import { FakeSocket } from './testing/fake-socket';
import { LiveConnection } from './live-connection';
import { LiveState, type Liveness } from './live-state';
import { liveSocket } from './live-socket';
import { Session } from './session';

const roomId = membership().roomId;

describe('the live connection', () => {
  let socket: FakeSocket;
  let live: LiveConnection;
  let session: Session;
  const state = (): Liveness => TestBed.inject(LiveState).now();

  beforeEach(() => {
    jest.useFakeTimers({ doNotFake: ['queueMicrotask'] });
    localStorage.clear();
    socket = new FakeSocket();
    TestBed.configureTestingModule({
      providers: [
        provideHttpClient(),
        provideHttpClientTesting(),
        provideRouter([{ path: '**', children: [] }]),
        { provide: liveSocket, useValue: socket },
      ],
    });
    session = TestBed.inject(Session);
    live = TestBed.inject(LiveConnection);
    TestBed.tick();
  });
  afterEach(() => jest.useRealTimers());

  function signIn(): void {
    session.load().subscribe();
    TestBed.inject(HttpTestingController).expectOne('/api/v1/account').flush(account());
    TestBed.tick();
  }

  it('waits for someone to sign in', () => {
    expect(socket.connections).toBe(0);
    signIn();
    expect(socket.connections).toBe(1);
  });

  it('watches the room, and only then is live', async () => {
    signIn();
    expect(state()).toBe('connecting');
    await socket.connectAndWatch();
    expect(socket.watched).toEqual([{ roomId }]);
    expect(state()).toBe('live');
  });

  it('says so when it was lost and when it has caught up', async () => {
    let caughtUp = 0;
    live.caughtUp.subscribe(() => (caughtUp += 1));
    signIn();
    await socket.connectAndWatch();
    expect(caughtUp).toBe(1);
    socket.tell('disconnect', 'transport close');
    expect(state()).toBe('reconnecting');
    await socket.connectAndWatch();
    expect(state()).toBe('live');
    expect(caughtUp).toBe(2);
  });

  it('tries again by itself where socket.io would not', () => {
    signIn();
    socket.active = false;
    socket.tell('connect_error', new Error('not signed in'));
    expect(state()).toBe('reconnecting');
    jest.advanceTimersByTime(5000);
    expect(socket.connections).toBe(2);
  });

  it('begins afresh when the server does not answer', async () => {
    socket.answer = () => Promise.reject(new Error('timed out'));
    signIn();
    await socket.connectAndWatch();
    expect(state()).toBe('reconnecting');
    jest.advanceTimersByTime(5000);
    expect(socket.connections).toBe(2);
  });

  it('without a network is offline, and says when the network is back', () => {
    signIn();
    const onLine = jest.spyOn(navigator, 'onLine', 'get').mockReturnValue(false);
    socket.tell('disconnect', 'transport close');
    expect(state()).toBe('offline');
    onLine.mockReturnValue(true);
    dispatchEvent(new Event('online'));
    expect(state()).toBe('reconnecting');
    onLine.mockRestore();
  });

  it('tells what it can read and leaves out what it cannot', () => {
    const warned = jest.spyOn(console, 'warn').mockImplementation(() => undefined);
    const told: unknown[] = [];
    live.on('room:changed').subscribe((room) => told.push(room));
    socket.tell('room:changed', { roomId });
    socket.tell('room:changed', { roomId: 7 });
    expect(told).toEqual([{ roomId }]);
    expect(warned).toHaveBeenCalledTimes(1);
    warned.mockRestore();
  });

  it('ends with the session', async () => {
    signIn();
    await socket.connectAndWatch();
    session.signOut().subscribe();
    TestBed.inject(HttpTestingController)
      .expectOne('/api/v1/session')
      .flush(null, { status: 204, statusText: 'No Content' });
    TestBed.tick();
    expect(socket.connected).toBe(false);
    expect(state()).toBe('connecting');
  });
});
