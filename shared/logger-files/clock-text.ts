/** A date and a time of day that stood in one cell. */
export interface SplitTime {
  readonly date: string;
  readonly clock: string;
}

/** A time of day, with the offset from UTC where the text states one. */
export interface ClockReading {
  /** Milliseconds since midnight, NaN where the text is no time of day. */
  clockMs: number;
  /** Offset from UTC in milliseconds, east positive, or null. */
  offsetMs: number | null;
  /** True where AM or PM is stated. */
  isTwelveHour: boolean;
}

const ZERO = 48;
const COLON = 58;

const compactTime = /^(\d{8})[T ]?(\d{2})(\d{2})(\d{2})?(Z|[+-]\d{2}:?\d{2})?$/;

/**
 * Splits a cell into its date and its time of day; the clock is empty where there is only a date.
 *
 * @example
 * splitTime('2026-01-31T08:15:00Z'); // date '2026-01-31', clock '08:15:00Z'
 */
export function splitTime(text: string): SplitTime {
  const colon = text.indexOf(':');
  if (colon < 1) return splitCompact(text);
  let start = colon - 1;
  if (start > 0 && isDigit(text.charCodeAt(start - 1))) start -= 1;
  let end = start;
  while (end > 0 && isSeparator(text.charCodeAt(end - 1))) end -= 1;
  return { date: text.slice(0, end), clock: text.slice(start) };
}

function splitCompact(text: string): SplitTime {
  const parts = compactTime.exec(text);
  if (parts === null) return { date: text, clock: '' };
  return { date: parts[1] ?? '', clock: `${parts[2]}:${parts[3]}:${parts[4] ?? '00'}${parts[5] ?? ''}` };
}

function isDigit(code: number): boolean {
  return code >= ZERO && code < COLON;
}

// Space, comma, hyphen, "T" or "t", underscore, "@": what stands between a date and a time.
function isSeparator(code: number): boolean {
  return (
    code === 32 || code === 44 || code === 45 || code === 84 || code === 116 || code === 95 || code === 64
  );
}

/**
 * Makes the function that reads times of day: `8:15`, `08:15:30`, `08:15:30.250`, `8:15 pm`, `08:15:30+02:00`.
 * One object is reused for all answers.
 */
export function createClockParser(): (text: string) => ClockReading {
  const reading: ClockReading = { clockMs: Number.NaN, offsetMs: null, isTwelveHour: false };
  let lastTail = '';
  let lastMeaning: TailMeaning = { kind: 'none' };
  return (text) => {
    reading.clockMs = Number.NaN;
    reading.offsetMs = null;
    reading.isTwelveHour = false;
    const tailStart = readDigits(text, reading);
    if (tailStart === text.length) return reading;
    const tail = text.slice(tailStart);
    if (tail !== lastTail) {
      lastMeaning = meaningOfTail(tail);
      lastTail = tail;
    }
    applyTail(reading, lastMeaning);
    return reading;
  };
}

/** Reads hours, minutes and seconds into the reading; answers where the text goes on. */
function readDigits(text: string, reading: ClockReading): number {
  const first = text.charCodeAt(0) - ZERO;
  const isTwoDigits = text.charCodeAt(1) !== COLON;
  const hours = isTwoDigits ? first * 10 + (text.charCodeAt(1) - ZERO) : first;
  let position = isTwoDigits ? 2 : 1;
  const minutes = twoDigitsAfterColon(text, position);
  if (!(first >= 0 && first <= 9 && hours >= 0 && hours <= 24 && minutes <= 59)) return text.length;
  position += 3;
  let milliseconds = 0;
  if (text.charCodeAt(position) === COLON) {
    const seconds = twoDigitsAfterColon(text, position);
    if (!(seconds <= 60)) return text.length;
    position += 3;
    milliseconds = seconds * 1000;
    const mark = text.charCodeAt(position);
    if (mark === 46 || mark === 44) {
      let scale = 100;
      position += 1;
      for (; isDigit(text.charCodeAt(position)); position += 1, scale /= 10) {
        milliseconds += (text.charCodeAt(position) - ZERO) * scale;
      }
    }
  }
  const clockMs = (hours * 60 + minutes) * 60_000 + Math.round(milliseconds);
  if (clockMs <= 86_400_000) reading.clockMs = clockMs;
  return position;
}

function twoDigitsAfterColon(text: string, position: number): number {
  if (text.charCodeAt(position) !== COLON) return Number.NaN;
  const tens = text.charCodeAt(position + 1) - ZERO;
  const ones = text.charCodeAt(position + 2) - ZERO;
  return tens >= 0 && tens <= 9 && ones >= 0 && ones <= 9 ? tens * 10 + ones : Number.NaN;
}

type TailMeaning =
  | { readonly kind: 'none' | 'am' | 'pm' | 'unreadable' }
  | { readonly kind: 'offset'; readonly offsetMs: number };

function meaningOfTail(tail: string): TailMeaning {
  const text = tail.trim().toLowerCase();
  if (text === '' || text === 'h' || text === 'uhr') return { kind: 'none' };
  if (/^a\.?\s?m\.?$/.test(text)) return { kind: 'am' };
  if (/^p\.?\s?m\.?$/.test(text)) return { kind: 'pm' };
  if (/^(z|utc|gmt)$/.test(text)) return { kind: 'offset', offsetMs: 0 };
  const parts = /^(?:utc|gmt)?\s?([+\-−])(\d{1,2})(?::?(\d{2}))?$/.exec(text);
  if (parts === null) return { kind: 'unreadable' };
  const minutes = Number(parts[2]) * 60 + Number(parts[3] ?? 0);
  if (minutes > 18 * 60) return { kind: 'unreadable' };
  return { kind: 'offset', offsetMs: (parts[1] === '+' ? minutes : -minutes) * 60_000 };
}

function applyTail(reading: ClockReading, meaning: TailMeaning): void {
  const hour = Math.floor(reading.clockMs / 3_600_000);
  switch (meaning.kind) {
    case 'none':
      return;
    case 'unreadable':
      reading.clockMs = Number.NaN;
      return;
    case 'offset':
      reading.offsetMs = meaning.offsetMs;
      return;
    case 'am':
    case 'pm':
      reading.isTwelveHour = true;
      if (hour < 1 || hour > 12) reading.clockMs = Number.NaN;
      else reading.clockMs += ((meaning.kind === 'pm' ? 12 : 0) - (hour === 12 ? 12 : 0)) * 3_600_000;
  }
}
