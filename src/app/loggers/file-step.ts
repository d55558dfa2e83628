import type { LoggerFileDetail } from '@shared/contracts/logger-files';

/** What a file's page shows. */
export type FileStep = 'refused' | 'match' | 'checking' | 'check' | 'bringingIn' | 'done' | 'takingOut';

/**
 * Which step a file stands at.
 *
 * @param isMatchingAgain - Whether the person went back from the check to the columns.
 */
export function fileStep(
  { status, columns }: Pick<LoggerFileDetail, 'status' | 'columns'>,
  isMatchingAgain: boolean,
): FileStep {
  switch (status) {
    case 'checking':
      return 'checking';
    case 'checked':
      return isMatchingAgain ? 'match' : 'check';
    case 'bringingIn':
      return 'bringingIn';
    case 'broughtIn':
      return 'done';
    case 'takingOut':
      return 'takingOut';
    case 'takenOut':
    case 'uploaded':
    case 'cancelled':
    case 'failed':
      // Without columns nothing was recognised, so there is nothing to match.
      return columns.length === 0 ? 'refused' : 'match';
  }
}
