import { execFileSync, spawn } from 'node:child_process';
import { once } from 'node:events';
import { readFileSync, writeFileSync } from 'node:fs';
import { createServer, type AddressInfo } from 'node:net';
import { join } from 'node:path';

/** nginx in front of the application. */
export interface Proxy {
  readonly httpsPort: number;
  readonly httpPort: number;
  stop(): Promise<void>;
}

const readme = join(__dirname, '../../README.md');

/**
 * The one code block of a language in the README.
 *
 * @param language - As it stands behind the fence.
 * @returns What is in the block.
 */
export function readmeBlock(language: string): string {
  const blocks = [...readFileSync(readme, 'utf8').matchAll(/^```(\w+)\n([^]*?)^```$/gm)];
  const [block, ...others] = blocks.filter(([, name]) => name === language);
  if (block?.[2] === undefined || others.length > 0) throw new Error(`not one block of ${language}`);
  return block[2];
}

/** A port that nobody listens on just now. */
export async function freePort(): Promise<number> {
  const server = createServer().listen(0, '127.0.0.1');
  await once(server, 'listening');
  const { port } = server.address() as AddressInfo;
  server.close();
  await once(server, 'close');
  return port;
}

/**
 * Starts nginx with the README's configuration, on ports, with a certificate and for a name of this machine.
 *
 * @param folder - For its files; made anew for this.
 * @param ports - Where it listens, and where the application does.
 * @returns The proxy, listening.
 */
export async function startProxy(
  folder: string,
  ports: { readonly httpPort: number; readonly httpsPort: number; readonly application: number },
): Promise<Proxy> {
  makeCertificate(folder);
  const site = [
    ['listen 80;', `listen 127.0.0.1:${ports.httpPort};`],
    ['listen 443 ssl http2;', `listen 127.0.0.1:${ports.httpsPort} ssl http2;`],
    ['https://$host$request_uri', `https://$host:${ports.httpsPort}$request_uri`],
    ['http://127.0.0.1:4280', `http://127.0.0.1:${ports.application}`],
    ['/etc/ssl/lampmeadow/', `${folder}/`],
    ['lampmeadow.example.org', '127.0.0.1'],
  ].reduce((text, [from = '', to = '']) => replaced(text, from, to), readmeBlock('nginx'));
  writeFileSync(join(folder, 'nginx.conf'), whole(folder, site));
  const nginx = spawn(process.env['NGINX_PATH'] ?? '/usr/sbin/nginx', [
    ...['-p', folder, '-c', join(folder, 'nginx.conf'), '-e', join(folder, 'error.log')],
  ]);
  const ended = once(nginx, 'close');
  await Promise.race([
    untilAnswered(`http://127.0.0.1:${ports.httpPort}/`),
    ended.then(() => Promise.reject(new Error(readFileSync(join(folder, 'error.log'), 'utf8')))),
  ]);
  return {
    ...ports,
    stop: async () => {
      nginx.kill('SIGTERM');
      await ended;
    },
  };
}

function replaced(text: string, from: string, to: string): string {
  if (!text.includes(from)) throw new Error(`the README's configuration has no ${from}`);
  return text.replaceAll(from, to);
}

/** What Debian's own nginx.conf has around a site, as far as it matters, with every file in the folder. */
function whole(folder: string, site: string): string {
  const temporary = ['client_body', 'proxy', 'fastcgi', 'uwsgi', 'scgi'];
  return `
    daemon off;
    worker_processes 1;
    ${process.getuid?.() === 0 ? 'user root;' : ''}
    pid ${folder}/nginx.pid;
    events {}
    http {
      access_log off;
      ${temporary.map((name) => `${name}_temp_path ${folder}/${name};`).join('\n')}
      ${site}
    }`;
}

function makeCertificate(folder: string): void {
  execFileSync(
    'openssl',
    [
      ...['req', '-x509', '-newkey', 'rsa:2048', '-nodes', '-days', '1', '-subj', '/CN=127.0.0.1'],
      ...['-keyout', join(folder, 'privkey.pem'), '-out', join(folder, 'fullchain.pem')],
    ],
    { stdio: 'ignore' },
  );
}

async function untilAnswered(url: string): Promise<void> {
  for (;;) {
    try {
      await fetch(url, { redirect: 'manual' });
      return;
    } catch {
      await new Promise((resolve) => setTimeout(resolve, 50));
    }
  }
}
