import { ApiFailure } from './api-failure';
import { failureText } from './failure-text';

const problem = { type: 'about:blank', title: 'Not saved', status: 422, code: 'INVALID' };

describe('the text of a failure', () => {
  it('without a connection says that nothing was lost', () => {
    expect(failureText(new ApiFailure('offline'))).toContain('Nothing was lost');
  });

  it.each([
    [null, 'a few minutes'],
    [1, '1 second'],
    [40, '40 seconds'],
    [60, '1 minute'],
    [61, '2 minutes'],
  ])('after too many tries (wait %s s) says to wait %s', (retryAfterS, wait) => {
    expect(failureText(new ApiFailure('tooMany', { retryAfterS }))).toBe(
      `Too many tries. Wait ${wait}, then try again.`,
    );
  });

  it('of what was sent uses the server’s words, the longer first', () => {
    expect(failureText(new ApiFailure('conflict', { problem }))).toBe('Not saved');
    expect(
      failureText(new ApiFailure('invalid', { problem: { ...problem, detail: 'The label is taken.' } })),
    ).toBe('The label is taken.');
    expect(failureText(new ApiFailure('invalid'))).toContain('Check what you entered');
  });

  it('of anything else that was thrown is the server’s fault', () => {
    expect(failureText(new TypeError('x'))).toContain('Nothing was changed');
  });
});
