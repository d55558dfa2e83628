import { createServer } from 'node:http';
import { once } from 'node:events';
import type { AddressInfo } from 'node:net';
import { readingsBatch, type ReadingsReceipt, type SentReading } from '@shared/contracts/devices';
import type { DeviceFailure } from '@shared/contracts/live-events';
import { Server } from 'socket.io';
import { DeviceLink, type DeviceLinkOptions } from './device-link';

type Answer = ReadingsReceipt | DeviceFailure;
type Behaviour = (readings: SentReading[], done: (answer: Answer) => void) => void;

/** A server that plays the part of Lampmeadow: keeps each reading once, and answers as it is told to. */
class PlayedServer {
  readonly held = new Map<string, SentReading>();
  readonly arrivals: SentReading[][] = [];
  behaviours: Behaviour[] = [];
  port = 0;
  private http = createServer();
  private sockets = new Server(this.http);

  async listen(): Promise<void> {
    this.http = createServer();
    this.sockets = new Server(this.http);
    this.sockets.of('/devices').use((socket, next) => {
      next(
        (socket.handshake.auth as { token?: string }).token === 'good' ? undefined : new Error('bad token'),
      );
    });
    this.sockets.of('/devices').on('connection', (socket) => {
      socket.on('readings:batch', (batch: unknown, done: (answer: Answer) => void) => {
        const { readings } = readingsBatch.parse(batch);
        this.arrivals.push(readings);
        const behave = this.behaviours.shift() ?? ((some, answer) => answer(this.store(some)));
        behave(readings, done);
      });
    });
    this.http.listen(this.port, '127.0.0.1');
    await once(this.http, 'listening');
    this.port = (this.http.address() as AddressInfo).port;
  }

  async close(): Promise<void> {
    await this.sockets.close();
  }

  store(readings: readonly SentReading[]): ReadingsReceipt {
    const isHeld = ({ sensor, at }: SentReading): boolean => this.held.has(`${sensor} ${at}`);
    const alreadyHeld = readings.filter(isHeld).length;
    for (const reading of readings) this.held.set(`${reading.sensor} ${reading.at}`, reading);
    return { stored: readings.length - alreadyHeld, alreadyHeld, refused: [] };
  }
}

function reading(index: number): SentReading {
  return { sensor: 'a1-air', at: new Date(index * 1000).toISOString(), value: index };
}

async function until(isSo: () => boolean): Promise<void> {
  while (!isSo()) await new Promise((resolve) => setTimeout(resolve, 5));
}

describe('a device’s link to the server', () => {
  let server: PlayedServer;
  let link: DeviceLink | undefined;

  function connect(overrides: Partial<DeviceLinkOptions> = {}): DeviceLink {
    link = new DeviceLink({
      url: `http://127.0.0.1:${server.port}`,
      token: 'good',
      name: 'Rack A',
      log: () => undefined,
      acknowledgeWithinMs: 150,
      retryAfterMs: 10,
      batchReadings: 3,
      ...overrides,
    });
    return link;
  }

  beforeEach(async () => {
    server = new PlayedServer();
    await server.listen();
  });
  afterEach(async () => {
    link?.stop();
    await server.close();
  });

  it('sends readings in order, in batches, and lets them go when they are acknowledged', async () => {
    const device = connect();
    device.send([1, 2, 3, 4, 5].map(reading));
    await until(() => device.tally.waiting === 0);
    expect(server.arrivals.map((batch) => batch.map(({ value }) => value))).toEqual([
      [1, 2, 3],
      [4, 5],
    ]);
    expect(device.tally).toEqual({ stored: 5, alreadyHeld: 0, refused: 0, waiting: 0, dropped: 0 });
  });

  it('whose acknowledgement got lost after the commit sends again, and nothing is held twice', async () => {
    server.behaviours = [(readings) => void server.store(readings)];
    const device = connect();
    device.send([1, 2].map(reading));
    await until(() => device.tally.waiting === 0);
    expect(server.arrivals).toHaveLength(2);
    expect(server.held.size).toBe(2);
    expect(device.tally).toMatchObject({ stored: 0, alreadyHeld: 2 });
  });

  it('told that the server cannot store now keeps the batch and sends it again', async () => {
    const busy: Behaviour = (_readings, done) => {
      done({ error: { code: 'UNAVAILABLE', message: 'The database is away.' } });
    };
    server.behaviours = [busy, busy];
    const device = connect();
    device.send([1, 2, 3, 4].map(reading));
    await until(() => device.tally.waiting === 0);
    expect([...server.held.values()].map(({ value }) => value)).toEqual([1, 2, 3, 4]);
  });

  it('through a server that goes away and comes back loses nothing and keeps the order', async () => {
    const device = connect();
    device.send([1, 2].map(reading));
    await until(() => device.tally.waiting === 0);
    await server.close();
    device.send([3, 4, 5, 6, 7].map(reading));
    expect(device.tally.waiting).toBe(5);
    await server.listen();
    await until(() => device.tally.waiting === 0);
    expect([...server.held.values()].map(({ value }) => value)).toEqual([1, 2, 3, 4, 5, 6, 7]);
  });

  it('does not send again what was refused, and says which', async () => {
    const lines: string[] = [];
    server.behaviours = [
      (readings, done) => {
        const refused = [{ index: 1, code: 'UNKNOWN_SENSOR' as const, message: 'No such sensor.' }];
        done({ ...server.store(readings.slice(0, 1)), refused });
      },
    ];
    const device = connect({ log: (line) => lines.push(line) });
    device.send([1, 2].map(reading));
    await until(() => device.tally.waiting === 0);
    expect(device.tally).toMatchObject({ stored: 1, refused: 1 });
    expect(lines.join()).toContain('UNKNOWN_SENSOR');
  });

  it('turned away with a bad token keeps its readings', async () => {
    const lines: string[] = [];
    const device = connect({ token: 'bad', log: (line) => lines.push(line) });
    device.send([reading(1)]);
    await until(() => lines.length > 0);
    expect(lines).toEqual(['Rack A: cannot connect: bad token']);
    expect(device.tally.waiting).toBe(1);
    expect(server.arrivals).toEqual([]);
  });
});
