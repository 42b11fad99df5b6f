/** Editor and command say the same: the bundled server over stdio against the command's JSON, for every sample, right, faulty and broken. */
import { spawnSync } from 'node:child_process';
import { mkdirSync, mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath, pathToFileURL } from 'node:url';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { bundleServer } from '../language-server/support/bundle.ts';
import { Client, type Published } from '../language-server/support/client.ts';

const ROOT = fileURLToPath(new URL('../..', import.meta.url));
const COMMAND = join(ROOT, 'packages/cli/bin/oilway.mjs');
const SEVERITY = ['', 'error', 'warning', 'information'];

const texts: (readonly [name: string, text: string])[] = [];
for (const folder of ['samples', 'samples/faulty']) {
  for (const name of readdirSync(join(ROOT, folder)).sort()) {
    if (name.endsWith('.oilway')) texts.push([name, readFileSync(join(ROOT, folder, name), 'utf8')]);
  }
}
const [, sound = ''] = texts[0] ?? [];
texts.push(['broken-bracket.oilway', sound.replace('(power', '((power')]);
texts.push(['broken-name.oilway', sound.replace('driven by M1', 'driven by M7')]);
texts.push(['windows.oilway', sound.replace('driven by M1', 'driven by M7').replace(/\n/g, '\r\n')]);

interface Said {
  readonly code: string;
  readonly severity: string;
  readonly from: string;
  readonly to: string;
  readonly what: string;
}
const inOrder = (all: Said[]) => all.sort((a, b) => (JSON.stringify(a) < JSON.stringify(b) ? -1 : 1));

let work = '';
let server = '';
let client: Client;
const command = new Map<string, Said[]>();

beforeAll(async () => {
  work = mkdtempSync(join(tmpdir(), 'oilway-'));
  mkdirSync(join(work, 'all'));
  for (const [name, text] of texts) writeFileSync(join(work, 'all', name), text);
  const { stdout } = spawnSync(process.execPath, [COMMAND, 'check', '--format', 'json', 'all'], {
    cwd: work,
    encoding: 'utf8',
    maxBuffer: 2 ** 26,
  });
  for (const { file, findings } of JSON.parse(stdout).files) {
    const said = findings
      .filter((one: { accepted: string | null }) => one.accepted === null)
      .map(
        (one: Record<string, string | number>): Said => ({
          code: String(one.code),
          severity: String(one.severity),
          from: `${one.line}:${one.column}`,
          to: `${one.endLine}:${one.endColumn}`,
          what: String(one.what),
        }),
      );
    command.set(file.slice(file.lastIndexOf('/') + 1), inOrder(said));
  }
  server = await bundleServer();
  client = await Client.start(join(server, 'server.cjs'));
});
afterAll(async () => {
  await client.stop();
  rmSync(server, { recursive: true, force: true });
  rmSync(work, { recursive: true, force: true });
});

function saidBy({ diagnostics }: Published): Said[] {
  return inOrder(
    diagnostics.map((one) => {
      const message = typeof one.message === 'string' ? one.message : String(one.message);
      const place = (at: { line: number; character: number }) => `${at.line + 1}:${at.character + 1}`;
      return {
        code: String(one.code),
        severity: SEVERITY[one.severity ?? 0] ?? '',
        from: place(one.range.start),
        to: place(one.range.end),
        what: message.split('\n')[0] ?? '',
      };
    }),
  );
}

describe('the same findings in the editor and in the command', () => {
  it.each(texts)('%s', async (name, text) => {
    const expected = command.get(name) ?? [];
    const uri = pathToFileURL(join(work, 'all', name)).href;
    const last = () => client.published.filter((one) => one.uri === uri).at(-1) ?? { uri, diagnostics: [] };
    await client.open(uri, text);
    // The figures come a moment after the text, and their findings with them; what has not come by then never does.
    const settled = () => client.studied.some((one) => one.uri === uri) && JSON.stringify(saidBy(last())) === JSON.stringify(expected);
    for (let waited = 0; !settled() && waited < 20_000; waited += 20) await new Promise((resolve) => setTimeout(resolve, 20));
    expect(client.studied.map((one) => one.uri)).toContain(uri);
    expect(saidBy(last())).toEqual(expected);
  });
  it('there is something to compare', () => {
    expect([...command.values()].flat().length).toBeGreaterThan(25);
  });
});
