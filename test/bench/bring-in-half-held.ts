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
const half = ROWS_OF_A_MILLION / 2;

/** A file of a million readings, the first half of which an earlier file has brought. */
export const bringInHalfHeld: Benchmark = {
  name: 'bring-in-half-held',
  meaning:
    'a million readings, half of them held, from the last byte uploaded to the commit, over psql copying all of them prepared',
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
        await bringIn(uploader, profile, { from: 0, to: half }, { fresh: 3 * half });
        await dataSource.query('CHECKPOINT');
        const expected = { fresh: 3 * half, alreadyHeld: 3 * half };
        return bringIn(uploader, profile, { from: 0, to: ROWS_OF_A_MILLION }, expected);
      };
      return await interleaved(ours, () => prepared.copy(), RUNS);
    } finally {
      await prepared.remove();
      await application.stop();
    }
  },
};
