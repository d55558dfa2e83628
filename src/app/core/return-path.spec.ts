import { homePath, returnPath } from './return-path';

describe('the page to return to after signing in', () => {
  it.each(['/shelf/a1', '/alerts?open=true', '/account#mails'])('keeps %s', (path) => {
    expect(returnPath(path)).toBe(path);
  });

  it.each([
    null,
    undefined,
    '',
    'alerts',
    'https://elsewhere.example',
    '//elsewhere.example',
    '/\\elsewhere.example',
    '/\t/elsewhere.example',
    '/.//elsewhere.example',
    'javascript:alert(1)',
  ])('replaces %j, which leads elsewhere or nowhere', (path) => {
    expect(returnPath(path)).toBe(homePath);
  });

  it('never leads back to signing in', () => {
    expect(returnPath('/sign-in?to=/sign-in')).toBe(homePath);
  });
});
