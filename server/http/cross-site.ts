import { timingSafeEqual } from 'node:crypto';
import type { Request } from 'express';
import { RequestProblem } from './request-problem';

const safeMethods = new Set(['GET', 'HEAD', 'OPTIONS']);

function sameText(a: string, b: string): boolean {
  const left = Buffer.from(a);
  const right = Buffer.from(b);
  return left.length === right.length && timingSafeEqual(left, right);
}

/**
 * Refuses writes that another site made the browser send. Two locks: the browser's own word on where the request comes
 * from, which also guards signing in, and the session's token in a header that only our pages can know.
 *
 * @param req - A request that rests on the session cookie.
 * @throws {@link RequestProblem} 403 `CROSS_SITE`.
 */
export function refuseCrossSite(req: Request): void {
  if (safeMethods.has(req.method)) return;
  const site = req.headers['sec-fetch-site'];
  const isForeign = site !== undefined && site !== 'same-origin' && site !== 'none';
  const origin = req.headers.origin;
  const isOtherOrigin = origin !== undefined && hostOf(origin) !== req.headers.host;
  const token = req.session.csrfToken;
  const hasToken =
    req.user === undefined || (token !== undefined && sameText(req.get('X-CSRF-Token') ?? '', token));
  if (isForeign || isOtherOrigin || !hasToken) {
    throw new RequestProblem(
      403,
      'CROSS_SITE',
      'This did not come from a page of ours, or the page is out of date. Reload it and try again; nothing was changed.',
    );
  }
}

function hostOf(origin: string): string | null {
  try {
    return new URL(origin).host;
  } catch {
    return null; // "null" and other opaque origins are no host of ours.
  }
}
