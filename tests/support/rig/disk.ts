/** The workspace on the real disk, behind the rig: stat, list, read, write, make, rename, delete, and what changed. */
import { type FSWatcher, watch } from 'node:fs';
import { mkdir, readdir, readFile, rename, rm, stat, writeFile } from 'node:fs/promises';
import type { IncomingMessage, ServerResponse } from 'node:http';
import { join, relative, resolve, sep } from 'node:path';
import { mayWrite } from './guard.ts';
import { FOLDER } from './page.ts';

/** A request the disk refuses; the status tells the editor why. */
class Refused extends Error {
  readonly status: number;
  constructor(status: number, message: string) {
    super(message);
    this.status = status;
  }
}

const CODES: Readonly<Record<string, number>> = {
  ENOENT: 404,
  ENOTDIR: 404,
  EEXIST: 409,
  EISDIR: 409,
  ENOTEMPTY: 409,
  EACCES: 403,
  EPERM: 403,
};

async function body(request: IncomingMessage): Promise<Buffer> {
  const parts: Buffer[] = [];
  for await (const part of request) parts.push(part as Buffer);
  return Buffer.concat(parts);
}

export class Disk {
  private readonly root: string;
  private readonly port: () => number;
  private readonly listeners = new Set<ServerResponse>();
  private readonly watcher: FSWatcher;

  constructor(root: string, port: () => number) {
    this.root = resolve(root);
    this.port = port;
    this.watcher = watch(this.root, { recursive: true }, (_kind, name) => {
      if (name === null) return;
      const path = `${FOLDER}/${name.split(sep).join('/')}`;
      for (const listener of this.listeners) listener.write(`data: ${JSON.stringify(path)}\n\n`);
    });
    // A folder that can no longer be watched costs the news of outside changes; reading and writing go on.
    this.watcher.on('error', () => this.watcher.close());
  }

  /** The file a workspace path names; never one outside the workspace. */
  private place(path: string | null): string {
    if (path === null || !path.startsWith('/') || path.includes('\0')) throw new Refused(400, 'a path begins with /');
    if (path !== FOLDER && !path.startsWith(`${FOLDER}/`)) throw new Refused(404, `everything lies below ${FOLDER}`);
    const place = resolve(join(this.root, path.slice(FOLDER.length)));
    const inside = relative(this.root, place);
    if (inside.startsWith('..') || resolve(inside) === inside) throw new Refused(403, 'outside the workspace');
    return place;
  }

  private async answer(request: IncomingMessage, url: URL): Promise<Buffer | object> {
    const path = this.place(url.searchParams.get('path'));
    const action = url.pathname.slice('/disk/'.length);
    const verb = `${request.method} ${action}`;
    if (request.method !== 'GET' && !mayWrite(request, this.port())) throw new Refused(403, 'writes come from the workbench only');
    switch (verb) {
      case 'GET stat': {
        const s = await stat(path);
        return { type: s.isDirectory() ? 2 : 1, size: s.size, ctime: s.ctimeMs, mtime: s.mtimeMs };
      }
      case 'GET dir':
        return (await readdir(path, { withFileTypes: true })).map((e) => [e.name, e.isDirectory() ? 2 : 1]);
      case 'GET read':
        return await readFile(path);
      case 'PUT write':
        await writeFile(path, await body(request));
        return {};
      case 'POST mkdir':
        await mkdir(path);
        return {};
      case 'POST rename':
        await rename(path, this.place(url.searchParams.get('to')));
        return {};
      case 'DELETE delete':
        await rm(path, { recursive: true });
        return {};
      default:
        throw new Refused(404, `no such action: ${verb}`);
    }
  }

  async handle(request: IncomingMessage, response: ServerResponse, url: URL): Promise<void> {
    if (url.pathname === '/disk/events') {
      response.writeHead(200, { 'content-type': 'text/event-stream', 'cache-control': 'no-store' });
      response.write(': open\n\n');
      this.listeners.add(response);
      response.on('close', () => this.listeners.delete(response));
      return;
    }
    try {
      const answer = await this.answer(request, url);
      const bytes = Buffer.isBuffer(answer);
      response.writeHead(200, { 'content-type': bytes ? 'application/octet-stream' : 'application/json', 'cache-control': 'no-store' });
      response.end(bytes ? answer : JSON.stringify(answer));
    } catch (error) {
      const code = (error as NodeJS.ErrnoException).code ?? '';
      const status = error instanceof Refused ? error.status : CODES[code];
      if (status === undefined) throw error;
      response.writeHead(status, { 'content-type': 'text/plain' }).end((error as Error).message);
    }
  }

  close(): void {
    this.watcher.close();
    for (const listener of this.listeners) listener.end();
  }
}
