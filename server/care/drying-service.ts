import type { PlantingDrying } from '@shared/contracts/care-record';
import { dryingOf, type Drying } from '@shared/growing/drying';
import type { Series } from '@shared/series/series';
import type { Clock } from '../clock';
import type { Transactions, Tx } from '../database/transactions';
import type { PlantingsService } from '../plantings/plantings-service';
import type { DryingStore } from './drying-store';
import { THIRST_GAP_MS, type ShelfThirst } from './shelf-thirst';

/** What {@link DryingService} works with. */
export interface DryingParts {
  readonly transactions: Transactions;
  readonly drying: DryingStore;
  readonly thirst: ShelfThirst;
  readonly plantings: Pick<PlantingsService, 'planting' | 'placesOf'>;
  readonly now: Clock;
}

/** A planting, drying. */
interface Dried {
  readonly drying: Drying;
  readonly air: Series;
  readonly at: Date;
}

const HOUR_MS = 3_600_000;
const DAY_MS = 24 * HOUR_MS;
/** A planting grows, so it learns from its waterings of so long. */
const MEMORY_DAYS = 60;

/** Tells from the air and its waterings how far a planting has dried. */
export class DryingService {
  constructor(private readonly parts: DryingParts) {}

  /** Waterings against drying, for a chart; 404 when the room has no such planting. */
  async view(roomId: string, plantingId: string): Promise<PlantingDrying> {
    const { transactions, drying } = this.parts;
    const tx = transactions.plain;
    const { drying: found, air, at } = await this.dry(tx, roomId, plantingId);
    return {
      at: at.toISOString(),
      fallbackDays: await drying.fallbackDays(tx, plantingId),
      spans: found.spans.map(({ from, to, ...span }) => ({
        ...span,
        from: new Date(from).toISOString(),
        to: to === null ? null : new Date(to).toISOString(),
      })),
      curve: curveOf(found, air, at.getTime()),
      interval: found.interval && { ...found.interval },
      standing: found.standing,
      dueAt: found.dueAt === null ? null : new Date(found.dueAt).toISOString(),
    };
  }

  /** Whether a planting's drying asks for water; `unknown` where it has not taught enough, or the air was not measured. */
  async due(
    tx: Tx,
    { roomId, plantingId }: { readonly roomId: string; readonly plantingId: string },
  ): Promise<'due' | 'notYet' | 'unknown'> {
    const { standing } = (await this.dry(tx, roomId, plantingId)).drying;
    if (standing === null) return 'unknown';
    return standing === 'due' ? 'due' : 'notYet';
  }

  private async dry(tx: Tx, roomId: string, plantingId: string): Promise<Dried> {
    const { drying, thirst, plantings } = this.parts;
    const { startedAt } = await plantings.planting(tx, roomId, plantingId);
    const at = this.parts.now();
    const now = at.getTime();
    const memory = now - MEMORY_DAYS * DAY_MS;
    const waterings = await drying.waterings(tx, plantingId, new Date(memory));
    // Of an older planting the first watering that is remembered begins the first span.
    const since = startedAt.getTime() >= memory ? startedAt.getTime() : (waterings[0]?.at ?? memory);
    const places = await plantings.placesOf(tx, plantingId);
    const air = await thirst.along(tx, places, since - HOUR_MS, now);
    return { drying: dryingOf(waterings, air, { startedAt: since, now, maxGapMs: THIRST_GAP_MS }), air, at };
  }
}

/** The integral as it grew from hour to hour, falling to 0 at each watering. */
function curveOf({ spans }: Drying, air: Series, now: number): PlantingDrying['curve'] {
  const curve: PlantingDrying['curve'] = [];
  for (const { from, to } of spans) {
    const end = to ?? now;
    let sum = 0;
    let last = { at: from, value: 0 };
    curve.push({ at: new Date(from).toISOString(), integralKPaH: 0 });
    for (const { at, value } of air) {
      if (at <= from || at > end) continue;
      // A gap adds nothing, as in the sums.
      if (at - last.at <= THIRST_GAP_MS) sum += (value * (at - last.at)) / HOUR_MS;
      last = { at, value };
      curve.push({ at: new Date(at).toISOString(), integralKPaH: sum });
    }
  }
  return curve;
}
