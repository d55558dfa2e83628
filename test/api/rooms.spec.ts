import type { Problem } from '@shared/contracts/problem';
import type { Rack, Shelf, WantedLight, WantedRange } from '@shared/contracts/rooms';
import type { ShelfDetail } from '@shared/contracts/series';
import { AuditEntryEntity } from '../../server/audit/audit-entry-entity';
import { ShelfPlansService } from '../../server/rooms/shelf-plans-service';
import { ShelfPlansStore } from '../../server/rooms/shelf-plans-store';
import { aPlacement } from '../builders/devices';
import { aPlanting } from '../builders/plantings';
import { aLamp, aLampPlan, aRack, aShelf, aWantedRange } from '../builders/rooms';
import { aStaffedRoom, type StaffedRoom } from './room-callers';
import { startTestApplication, type TestApplication } from './test-application';

describe('rooms', () => {
  let application: TestApplication;
  let staff: StaffedRoom;
  let tx: TestApplication['tx'];
  const plans = new ShelfPlansService(new ShelfPlansStore());

  beforeAll(async () => {
    application = await startTestApplication();
    tx = application.tx;
    staff = await aStaffedRoom(application);
  });
  afterAll(() => application.stop());

  const shelfHere = () => aShelf(tx, { roomId: staff.room.id });
  const problemOf = (reply: { body: unknown }): Problem => reply.body as Problem;

  describe('a room', () => {
    it('changes what is given and keeps the rest', async () => {
      const other = await aStaffedRoom(application, { name: 'Attic', latitudeDeg: 0, longitudeDeg: 10 });

      const reply = await other.keeper.patch(other.path, { longitudeDeg: null }).expect(200);

      const expected = {
        id: other.room.id,
        name: 'Attic',
        timeZone: 'Europe/Dublin',
        latitudeDeg: 0,
        longitudeDeg: null,
      };
      expect(reply.body).toEqual(expected);
      expect((await other.viewer.get(other.path)).body).toEqual(expected);
    });

    it('takes a new time zone, and refuses one that does not exist', async () => {
      const other = await aStaffedRoom(application);

      const reply = await other.keeper.patch(other.path, { timeZone: 'America/Lima' }).expect(200);
      const refused = await other.keeper.patch(other.path, { timeZone: 'Moon/Crater' }).expect(422);

      expect(reply.body).toMatchObject({ timeZone: 'America/Lima' });
      expect(problemOf(refused).errors?.map(({ path }) => path)).toEqual(['body.timeZone']);
    });
  });

  describe('racks and shelves', () => {
    it('are listed in their order with what is fitted, without retired ones and those of other rooms', async () => {
      const other = await aStaffedRoom(application);
      const roomId = other.room.id;
      const second = await aRack(tx, { roomId, name: 'Rack A', position: 1 });
      const first = await aRack(tx, { roomId, name: 'Rack B', position: 0 });
      const lower = await aShelf(tx, { rackId: first.id, label: 'B2', position: 1 });
      const upper = await aShelf(tx, { rackId: first.id, label: 'B1', position: 0 });
      await aShelf(tx, { rackId: first.id, position: 2, retiredAt: new Date('2026-01-01T00:00:00Z') });
      await aLamp(tx, { shelfId: upper.id, watts: 60, fittedOn: '2026-02-03' });
      await aLamp(tx, { shelfId: upper.id, removedOn: '2026-02-03' });
      await aLampPlan(tx, { shelfId: upper.id });

      const racks = (await other.viewer.get(`${other.path}/racks`).expect(200)).body as Rack[];

      expect(racks.map(({ id, shelves }) => [id, shelves.map(({ id: shelfId }) => shelfId)])).toEqual([
        [first.id, [upper.id, lower.id]],
        [second.id, []],
      ]);
      expect(racks[0]?.shelves[0]).toMatchObject({
        lamps: [{ kind: 'whiteLed', watts: 60, luxPerUmol: 68, fittedOn: '2026-02-03' }],
        lampHours: { switchesOn: '06:00', switchesOff: '22:00' },
        heatMat: null,
      });
      expect(racks[0]?.shelves[1]).toMatchObject({
        lamps: [],
        lampHours: { switchesOn: null, switchesOff: null },
      });
    });

    it('are added after the others', async () => {
      const other = await aStaffedRoom(application);
      const add = async (path: string, body: object) =>
        (await other.keeper.post(`${other.path}${path}`, body).expect(201)).body as Rack & Shelf;
      const racks = [
        await add('/racks', { name: 'First' }),
        await add('/racks', { name: 'Second', note: 'cool' }),
      ];
      const shelvesPath = `/racks/${racks[1]?.id ?? ''}/shelves`;
      await add(shelvesPath, { label: 'S1' });
      await add(shelvesPath, { label: 'S2', widthCm: 120, depthCm: 45 });

      const listed = (await other.viewer.get(`${other.path}/racks`)).body as Rack[];

      expect(listed.map(({ name, note, position }) => [name, note, position])).toEqual([
        ['First', '', 0],
        ['Second', 'cool', 1],
      ]);
      expect(listed[1]?.shelves.map(({ label, position, widthCm }) => [label, position, widthCm])).toEqual([
        ['S1', 0, null],
        ['S2', 1, 120],
      ]);
    });

    it('keep a label to one shelf of the room, until that is retired', async () => {
      const other = await aStaffedRoom(application);
      const shelf = await aShelf(tx, { roomId: other.room.id, label: 'A1' });
      const add = () => other.keeper.post(`${other.path}/racks/${shelf.rackId}/shelves`, { label: 'A1' });

      const refused = await add().expect(422);

      expect(problemOf(refused).errors?.map(({ path }) => path)).toEqual(['body.label']);
      await other.keeper.delete(`${other.path}/shelves/${shelf.id}`).expect(204);
      await add().expect(201);
    });

    it('change what is given of a shelf', async () => {
      const shelf = await shelfHere();

      const reply = await staff.keeper
        .patch(`${staff.path}/shelves/${shelf.id}`, { leafOffsetC: -1.5, widthCm: 90 })
        .expect(200);

      expect(reply.body).toMatchObject({ label: shelf.label, leafOffsetC: -1.5, widthCm: 90, depthCm: null });
    });

    it('are noted with who changed them', async () => {
      const shelf = await shelfHere();

      await staff.keeper.patch(`${staff.path}/shelves/${shelf.id}`, { widthCm: 80 }).expect(200);

      expect(await tx.findBy(AuditEntryEntity, { subjectId: shelf.id })).toMatchObject([
        {
          roomId: staff.room.id,
          personId: staff.people.keeper.id,
          action: 'shelf.change',
          detail: { widthCm: 80 },
        },
      ]);
    });
  });

  describe('retiring a shelf', () => {
    it('is refused while a sensor or a plant is on it', async () => {
      const [sensed, planted] = [await shelfHere(), await shelfHere()];
      await aPlacement(tx, { shelfId: sensed.id });
      await aPlanting(tx, { shelfId: planted.id });

      for (const { id } of [sensed, planted]) {
        const refused = await staff.keeper.delete(`${staff.path}/shelves/${id}`).expect(409);
        expect(problemOf(refused).code).toBe('SHELF_IN_USE');
      }
    });

    it('takes it out of the room, once', async () => {
      const shelf = await shelfHere();
      await aPlanting(tx, { shelfId: shelf.id, endedOn: '2026-03-01' });

      await staff.keeper.delete(`${staff.path}/shelves/${shelf.id}`).expect(204);

      await staff.keeper.delete(`${staff.path}/shelves/${shelf.id}`).expect(404);
      await staff.keeper.patch(`${staff.path}/shelves/${shelf.id}`, { widthCm: 1 }).expect(404);
    });
  });

  describe('lamps and heat mats', () => {
    it('of a kind get the usual factor, unless another was measured', async () => {
      const { id } = await shelfHere();
      const fitLamp = (body: object) =>
        staff.keeper.post(`${staff.path}/shelves/${id}/lamps`, body).expect(201);

      await fitLamp({ kind: 'fluorescent', watts: 56, fittedOn: '2026-01-02' });
      const reply = await fitLamp({ kind: 'whiteLed', watts: 40, luxPerUmol: 71.5, fittedOn: '2026-01-03' });

      // Thimijan & Heins (1983): 74 lx per µmol m⁻² s⁻¹ under cool white fluorescent lamps.
      expect((reply.body as Shelf).lamps.map(({ luxPerUmol }) => luxPerUmol)).toEqual([74, 71.5]);
    });

    it('are switched once fitted, and only then', async () => {
      const { id } = await shelfHere();
      const set = (body: object) => staff.grower.put(`${staff.path}/shelves/${id}/heat-mat`, body);

      const refused = await set({ isOn: true }).expect(422);
      const fitted = await set({ isOn: true, watts: 40 }).expect(200);
      const switched = await set({ isOn: false }).expect(200);

      expect(problemOf(refused).errors?.map(({ path }) => path)).toEqual(['body.watts']);
      expect((fitted.body as Shelf).heatMat).toEqual({ watts: 40, isOn: true });
      expect((switched.body as Shelf).heatMat).toEqual({ watts: 40, isOn: false });
    });
  });

  describe('lamp hours', () => {
    it('hold from now on, and what was planned before stays in the history', async () => {
      const { id } = await shelfHere();
      await aLampPlan(tx, { shelfId: id }); // 06:00–22:00 since January
      application.now = new Date('2026-04-15T11:00:00Z'); // noon in Dublin

      const reply = await staff.grower
        .put(`${staff.path}/shelves/${id}/lamp-hours`, { switchesOn: '14:00', switchesOff: '20:00' })
        .expect(200);

      expect((reply.body as Shelf).lampHours).toEqual({ switchesOn: '14:00', switchesOff: '20:00' });
      const planned = await plans.plannedLamps(
        tx,
        [id],
        new Date('2026-04-14T23:00:00Z'),
        new Date('2026-04-15T23:00:00Z'),
      );
      expect(planned.get(id)).toEqual([
        { onAt: Date.parse('2026-04-15T05:00:00Z'), offAt: Date.parse('2026-04-15T11:00:00Z') },
        { onAt: Date.parse('2026-04-15T13:00:00Z'), offAt: Date.parse('2026-04-15T19:00:00Z') },
      ]);
    });

    it('set twice in the same instant are those set last', async () => {
      const { id } = await shelfHere();
      const set = (body: object) =>
        staff.grower.put(`${staff.path}/shelves/${id}/lamp-hours`, body).expect(200);

      await set({ switchesOn: '06:00', switchesOff: '22:00' });
      const reply = await set({ switchesOn: null, switchesOff: null });

      expect((reply.body as Shelf).lampHours).toEqual({ switchesOn: null, switchesOff: null });
    });

    it('need both times or neither', async () => {
      const { id } = await shelfHere();

      await staff.grower
        .put(`${staff.path}/shelves/${id}/lamp-hours`, { switchesOn: '06:00', switchesOff: null })
        .expect(422);
    });

    it('of shelves without a plan are no light at all', async () => {
      const { id } = await shelfHere();

      const planned = await plans.plannedLamps(tx, [id], new Date(0), new Date('2026-05-01T00:00:00Z'));

      expect(planned).toEqual(new Map([[id, []]]));
    });
  });

  describe('wanted ranges', () => {
    const range: Omit<WantedRange, 'quantity' | 'since' | 'source'> = {
      lampsOn: { low: 0, high: 25 },
      lampsOff: { low: null, high: 22 },
      holdMinutes: 15,
      clearingMargin: 0.5,
      urgency: { by: 3, afterMinutes: null },
      reason: 'peppers',
    };

    it('are set, set anew, listed and cleared by quantity', async () => {
      const { id } = await shelfHere();
      await aWantedRange(tx, { shelfId: id, quantity: 'relativeHumidity' });
      const path = `${staff.path}/shelves/${id}/wanted-ranges`;

      await staff.grower.put(`${path}/airTemperature`, { ...range, holdMinutes: 0 }).expect(200);
      const reply = await staff.grower.put(`${path}/airTemperature`, range).expect(200);

      expect(reply.body).toEqual({
        quantity: 'airTemperature',
        ...range,
        source: 'shelf',
        since: application.now.toISOString(),
      });
      const listed = (await staff.viewer.get(path).expect(200)).body as WantedRange[];
      expect(listed.map(({ quantity }) => quantity)).toEqual(['airTemperature', 'relativeHumidity']);
      expect(listed[0]).toEqual(reply.body);

      await staff.grower.delete(`${path}/airTemperature`).expect(204);
      await staff.grower.delete(`${path}/airTemperature`).expect(404);
      expect((await staff.viewer.get(path)).body).toHaveLength(1);
    });

    it('with the low limit above the high one are refused', async () => {
      const { id } = await shelfHere();

      const refused = await staff.grower
        .put(`${staff.path}/shelves/${id}/wanted-ranges/airTemperature`, {
          ...range,
          lampsOn: { low: 26, high: 25 },
        })
        .expect(422);

      expect(problemOf(refused).errors?.map(({ path }) => path)).toEqual(['body.lampsOn.high']);
    });
  });

  describe('wanted light', () => {
    const lightOf = async (shelfId: string): Promise<WantedLight | null> =>
      ((await staff.viewer.get(`${staff.path}/shelves/${shelfId}`).expect(200)).body as ShelfDetail)
        .wantedLight;

    it('of a day is set, set anew and taken back', async () => {
      const { id } = await shelfHere();
      const path = `${staff.path}/shelves/${id}/wanted-light`;
      expect(await lightOf(id)).toBeNull();

      await staff.grower.put(path, { leastMolM2D: 0 }).expect(200);
      const reply = await staff.grower.put(path, { leastMolM2D: 9.5, reason: ' cut young ' }).expect(200);

      const set = {
        leastMolM2D: 9.5,
        reason: 'cut young',
        source: 'shelf',
        since: application.now.toISOString(),
      };
      expect(reply.body).toEqual(set);
      expect(await lightOf(id)).toEqual(set);

      await staff.grower.delete(path).expect(204);
      await staff.grower.delete(path).expect(404);
      expect(await lightOf(id)).toBeNull();
    });

    it('below none is refused', async () => {
      const { id } = await shelfHere();

      const refused = await staff.grower
        .put(`${staff.path}/shelves/${id}/wanted-light`, { leastMolM2D: -1 })
        .expect(422);

      expect(problemOf(refused).errors?.map(({ path }) => path)).toEqual(['body.leastMolM2D']);
    });
  });
});
