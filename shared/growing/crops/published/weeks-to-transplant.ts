import { cited, span, type Figure, type Span } from '../figure';
import { CORNELL, DELAWARE, PURDUE, UTAH, UTAH_TOMATO_PEPPER } from './transplant-sources';

const weeks = (source: string, low: number, high: number): Figure<Span> => cited(span(low, high), source);

/** Weeks from sowing to transplant size; sources stay apart, for they disagree. */
export const weeksToTransplant = {
  onion: [weeks(DELAWARE, 9, 12), weeks(UTAH, 8, 12), weeks(PURDUE, 10, 12), weeks(CORNELL, 6, 8)],
  pepper: [
    weeks(DELAWARE, 7, 9),
    weeks(UTAH, 7, 9),
    weeks(UTAH_TOMATO_PEPPER, 8, 10),
    weeks(PURDUE, 5, 7),
    weeks(CORNELL, 6, 8),
  ],
  tomato: [weeks(DELAWARE, 5, 6), weeks(UTAH, 6, 8), weeks(PURDUE, 5, 7), weeks(CORNELL, 5, 8)],
  lettuce: [weeks(DELAWARE, 4, 6), weeks(CORNELL, 3, 5)],
  aubergine: [weeks(DELAWARE, 6, 9)],
  broccoli: [weeks(DELAWARE, 4, 7)],
  celery: [weeks(CORNELL, 8, 12)],
} as const satisfies Readonly<Record<string, readonly Figure<Span>[]>>;
