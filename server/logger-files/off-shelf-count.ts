import type { OffShelfReadings } from '@shared/contracts/logger-file-result';

/** A sensor's time on a shelf [ms], half-open. */
export interface Stay {
  readonly shelfLabel: string;
  readonly from: number;
  /** Infinity while it is still there. */
  readonly to: number;
}

/** A sensor that a file's readings go to, with where it was. */
export interface PlacedSensor {
  readonly sensorId: string;
  /** In order of time. */
  readonly stays: readonly Stay[];
}

type When = OffShelfReadings['when'];

interface Counted {
  count: number;
  from: number;
  to: number;
}

interface Own {
  readonly sensor: PlacedSensor;
  /** The stay that the last reading fell into; empty before the first. */
  stay: Pick<Stay, 'from' | 'to'>;
  readonly counted: Map<When, Counted>;
}

const noStay = { from: Infinity, to: -Infinity };

/** Counts the readings of a file that were taken while their sensor was on no shelf, as they pass. */
export class OffShelfCount {
  private readonly own: readonly (Own | null)[];

  /** @param sensors - By their place; null for one that is made for the file and placed as it should be. */
  constructor(sensors: readonly (PlacedSensor | null)[]) {
    this.own = sensors.map((sensor) => sensor && { sensor, stay: noStay, counted: new Map() });
  }

  /**
   * Counts a reading.
   *
   * @param place - Of its sensor.
   * @param at - Instant [ms].
   */
  take(place: number, at: number): void {
    const own = this.own[place];
    if (own === undefined || own === null) return;
    if (at >= own.stay.from && at < own.stay.to) return;
    const stay = own.sensor.stays.find(({ from, to }) => at >= from && at < to);
    if (stay === undefined) countOutside(own, at);
    else own.stay = stay;
  }

  /** What was counted, by sensor. */
  found(): OffShelfReadings[] {
    return this.own.flatMap((own) => {
      if (own === null) return [];
      const [first] = own.sensor.stays;
      const firstShelf =
        first === undefined ? null : { label: first.shelfLabel, since: new Date(first.from).toISOString() };
      return [...own.counted].map(([when, { count, from, to }]) => ({
        sensorId: own.sensor.sensorId,
        when,
        count,
        from: new Date(from).toISOString(),
        to: new Date(to).toISOString(),
        firstShelf,
      }));
    });
  }
}

function countOutside({ sensor, counted }: Own, at: number): void {
  const when = whenOf(sensor, at);
  const before = counted.get(when);
  if (before === undefined) {
    counted.set(when, { count: 1, from: at, to: at });
    return;
  }
  before.count += 1;
  before.from = Math.min(before.from, at);
  before.to = Math.max(before.to, at);
}

function whenOf({ stays: [first] }: PlacedSensor, at: number): When {
  if (first === undefined) return 'neverOnShelf';
  return at < first.from ? 'beforeFirstShelf' : 'betweenShelves';
}
