import type { TimeProblem } from './time-reader';

/** Stable codes of the reasons for which a line or a cell is not used. */
export type ReadingRejectionCode =
  | TimeProblem
  | 'TOO_FEW_COLUMNS'
  | 'TOO_MANY_COLUMNS'
  | 'NOT_A_NUMBER'
  | 'VALUE_OUT_OF_RANGE'
  | 'UNIT_UNKNOWN'
  | 'QUANTITY_UNKNOWN';

/** A line or a cell that is not used, and why. */
export interface ReadingRejection {
  /** Line of the file, from 1. */
  readonly line: number;
  /** Cell on that line, from 1. */
  readonly column: number;
  readonly code: ReadingRejectionCode;
  /** What stands there, at most 80 characters. It is text from a stranger's file: never markup, never a formula. */
  readonly text: string;
  readonly message: string;
}

/** Each reason in a sentence for the person who brings the file in. */
export const rejectionMessages: Readonly<Record<ReadingRejectionCode, string>> = {
  TIME_UNREADABLE: 'This is not a time as the rest of the file writes it.',
  TIME_IMPLAUSIBLE: 'This time lies before 1990 or in the future; the clock of the logger was not set.',
  NONEXISTENT_LOCAL_TIME: 'This time did not exist: the clocks were put forward over it.',
  TOO_FEW_COLUMNS: 'The line has fewer cells than the columns that are read.',
  TOO_MANY_COLUMNS: 'The line has more cells than the file has columns.',
  NOT_A_NUMBER: 'This is not a number as the rest of the file writes it.',
  VALUE_OUT_OF_RANGE: 'No sensor can have measured this value.',
  UNIT_UNKNOWN: 'The unit beside the value does not belong to this quantity.',
  QUANTITY_UNKNOWN: 'The row names a quantity that is not kept here.',
};
