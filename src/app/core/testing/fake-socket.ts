import { Observable } from 'rxjs';

type Listener = (...told: unknown[]) => void;

/** Plays the `/live` socket in specs: what the server tells is told by hand. */
export class FakeSocket {
  connected = false;
  active = true;
  /** Rooms asked to be watched, in order. */
  readonly watched: unknown[] = [];
  /** What the server answers to `room:watch`. */
  answer: () => Promise<{ ok: boolean }> = () => Promise.resolve({ ok: true });
  connections = 0;
  private readonly listeners = new Map<string, Listener[]>();

  on(name: string, listener: Listener): this {
    this.listeners.set(name, [...(this.listeners.get(name) ?? []), listener]);
    return this;
  }

  fromEvent<T>(name: string): Observable<T> {
    return new Observable((observer) => {
      this.on(name, (told) => observer.next(told as T));
    });
  }

  connect(): this {
    this.connections += 1;
    return this;
  }

  disconnect(): this {
    this.connected = false;
    return this;
  }

  timeout(): this {
    return this;
  }

  emitWithAck(_name: string, request: unknown): Promise<unknown> {
    this.watched.push(request);
    return this.answer();
  }

  /** The server tells something; `connect` and `disconnect` change the state too. */
  tell(name: string, ...told: unknown[]): void {
    if (name === 'connect') this.connected = true;
    if (name === 'disconnect') this.connected = false;
    for (const listener of this.listeners.get(name) ?? []) listener(...told);
  }

  /** Connects, and lets the answer to `room:watch` arrive. */
  async connectAndWatch(): Promise<void> {
    this.tell('connect');
    await Promise.resolve();
    await Promise.resolve();
  }
}
