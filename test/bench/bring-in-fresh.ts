import { startBenchApplication } from './bench-application';
import { interleaved, type Benchmark } from './benchmark';
import {
  aBenchRoom,
  bringIn,
  emptyReadings,
  newSensors,
  PreparedCopy,
  profileFor,
  ROWS_OF_A_MILLION,
  uploaderAt,
} from './bring-in-year';

const RUNS = 5;
const rows = { from: 0, to: ROWS_OF_A_MILLION };

/** A file of a million readings of which nothing is held yet. */
export const bringInFresh: Benchmark = {
  name: 'bring-in-fresh',
  meaning:
    'a million new readings, from the last byte uploaded to the commit with sums and alerts, over psql copying them prepared',
  async run() {
    const application = await startBenchApplication();
    const { dataSource, address } = application;
    const prepared = await PreparedCopy.of(dataSource, ROWS_OF_A_MILLION);
    try {
      const room = await aBenchRoom(dataSource);
      const uploader = await uploaderAt(address, room);
      const ours = async (): Promise<number> => {
        const profile = await profileFor(uploader, await newSensors(dataSource, room));
        await emptyReadings(dataSource);
        return bringIn(uploader, profile, rows, { fresh: 3 * ROWS_OF_A_MILLION });
      };
      return await interleaved(ours, () => prepared.copy(), RUNS);
    } finally {
      await prepared.remove();
      await application.stop();
    }
  },
};
