/** The bundled server as the desktop extension starts it: a process over IPC, the study on a thread from its own bundle. */
import { type ChildProcess, fork } from 'node:child_process';
import { existsSync, readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { afterEach, beforeAll, expect, it } from 'vitest';
import { createMessageConnection, IPCMessageReader, IPCMessageWriter, type MessageConnection } from 'vscode-jsonrpc/node';
import type { PublishDiagnosticsParams } from 'vscode-languageserver-protocol';

const dist = fileURLToPath(new URL('../../packages/vscode/dist', import.meta.url));
const text = readFileSync(new URL('../../samples/05-two-pump.oilway', import.meta.url), 'utf8');
const uri = 'file:///two-pump.oilway';

let server: ChildProcess;
let connection: MessageConnection;

beforeAll(async () => {
  if (existsSync(`${dist}/node/server.cjs`)) return;
  const builder = await import(new URL('../../packages/vscode/scripts/build.mjs', import.meta.url).href);
  await builder.buildExtension();
});

afterEach(() => {
  connection.dispose();
  server.kill();
});

async function start(): Promise<void> {
  server = fork(`${dist}/node/server.cjs`, ['--node-ipc', `--clientProcessId=${process.pid}`], { stdio: 'inherit', execArgv: [] });
  connection = createMessageConnection(new IPCMessageReader(server), new IPCMessageWriter(server));
  connection.onRequest('client/registerCapability', () => null);
  connection.onRequest('workspace/configuration', ({ items }: { items: unknown[] }) => items.map(() => null));
  connection.listen();
  await connection.sendRequest('initialize', { processId: process.pid, rootUri: null, capabilities: {} });
  await connection.sendNotification('initialized', {});
}

const published = (wanted: (codes: readonly unknown[]) => boolean): Promise<readonly unknown[]> =>
  new Promise((done) => {
    connection.onNotification('textDocument/publishDiagnostics', (params: PublishDiagnosticsParams) => {
      const codes = params.diagnostics.map((one) => one.code);
      if (params.uri === uri && wanted(codes)) done(codes);
    });
  });

const open = (content: string): Promise<void> =>
  connection.sendNotification('textDocument/didOpen', { textDocument: { uri, languageId: 'oilway', version: 1, text: content } });

it('computes a sound circuit without a finding, and hovers figures', async () => {
  await start();
  const studied = new Promise<{ version: number }>((done) => {
    connection.onNotification('oilway/studied', done);
  });
  await open(text);
  expect((await studied).version).toBe(1);
  const lines = text.split('\n');
  const line = lines.findIndex((one) => one.startsWith('cylinder'));
  const character = lines[line]!.indexOf('C1');
  const hover = await connection.sendRequest<{ contents: { value: string } }>('textDocument/hover', {
    textDocument: { uri },
    position: { line, character },
  });
  expect(hover.contents.value).toMatch(/mm\/s/);
});

it('finds the missing check, and ends when it is told to', async () => {
  await start();
  const found = published((codes) => codes.includes('B01'));
  await open(text.replace('low to CV1 to pressure', 'low to pressure'));
  expect(await found).toContain('B01');
  const ended = new Promise<number | null>((done) => {
    server.once('exit', done);
  });
  await connection.sendRequest('shutdown');
  await connection.sendNotification('exit');
  expect(await ended).toBe(0);
});
