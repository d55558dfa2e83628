import type { Problem } from '@shared/contracts/problem';
import { aDevice, aPlacement, aSensor } from '../builders/devices';
import { aShelf, aWantedRange } from '../builders/rooms';
import { fileOf, fileRoad, fileStart, fileStep, type FileRoad } from './file-road';
import { aStaffedRoom, type StaffedRoom } from './room-callers';
import { startTestApplication, type TestApplication } from './test-application';

describe('logger files over HTTP', () => {
  let application: TestApplication;
  let staff: StaffedRoom;

  beforeAll(async () => {
    application = await startTestApplication({ UPLOAD_MAX_MB: '1' });
    staff = await aStaffedRoom(application);
  });
  afterAll(() => application.stop());

  const problemOf = (reply: { body: unknown }): Problem => reply.body as Problem;

  async function shelfSensors(): Promise<{ temperature: string; humidity: string; shelfId: string }> {
    const { tx } = application;
    const shelf = await aShelf(tx, { roomId: staff.room.id });
    const { device } = await aDevice(tx, { roomId: staff.room.id });
    const temperature = await aSensor(tx, { deviceId: device.id, quantity: 'airTemperature' });
    const humidity = await aSensor(tx, { deviceId: device.id, quantity: 'relativeHumidity' });
    for (const { id: sensorId } of [temperature, humidity])
      await aPlacement(tx, { sensorId, shelfId: shelf.id });
    return { temperature: temperature.id, humidity: humidity.id, shelfId: shelf.id };
  }

  const uploaded: FileRoad['uploaded'] = (...of) => fileRoad(application, staff).uploaded(...of);
  const matched: FileRoad['matched'] = (...of) => fileRoad(application, staff).matched(...of);
  const done: FileRoad['done'] = (...of) => fileRoad(application, staff).done(...of);

  async function readingsOf(sensorId: string): Promise<{ at: Date; value: number; flags: number }[]> {
    return application.tx.query('SELECT at, value, flags FROM reading WHERE sensor_id = $1 ORDER BY at', [
      sensorId,
    ]);
  }

  async function sumsOf(sensorId: string): Promise<unknown[]> {
    return application.tx.query(
      'SELECT start_at, count, covered_ms, min, max, integral_ms FROM hourly_summary WHERE sensor_id = $1 ORDER BY start_at',
      [sensorId],
    );
  }

  it('recognise, preview, check and bring in a file, and a second time change nothing', async () => {
    const sensors = await shelfSensors();
    const content = fileOf(500, (row) =>
      row === 100 ? { t: 'soaked' } : row > 200 && row < 204 ? { t: '--', rh: '--' } : {},
    );
    const file = await uploaded(content);
    expect(file).toMatchObject({
      name: 'shelf.csv',
      status: 'uploaded',
      encoding: 'utf-8',
      delimiter: ',',
      headerLine: 1,
      series: [{ quantity: 'airTemperature' }, { quantity: 'relativeHumidity' }],
    });
    expect(file.preview.map(({ line, part }) => `${part} ${line}`)).toEqual([
      ...[2, 3, 4, 5, 6, 7, 8, 9].map((line) => `first ${line}`),
      'odd 102',
      ...[498, 499, 500, 501].map((line) => `last ${line}`),
    ]);
    expect(file.preview[0]).toMatchObject({ at: '2026-04-01T00:00:00.000Z', values: { 1: 21, 2: 60 } });
    expect(file.preview.at(-1)).toMatchObject({ at: new Date(fileStart + 499 * fileStep).toISOString() });

    await matched(file, [sensors.temperature, sensors.humidity]);
    const checked = await done(file.id, 'check');
    expect(checked).toMatchObject({
      status: 'checked',
      result: { read: 994, fresh: 993, alreadyHeld: 0, different: 0, rejected: 1, intervalS: 300, gaps: 1 },
    });
    expect(await readingsOf(sensors.temperature)).toEqual([]);

    const broughtIn = await done(file.id, 'bring-in');
    expect(broughtIn).toMatchObject({
      status: 'broughtIn',
      result: { read: 994, fresh: 993, rejected: 1, missing: 6 },
    });
    expect(await readingsOf(sensors.temperature)).toHaveLength(496);
    const sums = await sumsOf(sensors.temperature);
    expect(sums.length).toBeGreaterThan(40);

    const again = await uploaded(content);
    expect(again.profileId).not.toBeNull();
    expect(await done(again.id, 'bring-in')).toMatchObject({
      status: 'broughtIn',
      result: { read: 994, fresh: 0, alreadyHeld: 993, different: 0, rejected: 1 },
    });
    expect(await sumsOf(sensors.temperature)).toEqual(sums);
  });

  it('list the lines that can’t be used, and write them without formulas', async () => {
    const sensors = await shelfSensors();
    const file = await uploaded(fileOf(50, (row) => (row === 10 ? { t: '=1+1' } : {})));
    await matched(file, [sensors.temperature, sensors.humidity]);
    await done(file.id, 'check');
    const path = `${staff.path}/logger-files/${file.id}/rejections`;
    const { body } = await staff.viewer.get(path).expect(200);
    expect(body).toMatchObject({
      total: 1,
      nextAfter: null,
      rejections: [{ line: 12, column: 2, code: 'NOT_A_NUMBER', text: '=1+1' }],
    });
    const csv = await staff.viewer
      .get(`${path}.csv`)
      .expect(200)
      .expect('Content-Type', /text\/csv/);
    expect(csv.text).toContain('12,2,NOT_A_NUMBER,');
    expect(csv.text).toContain(",'=1+1\r\n");
  });

  it('keep or replace what differs, and taken out bring everything back', async () => {
    const sensors = await shelfSensors();
    const first = await uploaded(fileOf(300), 'first.csv');
    await matched(first, [sensors.temperature, sensors.humidity]);
    await done(first.id, 'bring-in');
    const before = {
      readings: await readingsOf(sensors.temperature),
      sums: await sumsOf(sensors.temperature),
    };

    const warmer = fileOf(400, (row) => (row % 2 === 0 ? { t: '30.5' } : {}));
    const kept = await uploaded(warmer, 'kept.csv');
    await matched(kept, [sensors.temperature]);
    expect(await done(kept.id, 'bring-in')).toMatchObject({
      result: { read: 400, fresh: 100, alreadyHeld: 150, different: 150, heldLive: 0 },
    });
    expect((await readingsOf(sensors.temperature)).slice(0, 300)).toEqual(before.readings);
    expect(await done(kept.id, 'take-out')).toMatchObject({ status: 'takenOut' });
    expect(await readingsOf(sensors.temperature)).toEqual(before.readings);
    expect(await sumsOf(sensors.temperature)).toEqual(before.sums);

    await done(kept.id, 'bring-in', { differing: 'replace' });
    const values = (await readingsOf(sensors.temperature)).map(({ value }) => value);
    expect(values.filter((value) => value === 30.5)).toHaveLength(200);
    await done(kept.id, 'take-out');
    expect(await readingsOf(sensors.temperature)).toEqual(before.readings);
    expect(await sumsOf(sensors.temperature)).toEqual(before.sums);
  });

  it('taken out of a shelf whose deficit is watched leave nothing, when they were all that it had', async () => {
    const sensors = await shelfSensors();
    const wanted = { lampsOnLow: 0.4, lampsOnHigh: 0.8, lampsOffLow: 0.4, lampsOffHigh: 0.8 };
    const quantity = 'vapourPressureDeficit';
    await aWantedRange(application.tx, {
      shelfId: sensors.shelfId,
      quantity,
      ...wanted,
      since: new Date('2026-01-01'),
    });
    const file = await uploaded(fileOf(200));
    await matched(file, [sensors.temperature, sensors.humidity]);
    await done(file.id, 'bring-in');
    expect(await done(file.id, 'take-out')).toMatchObject({ status: 'takenOut', failure: null });
    expect(await readingsOf(sensors.humidity)).toEqual([]);
    expect(await sumsOf(sensors.humidity)).toEqual([]);
  });

  it('taken out in any order leave what the files still in have brought', async () => {
    const sensors = await shelfSensors();
    const bringIn = async (t: string, differing: string): Promise<string> => {
      const file = await uploaded(
        fileOf(60, () => ({ t })),
        `${t}.csv`,
      );
      await matched(file, [sensors.temperature]);
      await done(file.id, 'bring-in', { differing });
      return file.id;
    };
    const one = await bringIn('20', 'keep');
    const two = await bringIn('22', 'replace');
    const three = await bringIn('24', 'replace');
    await done(two, 'take-out');
    expect((await readingsOf(sensors.temperature))[0]?.value).toBe(24);
    await done(three, 'take-out');
    expect((await readingsOf(sensors.temperature))[0]?.value).toBe(20);
    await done(one, 'take-out');
    expect(await readingsOf(sensors.temperature)).toEqual([]);
    expect(await sumsOf(sensors.temperature)).toEqual([]);
  });

  it('newest first, or shuffled, bring in the same as in order', async () => {
    const inOrder = await shelfSensors();
    const turned = await shelfSensors();
    const shuffled = await shelfSensors();
    const [header = '', ...rows] = fileOf(200).trimEnd().split('\n');
    const orders = [rows, rows.toReversed(), [...rows.slice(90), ...rows.slice(0, 90)]];
    for (const [index, sensors] of [inOrder, turned, shuffled].entries()) {
      const file = await uploaded([header, ...(orders[index] ?? [])].join('\n'), `order-${index}.csv`);
      await matched(file, [sensors.temperature, sensors.humidity]);
      expect(await done(file.id, 'bring-in')).toMatchObject({ status: 'broughtIn', result: { fresh: 400 } });
    }
    expect(await readingsOf(turned.humidity)).toEqual(await readingsOf(inOrder.humidity));
    expect(await sumsOf(turned.humidity)).toEqual(await sumsOf(inOrder.humidity));
    expect(await sumsOf(shuffled.humidity)).toEqual(await sumsOf(inOrder.humidity));
  });

  it('make sensors for a file, which go again with its readings', async () => {
    const { shelfId } = await shelfSensors();
    const file = await uploaded(fileOf(100), 'new logger.csv');
    const series = file.series.map(({ key }) => ({ key, newSensor: { shelfId } }));
    await staff.grower.put(`${staff.path}/logger-files/${file.id}/matches`, { series }).expect(200);
    await done(file.id, 'check');
    expect(await done(file.id, 'bring-in')).toMatchObject({ status: 'broughtIn', result: { fresh: 200 } });
    const made = async (): Promise<unknown[]> =>
      application.tx.query(
        `SELECT s.quantity, s.expected_interval_s FROM sensor s JOIN device d ON d.id = s.device_id
         WHERE d.name = 'new logger' ORDER BY 1`,
      );
    expect(await made()).toEqual([
      { quantity: 'airTemperature', expected_interval_s: 300 },
      { quantity: 'relativeHumidity', expected_interval_s: 300 },
    ]);
    await done(file.id, 'take-out');
    expect(await made()).toEqual([]);
  });

  it('come in by one request with a profile, and not at all by one that does not fit', async () => {
    const sensors = await shelfSensors();
    const file = await uploaded(fileOf(20), 'tower.csv');
    await staff.grower
      .put(`${staff.path}/logger-files/${file.id}/matches`, {
        series: [{ key: file.series[0]?.key, sensorId: sensors.temperature }],
        saveAs: 'Tower logger',
      })
      .expect(200);
    const path = `${staff.path}/logger-files/bring-in`;
    const send = (profile: string, content: string) =>
      staff.grower.call('post', path).query({ profile }).attach('file', Buffer.from(content), 'script.csv');
    const reply = await send('Tower logger', fileOf(40)).expect(201);
    expect(reply.body).toMatchObject({
      status: 'broughtIn',
      profileName: 'Tower logger',
      result: { fresh: 40 },
    });
    const misfit = await send('Tower logger', 'when;warmth\n2026-04-01 00:00;20,5\n2026-04-01 00:05;20,6\n');
    expect(misfit.status).toBe(422);
    expect((await send('No such', fileOf(3))).status).toBe(422);

    const { body } = await staff.viewer.get(`${staff.path}/logger-file-profiles`).expect(200);
    const { profiles } = body as { profiles: { id: string; name: string }[] };
    const own = profiles.find(({ name }) => name === 'Tower logger');
    await staff.grower.patch(`${staff.path}/logger-file-profiles/${own?.id}`, { name: 'Tower' }).expect(200);
    await staff.grower.delete(`${staff.path}/logger-file-profiles/${own?.id}`).expect(204);
  });

  it('that count time from a start come in by one request that says when that was', async () => {
    const sensors = await shelfSensors();
    const counting = 'Elapsed (min),Temperature (°C)\n0,20.5\n5,20.6\n10,20.7\n';
    const file = await uploaded(counting, 'counting.csv');
    expect(file.questions.map(({ code }) => code)).toContain('ELAPSED_NEEDS_START');
    const matches = `${staff.path}/logger-files/${file.id}/matches`;
    const series = [{ key: file.series[0]?.key, sensorId: sensors.temperature }];
    await staff.grower.put(matches, { series, saveAs: 'Counting logger' }).expect(200);
    const send = (startsAt: string | undefined, content = counting, profile = 'Counting logger') =>
      staff.grower
        .call('post', `${staff.path}/logger-files/bring-in`)
        .query({ profile, startsAt })
        .attach('file', Buffer.from(content), 'script.csv');

    const missing = problemOf(await send(undefined).expect(422));
    expect(missing).toMatchObject({ code: 'START_REQUIRED', errors: [{ path: 'query.startsAt' }] });
    expect(problemOf(await send('this morning').expect(422)).errors).toMatchObject([
      { path: 'query.startsAt' },
    ]);

    await send('2026-04-02T09:00:00+01:00').expect(201);
    const ats = (await readingsOf(sensors.temperature)).map(({ at }) => at.toISOString());
    expect(ats).toEqual(['2026-04-02T08:00:00.000Z', '2026-04-02T08:05:00.000Z', '2026-04-02T08:10:00.000Z']);

    // Where the file tells its own times, a start can only be a mistake.
    const dated = await uploaded(fileOf(3), 'dated.csv');
    const own = `${staff.path}/logger-files/${dated.id}/matches`;
    const only = [{ key: dated.series[0]?.key, sensorId: sensors.temperature }];
    await staff.grower.put(own, { series: only, saveAs: 'Dated logger' }).expect(200);
    const needless = await send('2026-04-02T09:00:00Z', fileOf(3), 'Dated logger').expect(422);
    expect(problemOf(needless).errors).toMatchObject([{ path: 'query.startsAt' }]);
    const said = await staff.grower.put(own, { startsAt: '2026-04-02T09:00:00Z' }).expect(422);
    expect(problemOf(said).errors).toMatchObject([{ path: 'body.startsAt' }]);
  });

  it('are refused with a reason and a place, and nothing of them is kept', async () => {
    const count = async (): Promise<number> => {
      const rows: { count: string }[] = await application.tx.query('SELECT count(*) FROM logger_file_part');
      return Number(rows[0]?.count);
    };
    const before = await count();
    const send = (content: Buffer | string) =>
      staff.grower
        .call('post', `${staff.path}/logger-files`)
        .attach('file', Buffer.from(content), '../up/x.csv');
    expect(problemOf(await send('').expect(422)).code).toBe('EMPTY_FILE');
    expect(problemOf(await send('time,temperature (°C)\n').expect(422)).code).toBe('HEADER_ONLY');
    const placed = problemOf(await send(Buffer.from('\x89PNG\r\n\x1a\n0000', 'latin1')).expect(422));
    expect(placed).toMatchObject({
      code: 'IMAGE_FILE',
      errors: [{ path: 'line', message: '1' }, { path: 'column' }],
    });
    const big = await send(Buffer.concat([Buffer.from(fileOf(10)), Buffer.alloc(1_100_000, '\n')]));
    expect(big.status).toBe(413);
    expect(problemOf(big).code).toBe('FILE_TOO_LARGE');
    await staff.grower.post(`${staff.path}/logger-files`).expect(415);
    await staff.helper.call('post', `${staff.path}/logger-files`).expect(403);
    expect(await count()).toBe(before);
  });

  it('that turn unreadable half-way store nothing and say where', async () => {
    const sensors = await shelfSensors();
    const rows = fileOf(9_000).trimEnd();
    const file = await uploaded(`${rows}\n"2026-05-20T00:00:00Z,20,60\n${'x\n'.repeat(60_000)}`);
    await matched(file, [sensors.temperature, sensors.humidity]);
    expect(await done(file.id, 'bring-in')).toMatchObject({
      status: 'failed',
      failure: { code: 'UNCLOSED_QUOTE', line: 9_002 },
    });
    expect(await readingsOf(sensors.temperature)).toEqual([]);
  });

  it('stop when somebody wants that, and are given up when nobody is at work any more', async () => {
    const sensors = await shelfSensors();
    const [file, abandoned] = [await uploaded(fileOf(3_000)), await uploaded(fileOf(3))];
    await matched(file, [sensors.temperature, sensors.humidity]);
    const path = `${staff.path}/logger-files/${file.id}`;
    const { loggerFiles } = application.app.services;
    await application.database.transactions.run(async (tx) => {
      // Whoever brings in has to wait here, so there is time to stop it.
      await tx.query('SELECT FROM sensor WHERE id = $1 FOR UPDATE', [sensors.temperature]);
      await staff.grower.post(`${path}/bring-in`).expect(202);
      expect(problemOf(await staff.grower.post(`${path}/bring-in`).expect(409)).code).toBe('AT_WORK');
      expect(problemOf(await staff.grower.delete(path).expect(409)).code).toBe('AT_WORK');

      // As a process that was killed leaves it.
      await application.tx.query("UPDATE logger_file SET status = 'checking' WHERE id = $1", [abandoned.id]);
      await loggerFiles.failAbandoned();
      const { body } = await staff.viewer.get(`${staff.path}/logger-files/${abandoned.id}`).expect(200);
      expect(body).toMatchObject({ status: 'failed', failure: { code: 'SERVER_STOPPED' } });
      expect((await staff.viewer.get(path)).body).toMatchObject({ status: 'bringingIn' });

      const { body: stopping } = await staff.grower.post(`${path}/cancel`).expect(200);
      expect(stopping).toMatchObject({ status: 'bringingIn', isStopping: true });
    });
    await loggerFiles.settled();
    expect((await staff.viewer.get(path)).body).toMatchObject({ status: 'cancelled', result: null });
    expect(await readingsOf(sensors.temperature)).toEqual([]);
    expect(problemOf(await staff.grower.post(`${path}/cancel`).expect(409)).code).toBe('NOT_AT_WORK');
  });

  it('are given back byte for byte, under a name that is only text', async () => {
    const content = fileOf(30);
    const file = await uploaded(content, 'wärme "A3".csv');
    const reply = await staff.viewer
      .get(`${staff.path}/logger-files/${file.id}/original`)
      .buffer(true)
      .expect(200)
      .expect('Content-Type', 'application/octet-stream');
    expect(reply.headers['content-disposition']).toMatch(/^attachment;/);
    expect((reply.body as Buffer).toString('utf8')).toBe(content);
    await staff.grower.delete(`${staff.path}/logger-files/${file.id}`).expect(204);
    await staff.viewer.get(`${staff.path}/logger-files/${file.id}`).expect(404);
  });
});
