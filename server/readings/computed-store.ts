import { FIRST_FAILED_FLAGS } from '@shared/series/quality-tests';
import type { Sample } from '@shared/series/series';
import type { Tx } from '../database/transactions';

/** A span of one humidity sensor's readings, half-open [ms]. */
export interface HumiditySpan {
  readonly sensorId: string;
  readonly from: number;
  readonly to: number;
  /** How far around the span temperatures are needed [ms]. */
  readonly withinMs: number;
}

/** Humidity readings on one shelf with the air temperatures taken there. */
export interface ShelfAir {
  readonly sensorId: string;
  readonly shelfId: string;
  readonly leafOffsetC: number;
  readonly humidity: readonly Sample[];
  readonly temperature: readonly Sample[];
}

interface AirRow {
  sensor_id: string;
  shelf_id: string;
  leaf_offset_c: number;
  at: Date;
  value: number;
}

/**
 * Reads what computed quantities are made of, by the placements of the time. Readings are sorted within each span, so that
 * PostgreSQL asks the index for it; joined, it would read the whole table as soon as there are a few spans.
 */
export class ComputedStore {
  /**
   * Humidity and temperature where the humidity sensors were during their spans.
   *
   * @returns One entry a sensor and shelf; readings in order. Where two temperature readings share an instant, the
   *   lower sensor id counts.
   */
  async airOf(tx: Tx, spans: readonly HumiditySpan[]): Promise<ShelfAir[]> {
    if (spans.length === 0) return [];
    const parameters = [
      spans.map(({ sensorId }) => sensorId),
      spans.map(({ from }) => new Date(from)),
      spans.map(({ to }) => new Date(to)),
    ];
    const humidity: AirRow[] = await tx.query(
      `SELECT span.id AS sensor_id, p.shelf_id, sh.leaf_offset_c, r.at, r.value
       FROM unnest($1::uuid[], $2::timestamptz[], $3::timestamptz[]) AS span (id, from_at, to_at)
       JOIN placement p ON p.sensor_id = span.id
         AND tstzrange(p.from_at, p.to_at) && tstzrange(span.from_at, span.to_at)
       JOIN shelf sh ON sh.id = p.shelf_id
       CROSS JOIN LATERAL (
         SELECT at, value FROM reading
         WHERE sensor_id = span.id AND flags < $4
           AND at >= greatest(p.from_at, span.from_at) AND at < least(p.to_at, span.to_at)
         ORDER BY at
       ) AS r
       ORDER BY span.id, p.shelf_id, r.at`,
      [...parameters, FIRST_FAILED_FLAGS],
    );
    const temperature: AirRow[] = await tx.query(
      `SELECT DISTINCT ON (span.id, p.shelf_id, r.at) span.id AS sensor_id, p.shelf_id, r.at, r.value
       FROM unnest($1::uuid[], $2::timestamptz[], $3::timestamptz[], $4::float8[]) AS span (id, from_at, to_at, within)
       JOIN placement ph ON ph.sensor_id = span.id
         AND tstzrange(ph.from_at, ph.to_at) && tstzrange(span.from_at, span.to_at)
       JOIN placement p ON p.shelf_id = ph.shelf_id
       JOIN sensor s ON s.id = p.sensor_id AND s.quantity = 'airTemperature'
       CROSS JOIN LATERAL (
         SELECT at, value FROM reading
         WHERE sensor_id = s.id AND flags < $5
           AND at >= greatest(p.from_at, span.from_at - span.within * interval '1 millisecond')
           AND at <= least(p.to_at, span.to_at + span.within * interval '1 millisecond')
         ORDER BY at
       ) AS r
       ORDER BY span.id, p.shelf_id, r.at, s.id`,
      [...parameters, spans.map(({ withinMs }) => withinMs), FIRST_FAILED_FLAGS],
    );
    return joined(humidity, temperature);
  }
}

function joined(humidity: readonly AirRow[], temperature: readonly AirRow[]): ShelfAir[] {
  const air = new Map<string, ShelfAir & { humidity: Sample[]; temperature: Sample[] }>();
  for (const row of humidity) {
    const key = row.sensor_id + row.shelf_id;
    let entry = air.get(key);
    if (entry === undefined) {
      const { sensor_id: sensorId, shelf_id: shelfId, leaf_offset_c: leafOffsetC } = row;
      entry = { sensorId, shelfId, leafOffsetC, humidity: [], temperature: [] };
      air.set(key, entry);
    }
    entry.humidity.push({ at: row.at.getTime(), value: row.value });
  }
  for (const row of temperature) {
    air.get(row.sensor_id + row.shelf_id)?.temperature.push({ at: row.at.getTime(), value: row.value });
  }
  return [...air.values()];
}
