import { foldHeader } from './header-words';
import type { LoggerSeries } from './logger-file-shape';
import type { LoggerQuantity } from './quantities';
import { quantityRules } from './quantities';

/** A sensor of the room that a series can be matched to. */
export interface MatchableSensor {
  readonly id: string;
  readonly quantity: string;
  /** Label of the shelf it is on, as `A3`; null where it is on none. */
  readonly shelfLabel: string | null;
  readonly label: string;
  readonly deviceName: string;
}

/** A sensor proposed for a series. */
export interface MatchProposal {
  readonly sensorId: string;
  /** From 0 to 1; only the order means something. */
  readonly score: number;
  /** One sentence for the person who checks it. */
  readonly reason: string;
}

/** What is proposed for one series, best first. */
export interface SeriesProposals {
  readonly seriesKey: string;
  /** The quantity is computed from others, so the series is only compared and needs no sensor. */
  readonly isCompared: boolean;
  readonly proposals: readonly MatchProposal[];
}

/**
 * Proposes the sensors that each series of a file may come from: sensors of the same quantity whose shelf, label or device
 * is named in the file's column, sensor column or file name.
 *
 * @param series - Series of the file.
 * @param sensors - Sensors of the room.
 * @param fileName - Name of the file, which often carries the shelf.
 */
export function proposeMatches(
  series: readonly LoggerSeries[],
  sensors: readonly MatchableSensor[],
  fileName = '',
): SeriesProposals[] {
  return series.map((one) => {
    const { isCompared } = quantityRules[one.quantity];
    const candidates = isCompared ? [] : sensors.filter((sensor) => sensor.quantity === one.quantity);
    const proposals = candidates
      .map((sensor) => proposal(one, sensor, fileName, candidates.length))
      .sort((a, b) => (a.score === b.score ? a.sensorId.localeCompare(b.sensorId) : b.score - a.score));
    return { seriesKey: one.key, isCompared, proposals };
  });
}

interface Clue {
  readonly weight: number;
  /** The sensor's word that the file may name. */
  readonly word: string;
  readonly kind: string;
}

function proposal(
  series: LoggerSeries,
  sensor: MatchableSensor,
  fileName: string,
  candidates: number,
): MatchProposal {
  const clues: Clue[] = [
    { weight: 0.5, word: sensor.label, kind: 'sensor' },
    { weight: 0.4, word: sensor.shelfLabel ?? '', kind: 'shelf' },
    { weight: 0.3, word: sensor.deviceName, kind: 'device' },
  ];
  const places = [
    { text: `${series.sensorName} ${series.name}`, words: 'the file', share: 1 },
    { text: fileName, words: 'the name of the file', share: 0.5 },
  ];
  const found = clues.flatMap((clue) => {
    const place = places.find(({ text }) => names(text, clue.word));
    return place === undefined
      ? []
      : [
          {
            score: clue.weight * place.share,
            reason: `${place.words} names the ${clue.kind} “${clue.word}”`,
          },
        ];
  });
  const base = candidates === 1 ? 0.2 : 0.05;
  const score = Math.min(
    1,
    found.reduce((sum, { score: part }) => sum + part, base),
  );
  const label = labelOf(series.quantity);
  const only = candidates === 1 ? `it is the only sensor for ${label}` : `it measures ${label} too`;
  const reasons = found.length > 0 ? found.map(({ reason }) => reason) : [only];
  return { sensorId: sensor.id, score, reason: `${capitalised(reasons.join(', and '))}.` };
}

function labelOf(quantity: LoggerQuantity): string {
  return quantityRules[quantity].label;
}

/** Whole words only: shelf `A1` is not named by `A12`. */
function names(text: string, word: string): boolean {
  const wanted = foldHeader(word);
  return (
    wanted !== '' &&
    ` ${foldHeader(text).replace(/[^\p{L}\p{N}]+/gu, ' ')} `.includes(
      ` ${wanted.replace(/[^\p{L}\p{N}]+/gu, ' ')} `,
    )
  );
}

function capitalised(text: string): string {
  return text.charAt(0).toUpperCase() + text.slice(1);
}
