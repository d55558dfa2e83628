import type { RequestHandler } from 'express';
import helmet from 'helmet';

/**
 * Headers that keep a page to itself: nothing from elsewhere, no inline script, no frame around it.
 *
 * @param isHttps - Whether pages travel over HTTPS.
 * @returns The middleware.
 */
export function securityHeaders(isHttps: boolean): RequestHandler {
  return helmet({
    contentSecurityPolicy: {
      directives: {
        'default-src': ["'self'"],
        'script-src': ["'self'"],
        // Angular writes its components' styles into the page.
        'style-src': ["'self'", "'unsafe-inline'"],
        'img-src': ["'self'", 'data:', 'blob:'],
        'font-src': ["'self'"],
        'connect-src': ["'self'"],
        'object-src': ["'none'"],
        'base-uri': ["'self'"],
        'form-action': ["'self'"],
        'frame-ancestors': ["'none'"],
        'upgrade-insecure-requests': isHttps ? [] : null,
      },
    },
    strictTransportSecurity: isHttps ? { maxAge: 31_536_000 } : false,
    referrerPolicy: { policy: 'same-origin' },
  });
}
