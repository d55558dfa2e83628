import type { ChildProcess } from 'node:child_process';
import { once } from 'node:events';
import type { SenmlPack } from '@shared/contracts/devices';
import { Caller } from '../api/caller';
import { aMailedRoom, startMailHarness, type MailHarness } from '../api/mail-harness';
import { aDevice, aPlacement, aSensor } from '../builders/devices';
import { HeldWrites } from './held-writes';
import { startProcess } from './start-process';

const minute = 60_000;

describe('killed in the middle of an evaluation', () => {
  let harness: MailHarness;

  beforeEach(async () => {
    harness = await startMailHarness();
  });
  afterEach(() => harness.stop());

  /** A thermometer of which every reading lies as far outside its range as said, from half an hour ago on. */
  async function aThermometer(value: number) {
    const { tx, express, now } = harness.application;
    const { roomId, shelfId, email } = await aMailedRoom(harness);
    const { device, token } = await aDevice(tx, { roomId });
    const sensor = await aSensor(tx, { deviceId: device.id, key: 'air' });
    await aPlacement(tx, { sensorId: sensor.id, shelfId });
    const pack: SenmlPack = Array.from({ length: 7 }, (_, index) => ({
      n: 'air',
      t: (now.getTime() - (6 - index) * 5 * minute) / 1_000,
      v: value + index / 100,
    }));
    const caller = Caller.withBearer(express, token);
    return {
      sensorId: sensor.id,
      email,
      send: () => caller.call('post', '/devices/readings').send(pack),
      sendTo: (port: number) =>
        fetch(`http://127.0.0.1:${port}/api/v1/devices/readings`, {
          method: 'POST',
          headers: { Authorization: `Bearer ${token}`, 'Content-Type': 'application/senml+json' },
          body: JSON.stringify(pack),
        }),
    };
  }

  /** Does something that writes to a table, and ends it there. */
  async function endedWhileWriting(
    table: string,
    work: () => Promise<unknown>,
    end: (databaseProcesses: readonly number[]) => Promise<unknown>,
  ): Promise<void> {
    const writes = await HeldWrites.on(harness.application, table, 'BEFORE INSERT');
    const working = work().catch(() => undefined);
    await end(await writes.waiting());
    await working;
    await writes.release();
  }

  async function alertsOf(sensorId: string): Promise<{ kind: string; told: boolean }[]> {
    return harness.application.tx.query(
      'SELECT kind, told_at IS NOT NULL AS told FROM alert WHERE sensor_id = $1',
      [sensorId],
    );
  }

  /** Whether there is one alert, and one mail about it that has gone out once. */
  async function expectOnce(sensorId: string, kind: string, email: string): Promise<void> {
    await harness.after(1);
    await harness.after(60);
    expect(await alertsOf(sensorId)).toEqual([{ kind, told: true }]);
    expect(await harness.mailsTo(email)).toHaveLength(1);
  }

  // What is written first, and what is written last.
  describe.each(['alert', 'mail'])('that writes its %s,', (table) => {
    describe('a database connection', () => {
      const killConnections = (pids: readonly number[]): Promise<unknown> =>
        harness.application.tx.query('SELECT pg_terminate_backend(pid) FROM unnest($1::int[]) AS pid', [
          pids,
        ]);

      it('leaves nothing of the readings: sent again, they make one alert and one mail', async () => {
        const { sensorId, email, send } = await aThermometer(45);
        await endedWhileWriting(table, async () => send().expect(503), killConnections);
        expect(await alertsOf(sensorId)).toEqual([]);
        await send().expect(200);
        await send().expect(200);
        await expectOnce(sensorId, 'dangerHigh', email);
      });

      it('leaves a second look to the next, which makes one alert and one mail', async () => {
        const { sensorId, email, send } = await aThermometer(-45);
        const { secondLookJob } = harness.application.app.services;
        await send().expect(200);
        await endedWhileWriting(table, () => secondLookJob.run(), killConnections);
        expect(await alertsOf(sensorId)).toEqual([]);
        await secondLookJob.run();
        await secondLookJob.run();
        await expectOnce(sensorId, 'sensorFailed', email);
      });
    });

    describe('a server', () => {
      let server: ChildProcess;
      let port: number;

      beforeEach(async () => {
        server = startProcess('server-process', harness.application, {});
        [{ port }] = (await once(server, 'message')) as [{ port: number }];
      });
      afterEach(() => server.kill('SIGKILL'));

      const killServer = async (): Promise<void> => {
        const ended = once(server, 'exit');
        server.kill('SIGKILL');
        expect(await ended).toEqual([null, 'SIGKILL']);
      };

      it('leaves nothing of the readings: sent to the next, they make one alert and one mail', async () => {
        const { sensorId, email, send, sendTo } = await aThermometer(45);
        await endedWhileWriting(table, () => sendTo(port), killServer);
        expect(await alertsOf(sensorId)).toEqual([]);
        await send().expect(200);
        await expectOnce(sensorId, 'dangerHigh', email);
      });

      it('leaves its second look to the next, which makes one alert and one mail', async () => {
        const { sensorId, email, sendTo } = await aThermometer(-45);
        expect((await sendTo(port)).status).toBe(200);
        await endedWhileWriting(table, async () => server.send('look again'), killServer);
        expect(await alertsOf(sensorId)).toEqual([]);
        await harness.application.app.services.secondLookJob.run();
        await expectOnce(sensorId, 'sensorFailed', email);
      });
    });
  });
});
