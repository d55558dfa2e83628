import type { SenmlPack } from '@shared/contracts/devices';
import { Caller } from '../api/caller';
import { aMailedRoom, startMailHarness, type MailHarness } from '../api/mail-harness';
import { aDevice, aPlacement, aSensor } from '../builders/devices';

const minute = 60_000;
/** Any number; held by the test so that an evaluation stands still where it writes its alert. */
const WRITING_LOCK = 88_215;

describe('a database connection killed in the middle of an evaluation', () => {
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
    return { sensorId: sensor.id, email, send: () => caller.call('post', '/devices/readings').send(pack) };
  }

  /** Does something that writes an alert, and kills its connection there. */
  async function killedWhileWriting(work: () => Promise<unknown>): Promise<void> {
    const { tx, database } = harness.application;
    await tx.query(`
      CREATE OR REPLACE FUNCTION wait_before_writing() RETURNS trigger LANGUAGE plpgsql AS $$
      BEGIN PERFORM pg_advisory_xact_lock_shared(${WRITING_LOCK}); RETURN NEW; END $$`);
    await tx.query(`
      CREATE TRIGGER wait_before_writing BEFORE INSERT ON alert FOR EACH ROW EXECUTE FUNCTION wait_before_writing()`);
    const holder = database.dataSource.createQueryRunner();
    await holder.query('SELECT pg_advisory_lock($1)', [WRITING_LOCK]);
    const working = work().catch(() => undefined);
    let killed = 0;
    while (killed === 0) {
      const rows: unknown[] = await tx.query(
        `SELECT pg_terminate_backend(pid) FROM pg_stat_activity
         WHERE datname = current_database() AND wait_event_type = 'Lock' AND wait_event = 'advisory'`,
      );
      killed = rows.length;
    }
    await working;
    await holder.query('SELECT pg_advisory_unlock($1)', [WRITING_LOCK]);
    await holder.release();
    await tx.query('DROP TRIGGER wait_before_writing ON alert');
  }

  async function alertsOf(sensorId: string): Promise<{ kind: string; told: boolean }[]> {
    return harness.application.tx.query(
      'SELECT kind, told_at IS NOT NULL AS told FROM alert WHERE sensor_id = $1',
      [sensorId],
    );
  }

  it('that came with the readings loses none of them: sent again, they make one alert and one mail', async () => {
    const { sensorId, email, send } = await aThermometer(45);
    await killedWhileWriting(async () => send().expect(503));
    expect(await alertsOf(sensorId)).toEqual([]);
    await send().expect(200);
    await send().expect(200);
    await harness.after(1);
    await harness.after(60);
    expect(await alertsOf(sensorId)).toEqual([{ kind: 'dangerHigh', told: true }]);
    expect(await harness.mailsTo(email)).toHaveLength(1);
  });

  it('that looks a second time leaves it to the next look, which makes one alert and one mail', async () => {
    const { sensorId, email, send } = await aThermometer(-45);
    const { secondLookJob } = harness.application.app.services;
    await send().expect(200);
    await killedWhileWriting(() => secondLookJob.run());
    expect(await alertsOf(sensorId)).toEqual([]);
    await secondLookJob.run();
    await secondLookJob.run();
    await harness.after(1);
    await harness.after(60);
    expect(await alertsOf(sensorId)).toEqual([{ kind: 'sensorFailed', told: true }]);
    expect(await harness.mailsTo(email)).toHaveLength(1);
  });
});
