import { randomUUID } from 'node:crypto';
import type { Response } from 'supertest';
import { endpoints } from '@shared/contracts/api';
import type { Endpoint } from '@shared/contracts/endpoint';
import type { Problem } from '@shared/contracts/problem';
import { anAlert, anAlertDeed } from '../builders/alerts';
import { anAbsence, aRoutine, aSwap, aTask } from '../builders/care';
import { aRoomCrop, aVariety } from '../builders/crops';
import { aDevice, aSensor } from '../builders/devices';
import { aFileProfile, aLoggerFile } from '../builders/logger-files';
import { aMember, aPerson } from '../builders/people';
import { aPhoto } from '../builders/photos';
import { aPlanting, aPlantingEvent } from '../builders/plantings';
import { aShelf, aWantedLight, aWantedRange } from '../builders/rooms';
import { aGerminationTest, aSeedLot } from '../builders/seed';
import { aSowingChoice } from '../builders/sowing';
import { accessTable, callers, type CallerName, type Outcome } from './access-table';
import { Caller } from './caller';
import { aStaffedRoom, type StaffedRoom } from './room-callers';
import { startTestApplication, type TestApplication } from './test-application';

/** The parameters of a path that name something stored inside a room. */
const storedParameters = (endpoint: Endpoint): string[] =>
  parametersOf(endpoint).filter((name) => !['roomId', 'quantity', 'run', 'token', 'day'].includes(name));

function parametersOf({ path }: Endpoint): string[] {
  return [...path.matchAll(/:(\w+)/g)].map(([, name]) => name ?? '');
}

function pathOf({ name, path }: Endpoint, parameters: Readonly<Record<string, string>>): string {
  const filled = path.replace(/:(\w+)/g, (_, parameter: string) => parameters[parameter] ?? '');
  const query = accessTable[name]?.query;
  return query === undefined ? filled : `${filled}?${query}`;
}

function outcomeOf({ status, body }: Response): Outcome {
  if (status === 401 || status === 403) return status;
  return status === 404 && (body as Problem).detail === 'There is no such room.' ? 404 : 'allowed';
}

/** Every caller of the table, and the room that it is about. */
type Everybody = StaffedRoom & Readonly<Record<CallerName, Caller>>;

describe('access', () => {
  let application: TestApplication;
  let everybody: Everybody;

  beforeAll(async () => {
    application = await startTestApplication();
    everybody = await newEverybody();
  });
  afterAll(() => application.stop());

  async function newEverybody(): Promise<Everybody> {
    const { tx, express } = application;
    const staff = await aStaffedRoom(application);
    const outsider = await aPerson(tx);
    await aMember(tx, { personId: outsider.id, role: 'keeper' });
    const { token } = await aDevice(tx, { roomId: staff.room.id });
    return {
      ...staff,
      nobody: Caller.nobody(express),
      device: Caller.withBearer(express, token),
      outsider: await Caller.signedIn(express, outsider),
    };
  }

  it('is written down for every endpoint of the contract, and for nothing else', () => {
    expect(Object.keys(accessTable).sort()).toEqual(endpoints.map(({ name }) => name).sort());
  });

  it.each(endpoints.map((endpoint) => [endpoint.name, endpoint] as const))(
    'to %s is what the table says, for everybody',
    async (name, endpoint) => {
      const asked = name === 'signOut' ? await newEverybody() : everybody;
      // Things that exist nowhere: only who asks decides, and nothing is changed.
      const path = pathOf(endpoint, {
        ...Object.fromEntries(parametersOf(endpoint).map((parameter) => [parameter, randomUUID()])),
        roomId: asked.room.id,
        quantity: 'airTemperature',
        day: '2026-04-20',
      });
      const outcomes: Partial<Record<CallerName, Outcome>> = {};
      for (const caller of callers) {
        const reply = await asked[caller].call(endpoint.method, path);
        expect(reply.status).not.toBe(500);
        outcomes[caller] = outcomeOf(reply);
      }

      expect(outcomes).toEqual(accessTable[name]?.outcomes);
    },
  );

  it('to a room that does not exist, or has no proper name, is as to one of others', async () => {
    for (const roomId of [randomUUID(), 'not-a-room', "' OR true --"]) {
      const reply = await everybody.keeper.get(`/rooms/${encodeURIComponent(roomId)}`).expect(404);
      expect((reply.body as Problem).detail).toBe('There is no such room.');
    }
  });

  describe('with the ids of things of another room', () => {
    const inside = endpoints.filter((endpoint) => storedParameters(endpoint).length > 0);

    /** One of everything. */
    async function everythingIn(roomId: string): Promise<Record<string, string>> {
      const { tx } = application;
      const shelf = await aShelf(tx, { roomId });
      await aWantedRange(tx, { shelfId: shelf.id });
      await aWantedLight(tx, { shelfId: shelf.id });
      const sensor = await aSensor(tx, { roomId });
      const lot = await aSeedLot(tx, { roomId });
      const crop = await aRoomCrop(tx, { roomId });
      await aSowingChoice(tx, { roomId, cropId: crop.id });
      const planting = await aPlanting(tx, { shelfId: shelf.id });
      const alert = await anAlert(tx, { shelfId: shelf.id });
      return {
        roomId,
        quantity: 'airTemperature',
        day: '2026-04-20',
        shelfId: shelf.id,
        rackId: shelf.rackId,
        sensorId: sensor.id,
        deviceId: sensor.deviceId,
        alertId: alert.id,
        deedId: (await anAlertDeed(tx, { alertId: alert.id })).id,
        taskId: (await aTask(tx, { roomId })).id,
        routineId: (await aRoutine(tx, { roomId })).id,
        absenceId: (await anAbsence(tx, { roomId })).id,
        swapId: (await aSwap(tx, { taskId: (await aTask(tx, { roomId })).id })).id,
        fileId: (await aLoggerFile(tx, { roomId })).id,
        plantingId: planting.id,
        photoId: (await aPhoto(tx, { plantingId: planting.id })).id,
        eventId: (await aPlantingEvent(tx, { plantingId: planting.id })).id,
        lotId: lot.id,
        testId: (await aGerminationTest(tx, { lotId: lot.id })).id,
        cropId: crop.id,
        varietyId: (await aVariety(tx, { roomId })).id,
        profileId: (await aFileProfile(tx, { roomId })).id,
      };
    }

    it.each(inside.map((endpoint) => [endpoint.name, endpoint] as const))(
      '%s finds nothing, even for a keeper of both rooms',
      async (name, endpoint) => {
        const { room, people, keeper } = everybody;
        const here = await everythingIn(room.id);
        const there = await everythingIn(
          (await aMember(application.tx, { personId: people.keeper.id, role: 'keeper' })).roomId,
        );
        const call = async (parameters: Record<string, string>): Promise<Response> => {
          const request = keeper.call(endpoint.method, pathOf(endpoint, parameters));
          // A sensor is placed on a shelf that the body names, and a planting takes in one that it names.
          const body = {
            ...accessTable[name]?.body,
            ...(name === 'placeSensor' ? { shelfId: here['shelfId'] } : {}),
            ...(name === 'mergePlanting'
              ? { otherId: (await aPlanting(application.tx, { shelfId: here['shelfId'] ?? '' })).id }
              : {}),
          };
          return endpoint.method === 'get'
            ? request.then((reply) => reply)
            : request.send(body).then((reply) => reply);
        };

        for (const parameter of storedParameters(endpoint)) {
          const reply = await call({ ...here, [parameter]: there[parameter] ?? '' });
          expect([parameter, reply.status]).toEqual([parameter, 404]);
        }
        // The same request for what is here is none of that, or the test would prove nothing.
        expect((await call(here)).status).not.toBe(404);
      },
    );
  });
});
