import type { ShelfArrangement, SimulatedShelf } from '@shared/contracts/simulation';
import { hashOfName } from './random';
import { isWithinLampHours, lampMinutes, type LampMinutes, type WallTime } from './room-clock';

/** How a shelf is used from an instant on, read for quick asking. */
export interface Arrangement extends Pick<ShelfArrangement, 'isHeatMatOn' | 'isCovered' | 'leafAreaM2'> {
  readonly fromMs: number;
  readonly lampMinutes: readonly LampMinutes[];
}

const WATERING_STARTS_MINUTE = 8 * 60 + 30;
const WATERING_ROUND_MINUTES = 40;
const WATERING_EVERY_DAYS = 2;
const POURED_G = 120;

/** What is planned for one shelf over time: its arrangements, its lamp's timer and its waterings. */
export class ShelfPlan {
  private readonly arrangements: readonly Arrangement[];
  private readonly wateringMinute: number;
  private readonly wateringDay: number;

  /** @param shelf - The shelf with its lamp, mat and place. */
  constructor(readonly shelf: SimulatedShelf) {
    this.arrangements = shelf.arrangements
      .map(({ from, lampPlan, ...rest }) => ({
        ...rest,
        fromMs: Date.parse(from),
        lampMinutes: lampPlan.map(lampMinutes),
      }))
      .sort((a, b) => a.fromMs - b.fromMs);
    const hash = hashOfName(shelf.label);
    this.wateringMinute = WATERING_STARTS_MINUTE + (hash % WATERING_ROUND_MINUTES);
    this.wateringDay = hash % WATERING_EVERY_DAYS;
  }

  /** The arrangement in force at an instant; the first one also holds before its time. */
  arrangementAt(at: number): Arrangement {
    const current = this.arrangements.findLast(({ fromMs }) => fromMs <= at) ?? this.arrangements[0];
    if (current === undefined) throw new RangeError(`shelf ${this.shelf.label} has no arrangement`);
    return current;
  }

  /** Whether the timer wants the lamp lit. */
  isLampPlanned(arrangement: Arrangement, { minute }: WallTime): boolean {
    return this.shelf.lamp !== null && isWithinLampHours(arrangement.lampMinutes, minute);
  }

  /** Water given in this minute of the morning round [g]. A covered tray keeps its water. */
  pouredG(arrangement: Arrangement, { day, minute }: WallTime): number {
    const isDue = day % WATERING_EVERY_DAYS === this.wateringDay && minute === this.wateringMinute;
    return isDue && !arrangement.isCovered && arrangement.leafAreaM2 > 0 ? POURED_G : 0;
  }
}
