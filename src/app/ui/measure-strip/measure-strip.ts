import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { formatNumber, formatValue } from '@shared/format/numbers';
import { standing, type Standing, type WantedRange } from '@shared/format/standing';

/** The values between which a quantity sensibly lies, for drawing. */
export interface MeasureScale {
  readonly low: number;
  readonly high: number;
}

/**
 * One measured value on its scale: the wanted range as a band, a mark for now whose shape says inside, above or
 * below, and the same in words.
 */
@Component({
  selector: 'app-measure-strip',
  templateUrl: './measure-strip.html',
  styleUrl: './measure-strip.scss',
  host: { '[class]': 'side()' },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class MeasureStrip {
  /** What is measured, in the reader's words: "air", "root zone". */
  readonly name = input.required<string>();
  readonly unit = input.required<string>();
  /** The value in the unit shown; null when there is no reading. */
  readonly value = input.required<number | null>();
  readonly decimals = input(1);
  readonly scale = input.required<MeasureScale>();
  /** The wanted range in the unit shown; null draws no band and judges nothing. */
  readonly wanted = input<WantedRange | null>(null);
  /** How old the value is, when it is older than it should be: "2 h 28 min old". */
  readonly ageText = input<string | null>(null);
  /** Whether the reading failed a quality check. */
  readonly flagged = input(false);

  private readonly standing = computed<Standing | null>(() => {
    const [value, wanted] = [this.value(), this.wanted()];
    return value === null || wanted === null ? null : standing(value, wanted);
  });

  protected readonly side = computed(() => this.standing()?.side ?? 'unjudged');

  protected readonly figures = computed(() => formatNumber(this.value(), this.decimals()));

  /** "2.3 above"; null inside the range or when nothing is judged. */
  protected readonly deviation = computed(() => {
    const standing = this.standing();
    if (standing === null || standing.side === 'inside') return null;
    const by = formatNumber(standing.by, this.decimals());
    return /[1-9]/.test(by) ? `${by} ${standing.side}` : `just ${standing.side}`;
  });

  protected readonly position = computed(() => {
    const value = this.value();
    return value === null ? null : this.percent(value);
  });

  protected readonly band = computed(() => {
    const wanted = this.wanted();
    if (wanted === null) return null;
    const from = wanted.low === null ? 0 : this.percent(wanted.low);
    const to = wanted.high === null ? 100 : this.percent(wanted.high);
    return { from, width: Math.max(0, to - from) };
  });

  /** What stands under the strip, in order. */
  protected readonly nameParts = computed(() => {
    const parts = [
      { kind: 'what', text: this.name() },
      { kind: 'deviation', text: this.deviation() },
      { kind: 'age', text: this.ageText() },
      { kind: 'doubtful', text: this.flagged() ? 'doubtful' : null },
    ];
    return parts.filter(({ text }) => text !== null);
  });

  protected readonly spoken = computed(() => {
    const value = this.value();
    if (value === null) return `${this.name()}: no reading`;
    const parts = [`${this.name()} ${formatValue(value, this.unit(), this.decimals())}`, ...this.judgement()];
    const age = this.ageText();
    if (age !== null) parts.push(age);
    if (this.flagged()) parts.push('doubtful reading');
    return parts.join(', ');
  });

  private judgement(): string[] {
    const wanted = this.wanted();
    if (this.standing() === null || wanted === null) return [];
    const range = this.spokenRange(wanted);
    if (range === null) return [];
    const deviation = this.deviation();
    return [deviation === null ? `within the wanted ${range}` : `${deviation} the wanted ${range}`];
  }

  private spokenRange({ low, high }: WantedRange): string | null {
    if (low !== null && high !== null) return `${this.short(low)} to ${this.short(high)}`;
    if (high !== null) return `${this.short(high)} at most`;
    return low === null ? null : `${this.short(low)} at least`;
  }

  /** An end of the range without needless zeros: 20, 0.8. */
  private short(end: number): string {
    return formatNumber(end, Number.isInteger(end) ? 0 : this.decimals());
  }

  private percent(value: number): number {
    const { low, high } = this.scale();
    if (high <= low) return 50;
    return Math.min(100, Math.max(0, ((value - low) / (high - low)) * 100));
  }
}
