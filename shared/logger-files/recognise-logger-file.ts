import { splitMeasured } from './cell-kinds';
import type {
  LoggerFileShape,
  LoggerSeries,
  RecognitionEvidence,
  RecognitionQuestion,
} from './logger-file-shape';
import { usualMissingMarks } from './logger-file-shape';
import { LoggerFileError } from './logger-file-error';
import { createNumberParser, recogniseNumberMarks } from './number-text';
import { questionUnits } from './question-units';
import { recogniseColumns } from './recognise-columns';
import { recogniseEncoding } from './recognise-encoding';
import { recogniseHeader } from './recognise-header';
import type { SampleTable } from './recognise-table';
import { recogniseTable } from './recognise-table';
import { recogniseTime } from './recognise-time';
import { refuseMarkup, refuseOtherFiles } from './refuse-other-files';
import { rowIdentity, seriesColumnsOf, seriesInRow } from './row-series';

/** What recognition may know beside the file itself. */
export interface RecognitionContext {
  /** IANA zone of the room, for times that do not state theirs. */
  readonly zone: string;
  /** True where the sample is only the start of the file. */
  readonly truncated: boolean;
  /** Now, in milliseconds since 1970; a date after it speaks against an order of day and month. */
  readonly referenceMs?: number;
}

/** What was recognised, with what it rests on and what is left to ask. */
export interface RecognisedLoggerFile {
  readonly shape: LoggerFileShape;
  /** Series seen in the sample, in the order in which they appear. */
  readonly series: readonly LoggerSeries[];
  readonly evidence: readonly RecognitionEvidence[];
  readonly questions: readonly RecognitionQuestion[];
}

/** Bytes of a file that recognition wants to see. */
export const SAMPLE_BYTES = 262_144;

/**
 * Recognises a logger file by its content alone.
 *
 * @param sample - First bytes of the file, up to {@link SAMPLE_BYTES}.
 * @returns A complete shape that can be read at once; questions name what the person should confirm first.
 * @throws {@link LoggerFileError} where the file cannot be brought in, with the place.
 */
export function recogniseLoggerFile(sample: Uint8Array, context: RecognitionContext): RecognisedLoggerFile {
  refuseOtherFiles(sample);
  const { encoding, text, reason: encodingReason } = recogniseEncoding(sample, context.truncated);
  refuseMarkup(text);
  const table = recogniseTable(text, context.truncated);
  const header = recogniseHeader(table);
  const marks = recogniseNumberMarks(numberCells(table));
  const parseNumber = createNumberParser(marks);
  const time = recogniseTime(table, header.cells, {
    zone: context.zone,
    parseNumber,
    referenceMs: context.referenceMs ?? null,
  });
  const { columns, layout, quantityNames } = recogniseColumns({ table, header, time, parseNumber });
  const shape: LoggerFileShape = {
    encoding,
    delimiter: table.delimiter,
    quote: table.quote,
    lineEnd: lineEndOf(text),
    headerLines: header.lines,
    firstDataLine: table.rows[0]?.line ?? 1,
    ...marks,
    columns,
    rowNumberOffset: header.rowNumberOffset,
    layout,
    timeFormat: time.format,
    order: time.order,
    missingMarks: usualMissingMarks,
    quantityNames,
  };
  refuseWithoutValues(shape);
  return {
    shape,
    series: seriesOf(shape, table),
    evidence: [
      { subject: 'encoding', message: encodingReason },
      { subject: 'delimiter', message: `Cells are separated by ${delimiterWords[table.delimiter]}.` },
      { subject: 'header', message: header.reason },
      { subject: 'numbers', message: `Decimals follow a ${marks.decimalMark === ',' ? 'comma' : 'point'}.` },
      { subject: 'time', message: time.reason },
      {
        subject: 'layout',
        message: layout === 'wide' ? 'Each quantity has a column.' : 'Each row holds one reading.',
      },
    ],
    questions: [...time.questions, ...headerQuestions(shape), ...questionUnits(shape, table, parseNumber)],
  };
}

const delimiterWords: Readonly<Record<LoggerFileShape['delimiter'], string>> = {
  ',': 'commas',
  ';': 'semicolons',
  '\t': 'tabs',
  '|': 'vertical bars',
  spaces: 'spaces',
};

function numberCells({ rows, kinds }: SampleTable): string[] {
  const columns = kinds.flatMap((kind, index) => (kind === 'number' ? [index] : []));
  return rows.flatMap(({ cells }) =>
    columns.map((index) => cells[index] ?? '').map((cell) => splitMeasured(cell)?.number ?? cell),
  );
}

function lineEndOf(text: string): LoggerFileShape['lineEnd'] {
  const end = /\r\n|\n|\r/.exec(text)?.[0];
  if (end === '\r\n') return 'CRLF';
  return end === '\r' ? 'CR' : 'LF';
}

function refuseWithoutValues({ columns, layout, firstDataLine }: LoggerFileShape): void {
  const isUsable = layout === 'long' || columns.some(({ role }) => role === 'quantity');
  if (isUsable) return;
  const message =
    'No column holds a quantity that is kept here: temperature, humidity, light, or what follows from them.';
  throw new LoggerFileError('NO_VALUES', message, firstDataLine, 1);
}

function headerQuestions({ columns }: LoggerFileShape): RecognitionQuestion[] {
  const unnamed = columns.filter(({ role, quantity }) => role === 'quantity' && quantity === null);
  const [first] = unnamed;
  if (first === undefined) return [];
  return [
    {
      code: 'NO_HEADER_NAMES',
      column: first.index,
      message: 'The file does not name its columns. What do they measure?',
      evidence: { columns: unnamed.map(({ index }) => index + 1).join(', ') },
    },
  ];
}

function seriesOf(shape: LoggerFileShape, table: SampleTable): LoggerSeries[] {
  const columns = seriesColumnsOf(shape);
  const oneOfEach = new Map(table.rows.map(({ cells }) => [rowIdentity(columns, cells), cells]));
  const series = new Map<string, LoggerSeries>();
  for (const cells of oneOfEach.values()) {
    for (const found of seriesInRow(shape, cells)) {
      if (!series.has(found.key)) series.set(found.key, { ...found, index: series.size });
    }
  }
  return [...series.values()];
}
