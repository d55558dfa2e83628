import { LoggerFileError } from '@shared/logger-files/logger-file-error';
import { badFiles } from './corpus/bad-files';
import type { CorpusFile, ExpectedReading, ExpectedRejection } from './corpus/corpus-file';
import { CORPUS_TODAY } from './corpus/corpus-file';
import { encodingFiles } from './corpus/encodings';
import { layoutAndUnitFiles } from './corpus/layouts-and-units';
import { numberFiles } from './corpus/numbers';
import { tableFiles } from './corpus/tables';
import { clockChangeFiles, timeFiles } from './corpus/times';
import { readWhole, recogniseWhole } from './read-whole-file';

/** Recognises and reads a file with the likelier answer to every question. */
function bringIn(file: CorpusFile, pieceBytes?: number) {
  const { shape, questions } = recogniseWhole(file.bytes, file.zone ?? 'Europe/Berlin', CORPUS_TODAY);
  const startAtMs = file.startAt === undefined ? {} : { startAtMs: Date.parse(file.startAt) };
  const read = readWhole(file.bytes, shape, { referenceMs: CORPUS_TODAY, ...startAtMs }, pieceBytes);
  return {
    readings: read.readings.map(({ series, atMs, value }): ExpectedReading => {
      const reading = [series.quantity, new Date(atMs).toISOString(), value] as const;
      return series.sensorName === '' ? reading : [...reading, series.sensorName];
    }),
    rejected: read.rejected.map(({ code, line, column }): ExpectedRejection => [code, line, column]),
    questions: questions.map(({ code }) => code),
    totals: read.totals,
  };
}

function refusalOf(file: CorpusFile): unknown {
  try {
    bringIn(file);
    return null;
  } catch (error) {
    if (!(error instanceof LoggerFileError)) throw error;
    return { code: error.code, line: error.line, column: error.column };
  }
}

const goodFiles = [
  ...encodingFiles,
  ...tableFiles,
  ...numberFiles,
  ...timeFiles,
  ...clockChangeFiles,
  ...layoutAndUnitFiles,
];

describe('the corpus of logger files', () => {
  it('holds at least 60 files, each with a title of its own', () => {
    const titles = [...goodFiles, ...badFiles].map(({ says }) => says);
    expect(new Set(titles).size).toBe(titles.length);
    expect(titles.length).toBeGreaterThanOrEqual(60);
  });

  it.each(goodFiles)('with $says, reads as expected', (file) => {
    const { readings, rejected, questions, totals } = bringIn(file);
    expect({ readings, rejected, questions }).toEqual({
      readings: file.readings,
      rejected: file.rejected ?? [],
      questions: file.questions ?? [],
    });
    expect(totals.rows + totals.skippedLines).toBeLessThanOrEqual(totals.lines);
    expect(totals).toMatchObject({ readings: readings.length, rejected: rejected.length });
  });

  it.each(goodFiles)('with $says, reads the same a byte at a time', (file) => {
    expect(bringIn(file, 1)).toEqual(bringIn(file));
  });

  it.each(badFiles)('with $says, is refused with the place', (file) => {
    expect(refusalOf(file)).toEqual(file.error);
  });
});
