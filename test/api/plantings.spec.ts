import type { Board } from '@shared/contracts/board';
import { aPlanting } from '../builders/plantings';
import { aShelf } from '../builders/rooms';
import { aStaffedRoom } from './room-callers';
import { startTestApplication, type TestApplication } from './test-application';

describe('plantings', () => {
  let application: TestApplication;

  beforeAll(async () => {
    application = await startTestApplication();
  });
  afterAll(() => application.stop());

  it('are shown on their shelf until they end, oldest first', async () => {
    const { tx } = application;
    const staff = await aStaffedRoom(application);
    const shelf = await aShelf(tx, { roomId: staff.room.id });
    const bare = await aShelf(tx, { roomId: staff.room.id });
    const shelfId = shelf.id;
    const younger = await aPlanting(tx, { shelfId, startedOn: '2026-04-01', stageSince: '2026-04-02' });
    const older = await aPlanting(tx, { shelfId, variety: 'Invented Red', count: 0 });
    await aPlanting(tx, { shelfId, endedOn: '2026-04-10', stage: 'ended' });

    const board = (await staff.viewer.get(`${staff.path}/board`).expect(200)).body as Board;

    const shelves = board.racks.flatMap((rack) => rack.shelves);
    expect(shelves.find(({ id }) => id === bare.id)?.plantings).toEqual([]);
    expect(shelves.find(({ id }) => id === shelfId)?.plantings).toEqual([
      {
        id: older.id,
        crop: 'Lettuce',
        variety: 'Invented Red',
        habit: 'rosette',
        count: 0,
        stage: 'growingOn',
        startedOn: '2026-03-01',
        stageSince: '2026-03-20',
      },
      expect.objectContaining({ id: younger.id, startedOn: '2026-04-01', stageSince: '2026-04-02' }),
    ]);
  });
});
