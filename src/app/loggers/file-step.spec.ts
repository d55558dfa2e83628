import { fileStep } from './file-step';
import { fileColumn } from './testing/logger-file-builder';

const columns = [fileColumn()];

describe('the step of a file', () => {
  it.each([
    ['uploaded', 'match'],
    ['checking', 'checking'],
    ['checked', 'check'],
    ['bringingIn', 'bringingIn'],
    ['broughtIn', 'done'],
    ['takingOut', 'takingOut'],
    ['takenOut', 'match'],
    ['cancelled', 'match'],
    ['failed', 'match'],
  ] as const)('%s is %s', (status, step) => {
    expect(fileStep({ status, columns }, false)).toBe(step);
  });

  it('goes back to the columns of a checked file, not of one that is being brought in', () => {
    expect(fileStep({ status: 'checked', columns }, true)).toBe('match');
    expect(fileStep({ status: 'bringingIn', columns }, true)).toBe('bringingIn');
  });

  it('has nothing to match where nothing was recognised', () => {
    expect(fileStep({ status: 'failed', columns: [] }, false)).toBe('refused');
  });
});
