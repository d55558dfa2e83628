import { aPlacement, aSensor } from '../builders/devices';
import { aMember, aPerson, testPassword } from '../builders/people';
import { aRoom, aShelf, aWantedRange } from '../builders/rooms';
import { startBenchApplication } from './bench-application';
import { interleaved, timed, type Benchmark } from './benchmark';

const DAY_MS = 86_400_000;
const MINUTE_MS = 60_000;
const RUNS = 21;

/** A chart of a year against a chart of a week, one reading a minute, over HTTP. */
export const chartYearVsWeek: Benchmark = {
  name: 'chart-year-vs-week',
  meaning: 'server time of a chart over a year, over that of a chart over a week, one reading a minute',
  async run() {
    const application = await startBenchApplication();
    const { dataSource, address } = application;
    const tx = dataSource.manager;
    const room = await aRoom(tx);
    const person = await aPerson(tx);
    await aMember(tx, { roomId: room.id, personId: person.id });
    const shelf = await aShelf(tx, { roomId: room.id });
    await aWantedRange(tx, { shelfId: shelf.id, quantity: 'airTemperature' });
    const sensor = await aSensor(tx, { roomId: room.id, quantity: 'airTemperature', expectedIntervalS: 60 });
    const now = Math.floor(Date.now() / MINUTE_MS) * MINUTE_MS;
    await aPlacement(tx, { sensorId: sensor.id, shelfId: shelf.id, fromAt: new Date(now - 400 * DAY_MS) });
    const { intake } = application.road;
    for (let at = now - 365 * DAY_MS; at < now; at += 10 * DAY_MS) {
      const samples = Array.from({ length: (10 * DAY_MS) / MINUTE_MS }, (_, index) => at + index * MINUTE_MS)
        .filter((instant) => instant < now)
        .map((instant) => ({
          at: instant,
          value: 20 + 3 * Math.sin(instant / 1.4e7) + Math.sin(instant / 3e5) / 5,
        }));
      await intake.store(new Map([[sensor.id, samples]]), { isLive: false, now });
    }
    await tx.query('ANALYZE');
    const cookie = await application.signIn(person.email, testPassword);
    const chart = (days: number) => async (): Promise<number> => {
      const span = `from=${new Date(now - days * DAY_MS).toISOString()}&to=${new Date(now).toISOString()}`;
      const url = `${address}/api/v1/rooms/${room.id}/shelves/${shelf.id}/series/airTemperature?${span}`;
      return timed(async () => {
        const answer = await fetch(url, { headers: { cookie } });
        if (!answer.ok) throw new Error(await answer.text());
        await answer.arrayBuffer();
      });
    };
    try {
      return await interleaved(chart(365), chart(7), RUNS);
    } finally {
      await application.stop();
    }
  },
};
