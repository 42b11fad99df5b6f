/** The rig's server: real writes to its folder and nowhere else, and who is turned away. */
import { mkdirSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { type IncomingMessage, request } from 'node:http';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { type Rig, startRig } from '../support/rig/server.ts';

let base = '';
let rig: Rig;

beforeEach(async () => {
  base = mkdtempSync(join(tmpdir(), 'oilway-rig-'));
  for (const name of ['build', 'extension', 'workspace']) mkdirSync(join(base, name));
  writeFileSync(join(base, 'secret.txt'), 'secret');
  writeFileSync(join(base, 'build', 'a.js'), 'built');
  writeFileSync(join(base, 'workspace', 'a.oilway'), 'circuit A');
  rig = await startRig({ build: join(base, 'build'), extension: join(base, 'extension'), workspace: join(base, 'workspace') });
});

afterEach(async () => {
  await rig.close();
  rmSync(base, { recursive: true, force: true });
});

interface Answer {
  readonly status: number;
  readonly text: string;
  readonly cookie: string;
  readonly type: string;
  /** Origin whose pages may read the answer. */
  readonly allowed: string;
}

/** Like a browser that resolves the rig's name: the connection goes to 127.0.0.1, the Host header says the name. */
function ask(
  path: string,
  options: { method?: string; host?: string; headers?: Record<string, string>; body?: string } = {},
): Promise<Answer> {
  return new Promise((done, fail) => {
    const headers = { host: options.host ?? rig.host, ...options.headers };
    const sent = request(
      { host: '127.0.0.1', port: rig.port, path, method: options.method ?? 'GET', headers },
      (answer: IncomingMessage) => {
        let text = '';
        answer.setEncoding('utf8');
        answer.on('data', (part: string) => {
          text += part;
        });
        const cookie = (answer.headers['set-cookie']?.[0] ?? '').split(';')[0] ?? '';
        answer.on('end', () =>
          done({
            status: answer.statusCode ?? 0,
            text,
            cookie,
            type: answer.headers['content-type'] ?? '',
            allowed: answer.headers['access-control-allow-origin'] ?? '',
          }),
        );
      },
    );
    sent.on('error', fail);
    sent.end(options.body);
  });
}

const signIn = async (): Promise<string> => (await ask(new URL(rig.address).pathname + new URL(rig.address).search)).cookie;
const writing = (cookie: string): Record<string, string> => ({ cookie, origin: `http://${rig.host}`, 'x-oilway-rig': '1' });

describe('who is let in', () => {
  it('answers the health check on the bare loopback address, and nothing else there', async () => {
    expect((await ask('/health', { host: `127.0.0.1:${rig.port}` })).status).toBe(200);
    expect((await ask('/build/a.js', { host: `127.0.0.1:${rig.port}` })).status).toBe(421);
  });

  it('refuses a foreign Host: a name that was rebound to this machine', async () => {
    expect((await ask('/build/a.js', { host: `example.org:${rig.port}` })).status).toBe(421);
    expect((await ask('/build/a.js', { host: 'rig.localhost:1' })).status).toBe(421);
  });

  it('hands the page out for the cookie only, and the cookie for the token only', async () => {
    expect((await ask('/')).status).toBe(401);
    expect((await ask('/?token=wrong')).status).toBe(401);
    const cookie = await signIn();
    expect(cookie).toMatch(/^oilway-rig=[0-9a-f]{48}$/);
    const page = await ask('/', { headers: { cookie } });
    expect(page.status).toBe(200);
    expect(page.text).toContain('enableTelemetry&quot;:false');
    expect((await ask('/', { headers: { cookie: `${cookie}0` } })).status).toBe(401);
  });

  it('gives webviews the build and nothing else', async () => {
    const cookie = await signIn();
    const host = `abc123.${rig.host}`;
    expect((await ask('/build/a.js', { host })).text).toBe('built');
    expect((await ask('/', { host, headers: { cookie } })).status).toBe(403);
    expect((await ask('/disk/read?path=/circuits/a.oilway', { host, headers: { cookie } })).status).toBe(403);
  });

  it('lets scripts of the build into its webviews, and into no other page', async () => {
    const from = async (origin: string): Promise<string> => (await ask('/build/a.js', { headers: { origin } })).allowed;
    expect(await from(`http://abc123.${rig.host}`)).toBe(`http://abc123.${rig.host}`);
    expect(await from('http://example.org')).toBe('');
    expect(await from(`http://abc.rig.localhost.example.org:${rig.port}`)).toBe('');
  });

  it('refuses an address that is none', async () => {
    expect((await ask('/build/%')).status).toBe(400);
  });

  it.each(['/build/../secret.txt', '/build/%2e%2e/secret.txt', '/ext/..%2f..%2fsecret.txt', '/build/..'])(
    'refuses to leave its folders: %s',
    async (path) => {
      expect((await ask(path)).status).toBe(403);
    },
  );
});

describe('the disk', () => {
  it('reads, lists and writes real files', async () => {
    const cookie = await signIn();
    expect((await ask('/disk/read?path=/circuits/a.oilway', { headers: { cookie } })).text).toBe('circuit A');
    expect(JSON.parse((await ask('/disk/dir?path=/circuits', { headers: { cookie } })).text)).toEqual([['a.oilway', 1]]);
    expect(JSON.parse((await ask('/disk/stat?path=/circuits/a.oilway', { headers: { cookie } })).text)).toMatchObject({ type: 1, size: 9 });
    const put = await ask('/disk/write?path=/circuits/a.oilway', { method: 'PUT', headers: writing(cookie), body: 'circuit B' });
    expect(put.status).toBe(200);
    expect(readFileSync(join(base, 'workspace', 'a.oilway'), 'utf8')).toBe('circuit B');
  });

  it('makes, renames and deletes', async () => {
    const cookie = await signIn();
    const headers = writing(cookie);
    expect((await ask('/disk/mkdir?path=/circuits/b', { method: 'POST', headers })).status).toBe(200);
    expect((await ask('/disk/rename?path=/circuits/a.oilway&to=/circuits/b/c.oilway', { method: 'POST', headers })).status).toBe(200);
    expect(readFileSync(join(base, 'workspace', 'b', 'c.oilway'), 'utf8')).toBe('circuit A');
    expect((await ask('/disk/delete?path=/circuits/b', { method: 'DELETE', headers })).status).toBe(200);
    expect((await ask('/disk/stat?path=/circuits/b', { headers: { cookie } })).status).toBe(404);
  });

  it('refuses to read without the cookie, and to write without our Origin and header', async () => {
    expect((await ask('/disk/read?path=/circuits/a.oilway')).status).toBe(401);
    const cookie = await signIn();
    const put = (headers: Record<string, string>): Promise<Answer> =>
      ask('/disk/write?path=/circuits/a.oilway', { method: 'PUT', headers, body: 'x' });
    expect((await put({ cookie })).status).toBe(403);
    expect((await put({ cookie, origin: 'http://example.org', 'x-oilway-rig': '1' })).status).toBe(403);
    expect((await put({ cookie, origin: `http://${rig.host}` })).status).toBe(403);
    expect(readFileSync(join(base, 'workspace', 'a.oilway'), 'utf8')).toBe('circuit A');
  });

  it('refuses paths outside the workspace, also as the target of a rename', async () => {
    const cookie = await signIn();
    expect((await ask('/disk/read?path=/circuits/../secret.txt', { headers: { cookie } })).status).toBe(403);
    expect((await ask('/disk/read?path=/secret.txt', { headers: { cookie } })).status).toBe(404);
    const out = await ask('/disk/rename?path=/circuits/a.oilway&to=/circuits/../b', { method: 'POST', headers: writing(cookie) });
    expect(out.status).toBe(403);
  });
});
