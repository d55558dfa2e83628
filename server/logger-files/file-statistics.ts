/** Steps longer than this many ordinary ones are gaps. */
const GAP_STEPS = 2.5;
/** Different steps that are counted apart; a file with more of them has no ordinary step anyway. */
const MOST_STEPS = 10_000;

/** Steps between the rows of one series. */
interface Steps {
  previousAt: number;
  readonly counts: Map<number, number>;
  readings: number;
}

/** Span, interval and gaps of a file's readings, counted as they pass. */
export class FileStatistics {
  private readonly steps: Steps[] = [];
  private first = Infinity;
  private last = -Infinity;

  /**
   * Counts a reading.
   *
   * @param series - Which series, from 0.
   * @param at - Instant [ms].
   */
  take(series: number, at: number): void {
    if (at < this.first) this.first = at;
    if (at > this.last) this.last = at;
    let own = this.steps[series];
    if (own === undefined) {
      own = { previousAt: at, counts: new Map(), readings: 0 };
      this.steps[series] = own;
    }
    own.readings += 1;
    const step = Math.abs(at - own.previousAt);
    own.previousAt = at;
    if (step === 0) return;
    const count = own.counts.get(step);
    if (count !== undefined || own.counts.size < MOST_STEPS) own.counts.set(step, (count ?? 0) + 1);
  }

  /** Where the readings lie [ms]; null without any. */
  get span(): { readonly from: number; readonly to: number } | null {
    return this.last === -Infinity ? null : { from: this.first, to: this.last };
  }

  /** The most common step of the longest series [s], and how many are longer than two and a half of it. */
  rhythm(): { readonly intervalS: number | null; readonly gaps: number } {
    // A series that never occurs leaves a hole, which flat() takes out.
    const longest = this.steps
      .flat()
      .reduce<Steps | null>(
        (best, one) => (best === null || one.readings > best.readings ? one : best),
        null,
      );
    if (longest === null || longest.counts.size === 0) return { intervalS: null, gaps: 0 };
    const entries = [...longest.counts];
    const [usual] = entries.reduce((best, entry) => (entry[1] > best[1] ? entry : best));
    const gaps = entries.reduce(
      (count, [step, times]) => (step > usual * GAP_STEPS ? count + times : count),
      0,
    );
    return { intervalS: usual / 1_000, gaps };
  }
}
