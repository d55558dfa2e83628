import { storedUnit } from '@shared/climate/quantity';
import type { FileSeries, LoggerFileDetail } from '@shared/contracts/logger-files';
import { formatNumber } from '@shared/format/numbers';
import { quantityDecimals } from '@shared/format/quantities';

/** One cell of the preview. */
export interface PreviewCell {
  readonly text: string;
  /** What would be stored, where it is not what stands there; null otherwise. */
  readonly converted: string | null;
  /** Why the cell can't be used; null when it can. */
  readonly problem: string | null;
}

/** One line of the preview. */
export interface PreviewLine {
  readonly line: number;
  readonly cells: readonly PreviewCell[];
  readonly hasProblem: boolean;
  /** A problem of the line as a whole; null without one. */
  readonly problem: string | null;
  /** Lines between the one before and this are not shown. */
  readonly isAfterGap: boolean;
}

/** The preview as it is shown: values converted, problems in their place. */
export function previewLines({
  preview,
  columns,
  series,
}: Pick<LoggerFileDetail, 'preview' | 'columns' | 'series'>): readonly PreviewLine[] {
  return preview.map(({ line, cells, values, problem }, index) => {
    const before = preview[index - 1];
    return {
      line,
      hasProblem: problem !== null,
      problem: problem !== null && problem.column === null ? problem.message : null,
      isAfterGap: before !== undefined && line > before.line + 1,
      cells: columns.map((column) => ({
        text: cells[column.index] ?? '',
        converted: convertedText(
          series.find((one) => one.column === column.index),
          values[String(column.index)] ?? null,
        ),
        // Places in a file are told as a person counts them, from 1.
        problem: problem?.column === column.index + 1 ? problem.message : null,
      })),
    };
  });
}

function convertedText(series: FileSeries | undefined, value: number | null): string | null {
  if (value === null || series === undefined || series.unit === storedUnit[series.quantity]) return null;
  // A digit more than is shown elsewhere: a person checks the conversion here.
  return formatNumber(value, quantityDecimals[series.quantity] + 1);
}
