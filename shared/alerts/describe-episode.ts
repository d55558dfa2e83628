import { brokenSide, type AboveKind, type AlertKind, type BelowKind } from './alert-rule';
import type { Episode } from './episode';
import { adviceFor, changeWord, sideWords, type AlertQuantity } from './episode-words';

/** How numbers and instants are written for a reader: in their units, their language, the room's time zone. */
export interface EpisodeFormatters {
  /** A value with its unit: "28.3 °C". */
  readonly value: (value: number, quantity: AlertQuantity) => string;
  /** A value whose unit has just been said: "26". */
  readonly bareValue: (value: number, quantity: AlertQuantity) => string;
  /** A difference with its unit, never negative: "2.3 °C" (4.1 °F, not 36.1). */
  readonly difference: (difference: number, quantity: AlertQuantity) => string;
  /** A length of time [ms]: "2 h 10 min". */
  readonly duration: (ms: number) => string;
  /** An instant as a person says it: "13:54", "yesterday 13:54". */
  readonly time: (at: number) => string;
}

/** What an episode is told from. */
export interface EpisodeFacts {
  readonly episode: Episode;
  readonly kind: AlertKind;
  readonly quantity: AlertQuantity;
  /** "A1" */
  readonly shelfLabel: string;
  /** Whether the shelf's lamps shone at the peak; null, or left out, where that is not known. */
  readonly isLit?: boolean | null;
  readonly formatters: EpisodeFormatters;
  /** The present [ms since 1970 UTC]. */
  readonly now: number;
}

/** An episode in words. */
export interface EpisodeDescription {
  /** What is wrong where, short: "A1 air is 2.3 °C too warm". */
  readonly title: string;
  /** What, since when, how far off, what was wanted. */
  readonly sentence: string;
  /** What to try. */
  readonly tryThis: string;
  /** The usual caution where a hand goes near lamps, mats or water; null where none is called for. */
  readonly caution: string | null;
}

/**
 * Tells an episode in the words of the trade.
 *
 * @param facts - The episode, what it is about, and how to write numbers and instants.
 * @returns Title, sentence, advice and caution; in the past tense once it has ended.
 */
export function describeEpisode(facts: EpisodeFacts): EpisodeDescription {
  const quantity = toldQuantity(facts);
  const { title, sentence } = wordsOf({ ...facts, quantity });
  return { title: `${facts.shelfLabel} ${title}`, sentence, ...adviceFor(facts.kind, quantity, facts.isLit) };
}

/** A day's light is told in hours or as its sum, not in what the sensor measures. */
function toldQuantity({ kind, quantity }: EpisodeFacts): AlertQuantity {
  if (kind === 'lightShort') return 'lightHours';
  return kind === 'lightSumShort' ? 'dailyLightIntegral' : quantity;
}

interface Words {
  /** Follows the shelf's label. */
  readonly title: string;
  readonly sentence: string;
}

function wordsOf(facts: EpisodeFacts): Words {
  const { episode, kind, quantity, formatters } = facts;
  const { peakValue, peakExcess, limit } = episode;
  const is = episode.endedAt === null ? 'is' : 'was';
  const spanned = (what: string) => `${what} ${spanOf(facts)}`;
  const apart = formatters.difference(Math.abs(peakValue), quantity);
  switch (kind) {
    case 'aboveRange':
    case 'belowRange':
    case 'lightShort':
    case 'lightSumShort':
      return rangeWords(facts, kind);
    case 'dangerHigh':
    case 'dangerLow': {
      const { noun, tooHigh, tooLow } = sideWords[quantity];
      const danger = `dangerously ${(kind === 'dangerHigh' ? tooHigh : tooLow).replace('too ', '')}`;
      return {
        title: `${noun} ${is} ${danger}: ${formatters.value(peakValue, quantity)}`,
        sentence: `${spanned(capitalised(danger))}: ${peakOf(facts, kind)}, danger ${
          kind === 'dangerHigh' ? 'above' : 'below'
        } ${formatters.bareValue(limit, quantity)}.`,
      };
    }
    case 'fastRise':
    case 'fastFall': {
      const word = changeWord(quantity, kind === 'fastRise');
      return {
        title: `${sideWords[quantity].noun} ${is} ${word} fast`,
        sentence: `${spanned(`${capitalised(word)} fast`)}: ${apart} an hour, ordinary is up to ${formatters.difference(Math.abs(limit), quantity)}.`,
      };
    }
    case 'lampDark':
      return {
        title: `${is} dark when its lamp should be on`,
        sentence: `${spanned('Dark')}: ${formatters.value(peakValue, quantity)} while the lamp is planned on.`,
      };
    case 'lampLit':
      return {
        title: `${is} lit when its lamp should be off`,
        sentence: `${spanned('Lit')}: ${formatters.value(peakValue, quantity)} while the lamp is planned off.`,
      };
    case 'matStuckOn':
      return {
        title: `root zone ${is} heated with nothing left to germinate`,
        sentence: `${spanned('Heated')}: ${apart} warmer than the air, expected within ${formatters.difference(limit, quantity)}.`,
      };
    case 'condensation':
      return {
        title: `surface ${is} below the dew point`,
        sentence: `${spanned('Below the dew point')}: by ${formatters.difference(peakExcess, quantity)}.`,
      };
    case 'wetHours': {
      const wet = formatters.duration(peakValue * msPerHour);
      return {
        title: `leaves ${is === 'is' ? 'have been' : 'were'} wet for ${wet}`,
        sentence: `${spanned('Wet long enough for grey mould')}: ${wet}, wanted up to ${formatters.duration(limit * msPerHour)}.`,
      };
    }
    case 'sensorsDisagree':
      return {
        title: `sensors ${is === 'is' ? 'are' : 'were'} ${apart} apart`,
        sentence: `${spanned('Apart')}: ${apart}, expected within ${formatters.difference(limit, quantity)}.`,
      };
    case 'sensorFailed':
      return {
        title: `${sensorNoun(quantity)} ${is === 'is' ? 'fails' : 'failed'} its quality tests`,
        sentence: `${spanned('Readings failed their quality tests')}.`,
      };
    case 'sensorSilent':
      return silenceWords(facts, sensorNoun(quantity));
    case 'deviceSilent':
      return silenceWords(facts, 'device');
  }
}

/** Air has a temperature and a humidity: their sensors go by what they measure, not by where. */
function sensorNoun(quantity: AlertQuantity): string {
  if (quantity === 'relativeHumidity') return 'humidity sensor';
  return `${sideWords[quantity].noun} sensor`;
}

const msPerHour = 3_600_000;

function rangeWords(facts: EpisodeFacts, kind: AboveKind | BelowKind): Words {
  const { episode, quantity, formatters } = facts;
  const { noun, tooHigh, tooLow } = sideWords[quantity];
  const isHigh = brokenSide(kind) === 1;
  const off = isHigh ? tooHigh : tooLow;
  const wanted = `wanted ${isHigh ? 'up to' : 'at least'} ${formatters.bareValue(episode.limit, quantity)}`;
  const is = episode.endedAt === null ? 'is' : 'was';
  return {
    title: `${noun} ${is} ${formatters.difference(episode.peakExcess, quantity)} ${off}`,
    sentence: `${capitalised(off)} ${spanOf(facts)}: ${peakOf(facts, kind)}, ${wanted}.`,
  };
}

function silenceWords(facts: EpisodeFacts, who: string): Words {
  const { episode, formatters, now } = facts;
  const lasted = formatters.duration((episode.endedAt ?? now) - episode.beganAt);
  return {
    title: `${who} ${episode.endedAt === null ? 'is' : 'was'} silent`,
    sentence: `No reading ${spanOf(facts)}: ${lasted}, expected every ${formatters.duration(episode.limit)} at least.`,
  };
}

function spanOf({ episode, formatters }: EpisodeFacts): string {
  const began = formatters.time(episode.beganAt);
  return episode.endedAt === null ? `since ${began}` : `from ${began} to ${formatters.time(episode.endedAt)}`;
}

/** The peak; once it is over, marked as the most that it came to. */
function peakOf({ episode, quantity, formatters }: EpisodeFacts, kind: AboveKind | BelowKind): string {
  const value = formatters.value(episode.peakValue, quantity);
  if (episode.endedAt === null) return value;
  return brokenSide(kind) === 1 ? `${value} at the highest` : `${value} at the lowest`;
}

function capitalised(text: string): string {
  return text.charAt(0).toUpperCase() + text.slice(1);
}
