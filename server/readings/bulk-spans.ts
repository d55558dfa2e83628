import type { TouchedSpan } from './late-readings';

/** Where one sensor's readings were added, changed or removed, in order of time. */
export class BulkSpans {
  private readonly spans: { from: number; to: number }[] = [];

  /** @param joinMs - Changes no further apart than this are one span [ms]. */
  constructor(private readonly joinMs: number) {}

  /** Where the first change is [ms]; null without any. */
  get firstAt(): number | null {
    return this.spans[0]?.from ?? null;
  }

  /** Notes a change, not before those noted already. */
  add(at: number): void {
    const last = this.spans.at(-1);
    if (last !== undefined && at - last.to <= this.joinMs) last.to = Math.max(last.to, at);
    else this.spans.push({ from: at, to: at });
  }

  /** Notes a whole span, not before those noted already. */
  addSpan({ from, to }: TouchedSpan): void {
    this.add(from);
    const last = this.spans.at(-1);
    if (last !== undefined) last.to = Math.max(last.to, to);
  }

  /** Whether something changed at most so long before an instant, or at it. */
  isWithin(at: number, afterMs: number): boolean {
    for (let index = this.spans.length - 1; index >= 0; index -= 1) {
      const span = this.spans[index];
      if (span === undefined || span.to + afterMs < at) return false;
      if (span.from <= at) return true;
    }
    return false;
  }

  /**
   * The stretches whose sums can differ now.
   *
   * @param window - Only what lies in it, half-open [ms].
   * @param reachMs - How far a change reaches on either side [ms].
   * @param boundsAt - Widens to whole periods.
   * @returns Half-open stretches in order.
   */
  touchedPeriods(
    window: TouchedSpan,
    reachMs: number,
    boundsAt: (at: number) => { start: number; end: number },
  ): TouchedSpan[] {
    const touched: { from: number; to: number }[] = [];
    for (const span of this.spans) {
      if (span.to + reachMs < window.from) continue;
      if (span.from - reachMs >= window.to) break;
      const from = Math.max(window.from, boundsAt(span.from - reachMs).start);
      const to = Math.min(window.to, boundsAt(span.to + reachMs).end);
      const last = touched.at(-1);
      if (last !== undefined && from <= last.to) last.to = Math.max(last.to, to);
      else if (from < to) touched.push({ from, to });
    }
    return touched;
  }
}
