import { existsSync, readdirSync } from 'node:fs';
import { join } from 'node:path';
import express, { type Express, type RequestHandler } from 'express';

const YEAR_MS = 365 * 86_400_000;
const hashedName = /-[A-Z0-9]{8}\.(js|css|woff2)(\.br)?$/;
const mediaTypes: Readonly<Record<string, string>> = {
  js: 'text/javascript; charset=utf-8',
  css: 'text/css; charset=utf-8',
};

/**
 * Serves the Angular application: files with a hash in their name for good, everything else checked each time, and every
 * other address outside the API its first page.
 *
 * @param app - Express, after the API.
 * @param folder - Where the built application is.
 */
export function serveWebClient(app: Express, folder: string): void {
  const index = join(folder, 'index.html');
  if (!existsSync(index)) return; // An API without pages, as in tests of the API.
  app.use(precompressed(folder));
  app.use(
    express.static(folder, {
      index: false,
      setHeaders: (res, path) => {
        res.setHeader(
          'Cache-Control',
          hashedName.test(path) ? `public, max-age=${YEAR_MS / 1000}, immutable` : 'no-cache',
        );
      },
    }),
  );
  app.get('/{*any}', (req, res, next) => {
    if (req.path.startsWith('/api/') || /\.\w+$/.test(req.path)) {
      next();
      return;
    }
    res.setHeader('Cache-Control', 'no-cache');
    res.sendFile(index);
  });
}

/** Leads to the Brotli copy that the build made of a script or style, for browsers that read it. */
function precompressed(folder: string): RequestHandler {
  const copies = new Set(readdirSync(folder).filter((name) => name.endsWith('.br')));
  return (req, res, next) => {
    const name = req.path.slice(1);
    const mediaType = mediaTypes[name.split('.').at(-1) ?? ''];
    if (mediaType !== undefined && copies.has(`${name}.br`) && req.acceptsEncodings('br') === 'br') {
      res.setHeader('Content-Type', mediaType);
      res.setHeader('Content-Encoding', 'br');
      res.vary('Accept-Encoding');
      req.url = `/${name}.br`;
    }
    next();
  };
}
