/** The rig's server: the editor's web build, the built extension, and a workspace folder, on the loopback address. */
import { createReadStream } from 'node:fs';
import { stat } from 'node:fs/promises';
import { createServer, type IncomingMessage, type ServerResponse } from 'node:http';
import type { AddressInfo } from 'node:net';
import { extname, join, relative, resolve } from 'node:path';
import { fileURLToPath } from 'node:url';
import { Disk } from './disk.ts';
import { cookieHeader, hasCookie, hostOf, LABEL, newToken, sameToken, webviewOrigin } from './guard.ts';
import { page } from './page.ts';

export interface RigOptions {
  /** Directory of the editor's web build. */
  readonly build: string;
  /** Directory of the extension (its `dist/` is built). */
  readonly extension: string;
  /** Folder the editor works in; its files are really written. */
  readonly workspace: string;
  /** Workspace path opened at start, `/a.oilway`. */
  readonly open?: string;
  readonly settings?: Readonly<Record<string, unknown>>;
  /** 0 or absent: any free one. */
  readonly port?: number;
}

export interface Rig {
  /** Open this in a browser: it hands out the cookie and goes on to the workbench. */
  readonly address: string;
  readonly host: string;
  readonly port: number;
  close(): Promise<void>;
}

const TYPES: Readonly<Record<string, string>> = {
  '.html': 'text/html; charset=utf-8',
  '.js': 'text/javascript; charset=utf-8',
  '.mjs': 'text/javascript; charset=utf-8',
  '.css': 'text/css; charset=utf-8',
  '.json': 'application/json; charset=utf-8',
  '.svg': 'image/svg+xml',
  '.png': 'image/png',
  '.ico': 'image/x-icon',
  '.ttf': 'font/ttf',
  '.woff': 'font/woff',
  '.woff2': 'font/woff2',
  '.wasm': 'application/wasm',
};

const refuse = (response: ServerResponse, status: number, why: string): void => {
  response.writeHead(status, { 'content-type': 'text/plain; charset=utf-8' }).end(why);
};

function decoded(path: string): string | undefined {
  try {
    return decodeURIComponent(path);
  } catch {
    return undefined;
  }
}

/** A file below `base`, or a refusal: 403 outside of it, 404 if there is none. */
async function sendFile(response: ServerResponse, base: string, path: string, fresh: boolean, asker: string | undefined): Promise<void> {
  const file = resolve(join(base, path));
  const inside = relative(base, file);
  if (path.includes('\0') || inside.startsWith('..') || resolve(inside) === inside) return refuse(response, 403, 'outside');
  const found = await stat(file).catch(() => undefined);
  if (!found?.isFile()) return refuse(response, 404, 'no such file');
  response.writeHead(200, {
    'content-type': TYPES[extname(file)] ?? 'application/octet-stream',
    'content-length': found.size,
    'cache-control': fresh ? 'no-store' : 'max-age=3600',
    ...(asker === undefined ? {} : { 'access-control-allow-origin': asker, vary: 'origin' }),
  });
  createReadStream(file).pipe(response);
}

export async function startRig(options: RigOptions): Promise<Rig> {
  const token = newToken();
  let port = options.port ?? 0;
  const disk = new Disk(options.workspace, () => port);
  const own = fileURLToPath(new URL('disk', import.meta.url));
  const folders: readonly (readonly [string, string, boolean])[] = [
    ['/build/', resolve(options.build), false],
    ['/ext/', resolve(options.extension), true],
    ['/disk-ext/', own, true],
  ];

  const handle = async (request: IncomingMessage, response: ServerResponse): Promise<void> => {
    const from = hostOf(request, port);
    if (from === 'foreign') return refuse(response, 421, 'not a name of this server');
    // The raw path, not the one URL has already tidied: `/build/../..` is to be refused, not to be answered as something else.
    const raw = decoded((request.url ?? '/').split(/[?#]/)[0] ?? '/');
    if (raw === undefined) return refuse(response, 400, 'not an address');
    if (raw.split('/').includes('..')) return refuse(response, 403, 'outside');
    const url = new URL(request.url ?? '/', `http://${LABEL}:${port}`);
    if (from === 'loopback') return raw === '/health' ? refuse(response, 200, 'ok') : refuse(response, 421, 'open the address by its name');
    const folder = folders.find(([prefix]) => raw.startsWith(prefix));
    if (folder && request.method === 'GET' && (from === 'workbench' || folder[0] === '/build/')) {
      return await sendFile(response, folder[1], raw.slice(folder[0].length), folder[2], webviewOrigin(request, port));
    }
    if (from === 'webview') return refuse(response, 403, 'webviews get the build only');
    if (raw === '/' && sameToken(url.searchParams.get('token'), token)) {
      response.writeHead(303, { location: '/', 'set-cookie': cookieHeader(token) }).end();
      return;
    }
    if (!hasCookie(request, token)) return refuse(response, 401, 'open the address that was printed at the start, with its token');
    if (raw.startsWith('/disk/')) return await disk.handle(request, response, url);
    if (raw === '/') {
      const text = page({ host: `${LABEL}:${port}`, open: options.open, settings: options.settings ?? {} });
      response.writeHead(200, { 'content-type': 'text/html; charset=utf-8', 'cache-control': 'no-store' }).end(text);
      return;
    }
    return refuse(response, 404, 'nothing here');
  };

  const server = createServer((request, response) => {
    handle(request, response).catch((error: unknown) => {
      if (!response.headersSent) refuse(response, 500, error instanceof Error ? error.message : String(error));
      else response.destroy();
    });
  });
  await new Promise<void>((done, fail) => {
    server.once('error', fail);
    server.listen(port, '127.0.0.1', done);
  });
  port = (server.address() as AddressInfo).port;
  return {
    address: `http://${LABEL}:${port}/?token=${token}`,
    host: `${LABEL}:${port}`,
    port,
    close: () =>
      new Promise((done) => {
        disk.close();
        server.close(() => done());
        server.closeAllConnections();
      }),
  };
}
