import type { Crop, CropFigures, CropSummary, Variety } from '@shared/contracts/crops';
import type { Problem } from '@shared/contracts/problem';
import { cropLibrary } from '@shared/growing/crops/crop-library';
import { AuditEntryEntity } from '../../server/audit/audit-entry-entity';
import { aRoomCrop, aVariety } from '../builders/crops';
import { aStaffedRoom, type StaffedRoom } from './room-callers';
import { startTestApplication, type TestApplication } from './test-application';

describe('crops', () => {
  let application: TestApplication;
  let staff: StaffedRoom;

  beforeAll(async () => {
    application = await startTestApplication();
  });
  beforeEach(async () => {
    staff = await aStaffedRoom(application);
  });
  afterAll(() => application.stop());

  const listed = async (): Promise<CropSummary[]> =>
    (await staff.viewer.get(`${staff.path}/crops`).expect(200)).body as CropSummary[];
  const read = async (cropId: string): Promise<Crop> =>
    (await staff.viewer.get(`${staff.path}/crops/${cropId}`).expect(200)).body as Crop;
  const copied = async (copyOf: string, name: string): Promise<Crop> =>
    (await staff.grower.post(`${staff.path}/crops`, { copyOf, name }).expect(201)).body as Crop;
  const figuresOf = ({ id: _id, isOwn: _isOwn, copiedFrom: _copiedFrom, ...figures }: Crop): CropFigures =>
    figures;
  const fields = (reply: { body: unknown }): (string | undefined)[] | undefined =>
    (reply.body as Problem).errors?.map(({ path }) => path);

  it('of the library are all listed by name and read whole, each figure with its source', async () => {
    const names = (await listed()).map(({ name }) => name);
    expect(names).toHaveLength(cropLibrary.length);
    expect(names).toEqual([...names].sort((one, other) => one.localeCompare(other, 'en')));

    for (const crop of cropLibrary) {
      const view = await read(crop.id);
      expect(view).toEqual({ ...crop, isOwn: false, copiedFrom: null });
    }
  });

  it('copied into a room can be changed there and stand beside the original', async () => {
    const copy = await copied('leek', 'Window leek');
    expect(copy).toMatchObject({ name: 'Window leek', isOwn: true, copiedFrom: 'leek' });

    const depthMm = { value: { low: 12, high: 15 }, source: 'our own trials' };
    const figures = { ...figuresOf(copy), seed: copy.seed && { ...copy.seed, depthMm } };
    await staff.grower.put(`${staff.path}/crops/${copy.id}`, figures).expect(200);

    expect((await read(copy.id)).seed?.depthMm).toEqual(depthMm);
    expect((await read('leek')).seed?.depthMm?.value).toEqual({ low: 6, high: 6 });
    expect((await listed()).filter(({ copiedFrom }) => copiedFrom === 'leek')).toHaveLength(1);
  });

  it('that are copies of copies still say which crop of the library they began as', async () => {
    const first = await copied('leek', 'First leek');

    expect(await copied(first.id, 'Second leek')).toMatchObject({ copiedFrom: 'leek' });
  });

  it('leave the list when retired, and can still be read', async () => {
    const copy = await copied('basil', 'Window basil');

    await staff.grower.delete(`${staff.path}/crops/${copy.id}`).expect(204);

    expect((await listed()).map(({ id }) => id)).not.toContain(copy.id);
    expect((await read(copy.id)).name).toBe('Window basil');
  });

  it('of the library are neither changed nor retired', async () => {
    const figures = figuresOf(await read('leek'));

    const changed = await staff.grower.put(`${staff.path}/crops/leek`, figures).expect(409);
    await staff.grower.delete(`${staff.path}/crops/leek`).expect(409);

    expect((changed.body as Problem).code).toBe('LIBRARY_CROP');
  });

  it.each([
    ['a name of the library, in any case', { copyOf: 'leek', name: 'bASIL' }, ['body.name']],
    ['a name of another crop of the room', { copyOf: 'leek', name: 'taken' }, ['body.name']],
    ['a crop that nobody has', { copyOf: 'moon-leek', name: 'New' }, ['body.copyOf']],
  ])('can’t be copied with %s', async (_, body, paths) => {
    const { figures } = await aRoomCrop(application.tx, { roomId: staff.room.id });
    await aRoomCrop(application.tx, { roomId: staff.room.id, figures: { ...figures, name: 'Taken' } });

    expect(fields(await staff.grower.post(`${staff.path}/crops`, body).expect(422))).toEqual(paths);
  });

  it('with temperatures out of order, or a table with one twice, are refused with the field', async () => {
    const copy = await copied('leek', 'Window leek');
    const saved = (seed: object) =>
      staff.grower.put(`${staff.path}/crops/${copy.id}`, {
        ...figuresOf(copy),
        seed: { ...copy.seed, ...seed },
      });
    const warmth = { minC: 2, optimumC: { low: 18, high: 24 }, bestC: 21, maxC: 35 };
    const temperatures = (changes: object) => ({
      temperatures: [{ value: { ...warmth, ...changes }, source: 'our log' }],
    });
    const path = 'body.seed.temperatures.0.value';

    await saved(temperatures({})).expect(200);
    for (const [changes, field] of [
      [{ minC: 19 }, 'minC'],
      [{ maxC: 23 }, 'maxC'],
      [{ bestC: 36 }, 'bestC'],
    ] as const)
      expect(fields(await saved(temperatures(changes)).expect(422))).toEqual([`${path}.${field}`]);
    const row = { temperatureC: 20, days: 6 };
    for (const rows of [[], [row, { ...row, days: 7 }]])
      expect(fields(await saved({ emergence: { value: rows, source: 'our log' } }).expect(422))).toEqual([
        'body.seed.emergence.value',
      ]);
    expect((await read(copy.id)).seed?.emergence).toEqual(copy.seed?.emergence);
  });

  it('with a range that runs backwards, or a figure without a source, are refused with the field', async () => {
    const copy = await copied('leek', 'Odd leek');
    const seed = copy.seed as NonNullable<Crop['seed']>;
    const backwards = { value: { low: 9, high: 4 }, source: 'our own trials' };
    const put = (change: object) =>
      staff.grower.put(`${staff.path}/crops/${copy.id}`, { ...figuresOf(copy), ...change }).expect(422);

    expect(fields(await put({ seed: { ...seed, depthMm: backwards } }))).toEqual([
      'body.seed.depthMm.value.high',
    ]);
    expect(fields(await put({ usualPot: { value: '1 L', source: ' ' } }))).toEqual(['body.usualPot.source']);
  });

  it('of another room are nobody’s here', async () => {
    const foreign = await aRoomCrop(application.tx);

    await staff.viewer.get(`${staff.path}/crops/${foreign.id}`).expect(404);
    await staff.grower.post(`${staff.path}/crops`, { copyOf: foreign.id, name: 'Stolen' }).expect(422);
  });

  it('note who changed them', async () => {
    const copy = await copied('leek', 'Noted leek');
    await staff.grower.delete(`${staff.path}/crops/${copy.id}`).expect(204);

    const entries = await application.tx.find(AuditEntryEntity, {
      where: { subjectId: copy.id },
      order: { at: 'ASC' },
    });
    expect(entries.map(({ action, personId }) => [action, personId])).toEqual([
      ['crop.copy', staff.people.grower.id],
      ['crop.retire', staff.people.grower.id],
    ]);
  });

  describe('varieties', () => {
    const add = (body: object) => staff.grower.post(`${staff.path}/varieties`, body);

    it('are listed by crop and name, and named with their crop', async () => {
      await add({ cropId: 'leek', name: 'Grey Heron', note: 'late' }).expect(201);
      await add({ cropId: 'basil', name: 'Broadleaf' }).expect(201);
      await add({ cropId: 'leek', name: 'Blue Heron' }).expect(201);
      await aVariety(application.tx);

      const varieties = (await staff.viewer.get(`${staff.path}/varieties`).expect(200)).body as Variety[];

      expect(varieties.map(({ cropName, name }) => `${cropName} ${name}`)).toEqual([
        'Basil Broadleaf',
        'Leek Blue Heron',
        'Leek Grey Heron',
      ]);
      const leek = (await listed()).find(({ id }) => id === 'leek');
      expect(leek?.varieties).toEqual(['Blue Heron', 'Grey Heron']);
    });

    it('can be renamed and removed', async () => {
      const { id } = (await add({ cropId: 'leek', name: 'Grey Heron' }).expect(201)).body as Variety;
      const path = `${staff.path}/varieties/${id}`;

      const renamed = await staff.grower.patch(path, { name: 'Grey Herring' }).expect(200);
      await staff.grower.delete(path).expect(204);

      expect(renamed.body).toMatchObject({ name: 'Grey Herring', note: '' });
      expect((await staff.viewer.get(`${staff.path}/varieties`)).body).toEqual([]);
    });

    it('twice of one crop, or of none, are refused', async () => {
      await add({ cropId: 'leek', name: 'Grey Heron' }).expect(201);

      expect(fields(await add({ cropId: 'leek', name: 'Grey Heron' }).expect(422))).toEqual(['body.name']);
      expect(fields(await add({ cropId: 'moon', name: 'Grey Heron' }).expect(422))).toEqual(['body.cropId']);
      await add({ cropId: 'basil', name: 'Grey Heron' }).expect(201);
    });
  });
});
