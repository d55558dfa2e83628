import { DestroyRef, effect, inject, Injectable, untracked } from '@angular/core';
import { liveEventSchemas, type LiveEvents } from '@shared/contracts/live-events';
import { map, share, Subject, filter, type Observable } from 'rxjs';
import { LiveState } from './live-state';
import { liveSocket } from './live-socket';
import { Session } from './session';

/** What is told with an event. */
export type LiveMessage<Name extends keyof LiveEvents> = Parameters<LiveEvents[Name]>[0];

const answerTimeoutMs = 10_000;
const refusedRetryMs = 5_000;

/** Changes in the room, as they happen. Connects while someone is signed in and watches the room they are in. */
@Injectable({ providedIn: 'root' })
export class LiveConnection {
  private readonly socket = inject(liveSocket);
  private readonly session = inject(Session);
  private readonly current = inject(LiveState);
  private readonly watching = new Subject<void>();
  private readonly messages = new Map<string, Observable<unknown>>();
  private retry: ReturnType<typeof setTimeout> | undefined;

  /**
   * Emits each time watching begins: at first, after a lost connection, in another room. What is shown may have
   * changed unseen until then, so fetch it again.
   */
  readonly caughtUp = this.watching.asObservable();

  constructor() {
    this.socket
      .on('connect', () => void this.watch())
      .on('disconnect', (reason: string) => this.lose(reason === 'io server disconnect'))
      .on('connect_error', () => this.lose(!this.socket.active));
    this.followNetwork();
    effect(() => {
      const roomId = this.session.roomId();
      untracked(() => (roomId === null ? this.stop() : this.start()));
    });
    inject(DestroyRef).onDestroy(() => this.stop());
  }

  /**
   * One kind of event in the watched room. What can't be read is left out.
   *
   * @param name - A name of `LiveEvents`.
   */
  on<Name extends keyof LiveEvents>(name: Name): Observable<LiveMessage<Name>> {
    const known = this.messages.get(name) ?? this.listen(name);
    this.messages.set(name, known);
    return known as Observable<LiveMessage<Name>>;
  }

  private listen(name: keyof LiveEvents): Observable<unknown> {
    return this.socket.fromEvent<unknown, string>(name).pipe(
      map((message) => liveEventSchemas[name].safeParse(message)),
      filter((result) => {
        // A newer server may say what this page doesn't know yet; the next fetch will bring it.
        if (!result.success) console.warn(`Unreadable ${name}`, result.error);
        return result.success;
      }),
      map(({ data }) => data),
      share(),
    );
  }

  private start(): void {
    if (this.socket.connected) void this.watch();
    else this.socket.connect();
  }

  private stop(): void {
    clearTimeout(this.retry);
    this.socket.disconnect();
    this.current.set('connecting');
  }

  private async watch(): Promise<void> {
    const roomId = this.session.roomId();
    if (roomId === null) return;
    try {
      const { ok } = (await this.socket.timeout(answerTimeoutMs).emitWithAck('room:watch', { roomId })) as {
        ok: boolean;
      };
      if (!ok || roomId !== this.session.roomId()) return;
      this.current.set('live');
      this.watching.next();
    } catch {
      // No answer in time: the connection is as good as lost, so begin afresh.
      this.lose(true);
    }
  }

  /** @param byServer - Whether socket.io won't try again by itself. */
  private lose(byServer: boolean): void {
    if (this.session.roomId() === null) return;
    this.current.set(navigator.onLine ? 'reconnecting' : 'offline');
    if (!byServer) return;
    clearTimeout(this.retry);
    this.retry = setTimeout(() => this.socket.disconnect().connect(), refusedRetryMs);
  }

  private followNetwork(): void {
    const follow = (): void => {
      if (this.current.now() !== 'live') this.current.set(navigator.onLine ? 'reconnecting' : 'offline');
    };
    for (const change of ['online', 'offline']) addEventListener(change, follow);
    inject(DestroyRef).onDestroy(() => {
      for (const change of ['online', 'offline']) removeEventListener(change, follow);
    });
  }
}
