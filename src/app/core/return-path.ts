/** Where a person goes who didn't ask for a page. */
export const homePath = '/room';

/**
 * The page to go on to after signing in.
 *
 * @param asked - From the address, so anybody may have written it.
 * @returns `asked` when it is a path inside this application, else {@link homePath}. Never another site's address.
 */
export function returnPath(asked: string | null | undefined): string {
  if (asked === null || asked === undefined || !asked.startsWith('/')) return homePath;
  // Resolved as a browser would: "//elsewhere", "/\elsewhere" and tabs in between all lead to another host.
  const here = 'http://here.invalid';
  const resolved = URL.canParse(asked, here) ? new URL(asked, here) : null;
  if (resolved === null || resolved.origin !== here) return homePath;
  const path = resolved.pathname + resolved.search + resolved.hash;
  return path.startsWith('//') || path.startsWith('/sign-in') ? homePath : path;
}
