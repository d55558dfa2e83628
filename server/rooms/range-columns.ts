import type { Quantity } from '@shared/climate/quantity';
import type { WantedRange } from '@shared/contracts/rooms';
import { Column } from 'typeorm';

/** What a range says, without for whom. */
export type RangeValues = Omit<WantedRange, 'quantity' | 'source' | 'since'>;

/** A range with lamps on and off, and how patient its alert is. Null is "no limit on that side". */
export abstract class RangeColumns {
  @Column('double precision', { name: 'lamps_on_low', nullable: true }) lampsOnLow!: number | null;
  @Column('double precision', { name: 'lamps_on_high', nullable: true }) lampsOnHigh!: number | null;
  @Column('double precision', { name: 'lamps_off_low', nullable: true }) lampsOffLow!: number | null;
  @Column('double precision', { name: 'lamps_off_high', nullable: true }) lampsOffHigh!: number | null;
  @Column('double precision', { name: 'hold_minutes' }) holdMinutes!: number;
  @Column('double precision', { name: 'clearing_margin' }) clearingMargin!: number;
  /** From how far past the limit on it is urgent, in the stored unit; null never by that. */
  @Column('double precision', { name: 'urgent_by', nullable: true }) urgentBy!: number | null;
  /** After how long past the limit it is urgent; null never by that. */
  @Column('double precision', { name: 'urgent_after_minutes', nullable: true, default: 360 })
  urgentAfterMinutes!: number | null;
  /** Where the range came from, in a person's words. */
  @Column('text', { default: '' }) reason!: string;
}

/** What the columns of a range say. */
export function rangeOf(
  row: RangeColumns & { readonly quantity: Quantity },
): RangeValues & Pick<WantedRange, 'quantity'> {
  return {
    quantity: row.quantity,
    lampsOn: { low: row.lampsOnLow, high: row.lampsOnHigh },
    lampsOff: { low: row.lampsOffLow, high: row.lampsOffHigh },
    holdMinutes: row.holdMinutes,
    clearingMargin: row.clearingMargin,
    urgency: { by: row.urgentBy, afterMinutes: row.urgentAfterMinutes },
    reason: row.reason,
  };
}

/** A range as columns. */
export function columnsOf({ lampsOn, lampsOff, urgency, ...range }: RangeValues): RangeColumns {
  return {
    lampsOnLow: lampsOn.low,
    lampsOnHigh: lampsOn.high,
    lampsOffLow: lampsOff.low,
    lampsOffHigh: lampsOff.high,
    holdMinutes: range.holdMinutes,
    clearingMargin: range.clearingMargin,
    urgentBy: urgency.by,
    urgentAfterMinutes: urgency.afterMinutes,
    reason: range.reason,
  };
}
