import type { AddressInfo } from 'node:net';
import { io, type Socket } from 'socket.io-client';
import { readingsReceipt, type ReadingsReceipt } from '@shared/contracts/devices';
import { aDevice, aPlacement, aSensor } from '../builders/devices';
import { aShelf } from '../builders/rooms';
import { Caller } from './caller';
import { startTestApplication, type TestApplication } from './test-application';

describe('readings of a device', () => {
  let application: TestApplication;
  let token: string;
  let sensorId: string;
  let deviceId: string;
  let caller: Caller;

  beforeAll(async () => {
    application = await startTestApplication();
    await new Promise<void>((resolve) => application.app.http.listen(0, '127.0.0.1', resolve));
  });
  afterAll(async () => {
    application.app.http.close();
    await application.stop();
  });

  beforeEach(async () => {
    const { tx } = application;
    const shelf = await aShelf(tx);
    const made = await aDevice(tx, { roomId: shelf.roomId });
    token = made.token;
    deviceId = made.device.id;
    const sensor = await aSensor(tx, { deviceId, key: 'air', quantity: 'airTemperature' });
    sensorId = sensor.id;
    await aPlacement(tx, { sensorId, shelfId: shelf.id });
    caller = Caller.withBearer(application.express, token);
  });

  const at = (secondsAgo: number): number => application.now.getTime() / 1000 - secondsAgo;

  async function post(pack: unknown): Promise<ReadingsReceipt> {
    const reply = await caller
      .call('post', '/devices/readings')
      .set('Content-Type', 'application/senml+json')
      .send(JSON.stringify(pack))
      .expect(200);
    return readingsReceipt.parse(reply.body);
  }

  async function held(): Promise<{ at: Date; value: number; flags: number }[]> {
    return application.tx.query('SELECT at, value, flags FROM reading WHERE sensor_id = $1 ORDER BY at', [
      sensorId,
    ]);
  }

  it('are to be sent again, and keep nobody waiting, while something holds their sensor for long', async () => {
    const runner = application.tx.connection.createQueryRunner();
    await runner.startTransaction();
    await runner.query('SELECT FROM sensor WHERE id = $1 FOR UPDATE', [sensorId]);
    const pack = [{ n: 'air', t: at(600), v: 20.5 }];
    const reply = await caller
      .call('post', '/devices/readings')
      .set('Content-Type', 'application/senml+json')
      .send(JSON.stringify(pack));
    await runner.rollbackTransaction();
    await runner.release();
    expect(reply).toMatchObject({ status: 503, body: { code: 'BUSY' } });
    expect(await held()).toEqual([]);
    expect(await post(pack)).toEqual({ stored: 1, alreadyHeld: 0, refused: [] });
  });

  it('are stored once, however often they come, zero among them', async () => {
    const pack = [
      { n: 'air', t: at(600), v: 20.5 },
      { n: 'air', t: at(300), v: 0 },
    ];
    expect(await post(pack)).toEqual({ stored: 2, alreadyHeld: 0, refused: [] });
    expect(await post(pack)).toEqual({ stored: 0, alreadyHeld: 2, refused: [] });
    expect((await held()).map(({ value }) => value)).toEqual([20.5, 0]);
  });

  it('more than two minutes ahead are refused with the reason, up to then they are taken', async () => {
    const receipt = await post([
      { n: 'air', t: at(-119), v: 20 },
      { n: 'air', t: at(-121), v: 21 },
    ]);
    expect(receipt.stored).toBe(1);
    expect(receipt.refused).toEqual([expect.objectContaining({ index: 1, code: 'IN_FUTURE' })]);
  });

  it('of an unknown sensor are refused, the others stored', async () => {
    const receipt = await post([
      { n: 'water', t: at(10), v: 1 },
      { n: 'air', t: at(10), v: 20 },
    ]);
    expect(receipt.stored).toBe(1);
    expect(receipt.refused).toEqual([expect.objectContaining({ index: 0, code: 'UNKNOWN_SENSOR' })]);
  });

  it('that contradict what is held leave it as it is and say so', async () => {
    await post([{ n: 'air', t: at(60), v: 20 }]);
    const receipt = await post([
      { n: 'air', t: at(60), v: 25 },
      { n: 'air', t: at(30), v: 21 },
    ]);
    expect(receipt).toMatchObject({ stored: 1, refused: [{ index: 0, code: 'DIFFERENT_VALUE_HELD' }] });
    expect((await held()).map(({ value }) => value)).toEqual([20, 21]);
  });

  it('that no thermometer shows are kept as failed and are in no sum', async () => {
    await post([
      { n: 'air', t: at(600), v: 20 },
      { n: 'air', t: at(300), v: 120 },
      { n: 'air', t: at(0), v: 20 },
    ]);
    expect((await held()).map(({ flags }) => flags >= 32)).toEqual([false, true, false]);
    const [hour]: { max: number }[] = await application.tx.query(
      'SELECT max(max) AS max FROM hourly_summary WHERE sensor_id = $1',
      [sensorId],
    );
    expect(hour?.max).toBe(20);
  });

  it('of a device whose token is unknown or was revoked get in nowhere', async () => {
    const stranger = Caller.withBearer(application.express, 'x'.repeat(43));
    await stranger
      .call('post', '/devices/readings')
      .send([{ n: 'air', v: 1 }])
      .expect(401);
    await application.tx.query('UPDATE device SET revoked_at = now() WHERE id = $1', [deviceId]);
    await caller
      .call('post', '/devices/readings')
      .send([{ n: 'air', v: 1 }])
      .expect(401);
    expect(await held()).toHaveLength(0);
  });

  it('tell the device where to go on from', async () => {
    await post([{ n: 'air', t: at(300), v: 20 }]);
    const reply = await caller.call('get', '/devices/state').expect(200);
    expect(reply.body).toEqual([{ sensor: 'air', latestAt: new Date(at(300) * 1000).toISOString() }]);
  });

  describe('over a socket', () => {
    let socket: Socket;

    beforeEach(async () => {
      socket = connect(token);
      await new Promise<void>((resolve, reject) => {
        socket.once('connect', resolve);
        socket.once('connect_error', reject);
      });
    });
    afterEach(() => {
      socket.disconnect();
    });

    function connect(withToken: string): Socket {
      const { port } = application.app.http.address() as AddressInfo;
      return io(`http://127.0.0.1:${port}/devices`, {
        auth: { token: withToken },
        transports: ['websocket'],
        forceNew: true,
        reconnection: false,
      });
    }

    it('are acknowledged after the commit with what became of them', async () => {
      const readings = [
        { sensor: 'air', at: new Date(at(60) * 1000).toISOString(), value: 19.5 },
        { sensor: 'air', at: new Date(at(-600) * 1000).toISOString(), value: 19.6 },
      ];
      const answer: unknown = await socket.timeout(10_000).emitWithAck('readings:batch', { readings });
      expect(readingsReceipt.parse(answer)).toMatchObject({ stored: 1, refused: [{ code: 'IN_FUTURE' }] });
      expect(await held()).toHaveLength(1);
    });

    it('in a batch that is none get an answer that a device can read', async () => {
      const answer: unknown = await socket
        .timeout(10_000)
        .emitWithAck('readings:batch', { readings: 'many' });
      expect(answer).toEqual({ error: expect.objectContaining({ code: 'INVALID' }) as unknown });
    });

    it('with a token that nobody gave out are not let in', async () => {
      const stranger = connect('y'.repeat(43));
      const error = await new Promise<Error>((resolve) => stranger.once('connect_error', resolve));
      expect(error.message).toBe('UNKNOWN_DEVICE');
      stranger.disconnect();
    });

    it('find no way in through other namespaces', async () => {
      const { port } = application.app.http.address() as AddressInfo;
      for (const namespace of ['', '/live']) {
        const other = io(`http://127.0.0.1:${port}${namespace}`, {
          auth: { token },
          transports: ['websocket'],
          forceNew: true,
          reconnection: false,
        });
        const error = await new Promise<Error>((resolve) => other.once('connect_error', resolve));
        expect(error.message).toMatch(/NO_SUCH_NAMESPACE|SIGNED_OUT/);
        other.disconnect();
      }
    });
  });
});
