import { createLoggerFileReader, type LoggerFileReader } from '@shared/logger-files/logger-file-reader';
import type { LoggerFileShape } from '@shared/logger-files/logger-file-shape';
import type { ReadingRejection } from '@shared/logger-files/reading-rejection';
import { BulkBatch } from '../readings/bulk-columns';
import { FileStatistics } from './file-statistics';
import { OffShelfCount, type PlacedSensor } from './off-shelf-count';

/** Of very many unusable lines only the first are kept; all are counted. */
const MOST_REJECTIONS = 10_000;

/** How a file is read. */
export interface FileReading {
  readonly shape: LoggerFileShape;
  /** When elapsed time began [ms]; null where the file has instants. */
  readonly startsAt: number | null;
  /** The present [ms]. */
  readonly now: number;
  /** Sensors by the key of their series, as places in their list. */
  readonly places: ReadonlyMap<string, number>;
  /** The sensors by their place, with where they were; null for one that is made for the file. */
  readonly sensors: readonly (PlacedSensor | null)[];
}

/** Turns the bytes of a file into batches of readings, and notes what can't be used. */
export class FileReadings {
  readonly rejections: ReadingRejection[] = [];
  readonly rejectedByCode = new Map<string, number>();
  readonly statistics = new FileStatistics();
  readonly offShelf: OffShelfCount;
  rejected = 0;
  missing = 0;
  private readonly reader: LoggerFileReader;
  private readonly batch = new BulkBatch();
  /** By the index of the series; -1 for one that is not brought in. */
  private readonly placeOf: number[] = [];

  constructor({ shape, startsAt, now, places, sensors }: FileReading) {
    const { placeOf, statistics } = this;
    const offShelf = new OffShelfCount(sensors);
    this.offShelf = offShelf;
    this.reader = createLoggerFileReader(
      onlyMatched(shape, places),
      {
        onReading: (series, at, value) => {
          let place = placeOf[series.index];
          if (place === undefined) {
            place = places.get(series.key) ?? -1;
            placeOf[series.index] = place;
          }
          if (place === -1) return;
          statistics.take(place, at);
          offShelf.take(place, at);
          this.batch.push(place, at, value);
        },
        onRejected: (rejection) => this.reject(rejection),
      },
      { referenceMs: now, ...(startsAt === null ? {} : { startAtMs: startsAt }) },
    );
  }

  /** Readings of the next piece, in the order of the file; they are good until the next call. */
  read(piece: Buffer): BulkBatch {
    this.batch.clear();
    this.reader.write(piece);
    return this.batch;
  }

  /** What is left at the end of the file. */
  end(): BulkBatch {
    this.batch.clear();
    this.missing = this.reader.end().missing;
    return this.batch;
  }

  private reject(rejection: ReadingRejection): void {
    this.rejected += 1;
    this.rejectedByCode.set(rejection.code, (this.rejectedByCode.get(rejection.code) ?? 0) + 1);
    if (this.rejections.length < MOST_REJECTIONS) this.rejections.push(rejection);
  }
}

/** In a file with a column a quantity, what goes nowhere need not be read. */
function onlyMatched(shape: LoggerFileShape, places: ReadonlyMap<string, number>): LoggerFileShape {
  if (shape.layout !== 'wide') return shape;
  const columns = new Set([...places.keys()].map((key) => Number(key.slice(key.lastIndexOf('|') + 1))));
  return {
    ...shape,
    columns: shape.columns.map((column) =>
      column.role === 'quantity' && !columns.has(column.index) ? { ...column, role: 'ignore' } : column,
    ),
  };
}
