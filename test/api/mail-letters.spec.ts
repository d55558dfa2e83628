import type { MembershipEntity } from '../../server/people/membership-entity';
import { AlertEntity } from '../../server/alerts/alert-entity';
import { aTask } from '../builders/care';
import { aPlacement, aSensor } from '../builders/devices';
import { aMember, aPerson } from '../builders/people';
import { aWantedRange } from '../builders/rooms';
import { aMailedRoom, startMailHarness, type MailHarness, type MailedRoom } from './mail-harness';

describe('the morning letter', () => {
  let harness: MailHarness;

  beforeAll(async () => {
    harness = await startMailHarness();
  });
  afterAll(() => harness.stop());

  const aReader = (membership: Partial<MembershipEntity> = {}): Promise<MailedRoom> =>
    aMailedRoom(harness, { letterAt: '07:00', mailLookToday: 'morningLetter', ...membership });

  async function mailsAfter(email: string, ...instants: readonly string[]): Promise<(string | null)[]> {
    for (const instant of instants) {
      harness.application.now = new Date(instant);
      await harness.application.app.services.morningLetterJob.run();
      await harness.at(instant);
    }
    return (await harness.mailsTo(email)).map(({ text }) => text);
  }

  it('tells of alerts that were left to it, once a day, also when its time is changed on that day', async () => {
    const { roomId, personId, shelfId, email } = await aReader();
    await harness.open({ shelfId }, '2026-04-15T22:00:00Z');
    expect(await mailsAfter(email, '2026-04-16T05:59:00Z')).toEqual([]);

    const [letter] = await mailsAfter(email, '2026-04-16T06:00:00Z', '2026-04-16T06:01:00Z');
    expect(letter).toContain('One alert is open');
    await harness.application.tx.query(
      `UPDATE membership SET letter_at = '09:00' WHERE person_id = $1 AND room_id = $2`,
      [personId, roomId],
    );
    expect(await mailsAfter(email, '2026-04-16T08:00:00Z')).toHaveLength(1);
    expect(await mailsAfter(email, '2026-04-17T08:00:00Z')).toHaveLength(2);
  });

  it('stays away from a morning with nothing to say, unless it is wanted all the same', async () => {
    const sparing = await aReader();
    const always = await aReader({ letterOnlyWithNews: false });
    const morning = '2026-04-16T06:00:00Z';
    expect(await mailsAfter(sparing.email, morning)).toEqual([]);
    expect(await mailsAfter(always.email)).toEqual([expect.stringContaining('nothing needs you today')]);
  });

  it('tells what is over, but not what was found by looking back', async () => {
    const { shelfId, email } = await aReader();
    await harness.clear(await harness.open({ shelfId }, '2026-04-15T20:00:00Z'));
    const found = await harness.open({ shelfId, quantity: 'relativeHumidity', kind: 'belowRange' });
    await harness.clear(found);
    await harness.application.tx.update(AlertEntity, { id: found.id }, { foundLater: true });

    const [letter] = await mailsAfter(email, '2026-04-16T06:00:00Z');
    expect(letter).toContain('Over since yesterday');
    expect(letter).toContain('Too high from');
    expect(letter).not.toContain('Too dry');
  });

  it('names the care that is due by its reader or by anybody, late and coming, and not that of others', async () => {
    const { tx } = harness.application;
    const { roomId, personId, email } = await aReader();
    const other = await aPerson(tx);
    await aMember(tx, { roomId, personId: other.id });
    const task = (title: string, dueOn: string, whose: string | null): Promise<unknown> =>
      aTask(tx, { roomId, title, dueOn, personIds: whose === null ? [] : [whose] });
    await task('Water the trays', '2026-04-16', personId);
    await task('Wipe the lamps', '2026-04-14', null);
    await task('Count the peppers', '2026-04-18', personId);
    await task('Clean the floor', '2026-04-16', other.id);
    await task('Sow the leeks', '2026-04-25', personId);

    const [letter] = await mailsAfter(email, '2026-04-16T06:00:00Z');
    expect(letter).toContain('- Water the trays\n');
    expect(letter).toContain('- Wipe the lamps, due since Tue 14 Apr (anybody)');
    expect(letter).toContain('- Count the peppers on Sat 18 Apr');
    expect(letter).not.toMatch(/Clean the floor|Sow the leeks/);
  });

  it('tells of each shelf how low and high the night was, and how long outside the wanted range', async () => {
    const { tx } = harness.application;
    const { roomId, shelfId, email } = await aReader();
    await aWantedRange(tx, { shelfId });
    const sensor = await aSensor(tx, { roomId });
    await aPlacement(tx, { sensorId: sensor.id, shelfId });
    // Dark all night: wanted 16 to 22 °C. Two hours at 24 °C.
    await tx.query(`SELECT ensure_reading_partitions('2026-04-01', '2026-05-01')`);
    await tx.query(
      `INSERT INTO reading (sensor_id, at, value, flags)
       SELECT $1, at, CASE WHEN at >= '2026-04-15T22:00:00Z' AND at < '2026-04-16T00:00:00Z' THEN 24 ELSE 18 END, 0
       FROM generate_series('2026-04-15T18:00:00Z'::timestamptz, '2026-04-16T06:00:00Z', interval '1 minute') AS at`,
      [sensor.id],
    );

    const [letter] = await mailsAfter(email, '2026-04-16T06:00:00Z');
    // Straight lines between readings pass 22 °C at 21:59:40 and 23:59:20.
    expect(letter).toMatch(/- S\d+: air 18–24\s°C, air 1\sh 59\smin outside its range/);
  });

  it('comes by the room’s clock on the night that clocks go forward', async () => {
    const { shelfId, email } = await aReader();
    await harness.open({ shelfId }, '2026-03-28T22:00:00Z');
    expect(await mailsAfter(email, '2026-03-29T05:59:00Z')).toEqual([]);
    expect(await mailsAfter(email, '2026-03-29T06:00:00Z')).toHaveLength(1);
  });
});
