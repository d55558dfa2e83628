import type { FileQuestion, FileSeries, LoggerFile, LoggerFileDetail } from '@shared/contracts/logger-files';
import type {
  LoggerFileShape,
  LoggerSeries,
  RecognitionQuestion,
} from '@shared/logger-files/logger-file-shape';
import { proposeMatches, type MatchableSensor } from '@shared/logger-files/propose-matches';
import { quantityRules } from '@shared/logger-files/quantities';
import { unitsOf } from '@shared/logger-files/units';
import { previewOf } from './file-preview';
import type { LoggerFileEntity } from './logger-file-entity';
import type { LoggerFileProfileEntity } from './logger-file-profile-entity';
import { fileProfileOf } from './profile-store';

/** What a file's page shows. */
export interface DetailParts {
  readonly listed: LoggerFile;
  readonly file: LoggerFileEntity;
  readonly head: Buffer;
  readonly series: readonly LoggerSeries[];
  readonly questions: readonly RecognitionQuestion[];
  readonly sensors: readonly MatchableSensor[];
  readonly profiles: readonly LoggerFileProfileEntity[];
  /** The present [ms]. */
  readonly now: number;
}

/** Proposals that are worth showing. */
const MOST_PROPOSALS = 20;

/**
 * A file with how it is read, for its page.
 *
 * @param parts - All that is known of it.
 */
export function fileDetail(parts: DetailParts): LoggerFileDetail {
  const { listed, file, head, series, questions, sensors, profiles, now } = parts;
  const { shape } = file;
  return {
    ...listed,
    encoding: shape.encoding,
    delimiter: shape.delimiter,
    headerLine: shape.headerLines[0] ?? null,
    decimalMark: shape.decimalMark,
    timeFormat: shape.timeFormat.kind,
    zone: shape.timeFormat.zone,
    startsAt: file.startsAt?.toISOString() ?? null,
    columns: shape.columns.map(({ index, name, role, quantity, unit, reason }) => ({
      index,
      name,
      role,
      quantity,
      unit,
      reason,
    })),
    series: seriesDetail(file, series, sensors),
    profileId: file.profileId,
    profiles: profiles.map(fileProfileOf),
    questions: questions.map((question) => questionDetail(question, file)),
    preview: previewOf(file, head, now),
  };
}

function seriesDetail(
  { matches, name: fileName }: LoggerFileEntity,
  series: readonly LoggerSeries[],
  sensors: readonly MatchableSensor[],
): FileSeries[] {
  const proposed = proposeMatches(series, sensors, fileName);
  return series.map(({ key, column, sensorName, name, quantity, unit }, index) => {
    const match = matches[key];
    return {
      key,
      column,
      sensorName,
      name,
      quantity,
      unit,
      units: unitsOf(quantity),
      isCompared: quantityRules[quantity].isCompared,
      proposals: (proposed[index]?.proposals ?? [])
        .slice(0, MOST_PROPOSALS)
        .map(({ sensorId, reason }) => ({ sensorId, reason })),
      sensorId: match !== undefined && 'sensorId' in match ? match.sensorId : null,
      newSensor: match !== undefined && 'newSensor' in match ? match.newSensor : null,
    };
  });
}

function questionDetail(question: RecognitionQuestion, { shape, startsAt }: LoggerFileEntity): FileQuestion {
  const { code, column, message: text } = question;
  const asked = { code, column, text };
  switch (code) {
    case 'AMBIGUOUS_DAY_MONTH':
      return {
        ...asked,
        options: [
          { value: 'dayFirst', label: 'Day first' },
          { value: 'monthFirst', label: 'Month first' },
        ],
        answer: shape.timeFormat.kind,
      };
    case 'UNIT_QUESTIONED': {
      const { quantity, unit } = meaningIn(shape, question);
      const options = quantity === null ? [] : unitsOf(quantity).map((value) => ({ value, label: value }));
      return { ...asked, options, answer: unit };
    }
    case 'ELAPSED_NEEDS_START':
      return { ...asked, options: [], answer: startsAt?.toISOString() ?? null };
    case 'NO_HEADER_NAMES':
      return { ...asked, options: [], answer: null };
  }
}

function meaningIn(
  shape: LoggerFileShape,
  { column, evidence }: RecognitionQuestion,
): Pick<LoggerFileShape['columns'][number], 'quantity' | 'unit'> {
  const none = { quantity: null, unit: null };
  if (shape.layout === 'long') return shape.quantityNames[String(evidence['name'])] ?? none;
  return shape.columns[column] ?? none;
}
