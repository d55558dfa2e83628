import { mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { Task } from '@shared/contracts/care';
import type { CareCompliance } from '@shared/contracts/care-record';
import type { CareShare, Rota, SwapOffer } from '@shared/contracts/care-rota';
import type { Routine } from '@shared/contracts/care-routines';
import type { Planting } from '@shared/contracts/plantings';
import type { SeedLot } from '@shared/contracts/seed';
import { demonstrationPassword, demonstrationPeople } from '../../server/demonstration/demonstration-content';
import { DemonstrationService } from '../../server/demonstration/demonstration-service';
import { DemonstrationStore } from '../../server/demonstration/demonstration-store';
import {
  demonstrationLots,
  demonstrationPlantings,
  demonstrationSowings,
} from '../../server/demonstration/growing-content';
import { Caller } from './caller';
import { startTestApplication, type TestApplication } from './test-application';

describe('the demonstration', () => {
  let application: TestApplication;
  let folder: string;

  beforeEach(async () => {
    application = await startTestApplication();
    folder = await mkdtemp(join(tmpdir(), 'demonstration-'));
  });
  afterEach(async () => {
    await rm(folder, { recursive: true });
    await application.stop();
  });

  async function filled(at: string): Promise<{ caller: Caller; path: string }> {
    application.now = new Date(at);
    const service = new DemonstrationService(
      application.database.transactions,
      new DemonstrationStore(),
      async (tx, roomId) => void (await application.app.services.planning.planRoom(tx, roomId)),
      () => application.now,
    );
    const roomId = await service.fill(join(folder, 'devices.json'));
    const [keeper] = demonstrationPeople;
    const caller = await Caller.signedIn(
      application.express,
      keeper as { email: string },
      demonstrationPassword,
    );
    return { caller, path: `/rooms/${roomId ?? ''}` };
  }

  it.each([
    ['at noon', '2026-12-01T12:00:00Z'],
    ['minutes after midnight', '2026-12-01T00:03:00Z'],
    ['when the clocks had just changed', '2026-10-25T01:30:00Z'],
  ])('filled %s grows everything that its story tells', async (_, at) => {
    const { caller, path } = await filled(at);

    const { plantings } = (await caller.get(`${path}/plantings?state=all`).expect(200)).body as {
      plantings: Planting[];
    };
    const lots = (await caller.get(`${path}/seed-lots`).expect(200)).body as SeedLot[];

    expect(plantings).toHaveLength(demonstrationPlantings.length);
    const leek = plantings.find(({ cropId }) => cropId === 'leek');
    expect(leek).toMatchObject({ stage: 'emerging', sown: 24, up: 7, count: 7, shelfLabel: 'A3' });
    expect(plantings.filter(({ endedOn }) => endedOn !== null)).toHaveLength(2);
    expect(lots).toHaveLength(demonstrationLots.length);
    expect(lots.filter(({ left, amount }) => left < 0 || left >= amount)).toEqual([]);
    expect((await caller.get(`${path}/sowing`).expect(200)).body).toMatchObject({
      plans: demonstrationSowings.map(() => ({ window: { opens: expect.any(String) as string } })),
    });
    expect(lots.filter(({ age }) => age.useFirst).map(({ variety }) => variety)).toContain('Harvest Moon');
  });

  it('is advised as its story goes: lamps on over the first leeks, and nothing else to change', async () => {
    const { caller, path } = await filled('2026-12-01T12:00:00Z');

    await application.app.services.advice.refreshAll();

    const tasks = (await caller.get(`${path}/tasks?from=2026-12-01&to=2026-12-02`).expect(200))
      .body as Task[];
    const asked = tasks.filter(({ routineId }) => routineId === null);
    expect(asked.map(({ title }) => title)).toEqual(['Switch A3 lamps on: Leek is up']);
  });

  it('shares care out among its people: routines of every kind, a rota, a swap, and a lived-in past', async () => {
    const { caller, path } = await filled('2026-12-01T12:00:00Z');
    const read = async <T>(what: string): Promise<T> =>
      (await caller.get(`${path}${what}`).expect(200)).body as T;

    const routines = await read<Routine[]>('/routines');
    expect(new Set(routines.map(({ timing }) => timing.how))).toEqual(
      new Set(['calendar', 'afterDoing', 'byDrying']),
    );
    expect(new Set(routines.map(({ who }) => who.how))).toEqual(
      new Set(['person', 'inTurn', 'pair', 'onDuty']),
    );
    expect(new Set(routines.map(({ place }) => place.at))).toEqual(
      new Set(['room', 'rack', 'shelf', 'planting']),
    );
    expect(await read<SwapOffer[]>('/swaps')).toMatchObject([{ toPersonId: null, task: { cover: 'held' } }]);

    const rota = await read<Rota>('/rota?from=2026-12-01&to=2026-12-15');
    expect(rota.isKept).toBe(true);
    expect(rota.absences).toHaveLength(2);
    expect(rota.days.filter(({ isClosed }) => isClosed).map(({ day }) => day)).toEqual(['2026-12-10']);

    const { due, share } = await read<CareCompliance>('/care/compliance?from=2026-08-23&to=2026-12-01');
    expect(due).toBeGreaterThan(150);
    expect(share).toBeGreaterThan(0.85);
    expect(share).toBeLessThan(0.95);

    const { shares } = await read<{ shares: CareShare[] }>('/rota/share?from=2026-11-01&to=2026-12-15');
    expect(shares.filter(({ doneTasks, openTasks }) => doneTasks > 0 && openTasks > 0)).toHaveLength(6);
    const late = (await read<Task[]>('/tasks?from=2026-12-01&to=2026-12-02')).filter(
      ({ inTimeUntil }) => inTimeUntil < '2026-12-01',
    );
    expect(late.map(({ title }) => title)).toEqual(['Feed strawberries']);
  });
});
