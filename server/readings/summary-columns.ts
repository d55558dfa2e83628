import { Column } from 'typeorm';

/** What every summary keeps of a span; see `PeriodSums` in shared/series/period-summary. */
export abstract class SummaryColumns {
  @Column('integer') count!: number;
  @Column('double precision', { name: 'covered_ms' }) coveredMs!: number;
  @Column('double precision', { nullable: true }) min!: number | null;
  @Column('double precision', { nullable: true }) max!: number | null;
  /** Integral over the covered time, value × milliseconds. */
  @Column('double precision', { name: 'integral_ms' }) integralMs!: number;
  @Column('double precision', { name: 'above_threshold_ms', nullable: true }) aboveThresholdMs!:
    number | null;
  @Column('double precision', { name: 'first_at_ms', nullable: true }) firstAtMs!: number | null;
  @Column('double precision', { name: 'first_value', nullable: true }) firstValue!: number | null;
  @Column('double precision', { name: 'last_at_ms', nullable: true }) lastAtMs!: number | null;
  @Column('double precision', { name: 'last_value', nullable: true }) lastValue!: number | null;
}
