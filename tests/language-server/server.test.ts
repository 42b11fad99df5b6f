/** The bundled server, spoken to by a plain client over stdio: what any editor sees. */
import { mkdirSync, mkdtempSync, readFileSync, readdirSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath, pathToFileURL } from 'node:url';
import { afterAll, afterEach, beforeAll, describe, expect, test } from 'vitest';
import type { TextEdit } from 'vscode-languageserver-types';
import { bundleServer } from './support/bundle.ts';
import { Client, type Published } from './support/client.ts';
import { BENCH } from './support/check.ts';

const samples = fileURLToPath(new URL('../../samples', import.meta.url));
const URI = 'file:///circuits/bench.oilway';
let folder = '';
let client: Client;

beforeAll(async () => {
  folder = await bundleServer();
  client = await Client.start(join(folder, 'server.cjs'));
});
afterEach(() => {
  // An error inside the server is a bug even where its answer looks right.
  expect(client.logged.splice(0)).toEqual([]);
});
afterAll(async () => {
  expect(await client.stop()).toBe(0);
  rmSync(folder, { recursive: true, force: true });
});

describe('over stdio', () => {
  test('says what it can do', () => {
    expect(client.capabilities).toMatchObject({
      serverInfo: { name: 'oilway' },
      capabilities: {
        hoverProvider: true,
        renameProvider: { prepareProvider: true },
        inlayHintProvider: true,
        documentFormattingProvider: true,
        completionProvider: {},
      },
    });
  });

  test.each(readdirSync(samples).filter((name) => name.endsWith('.oilway')))('%s opens without an error', async (name) => {
    const uri = `file:///circuits/samples/${name}`;
    const { diagnostics } = await client.open(uri, readFileSync(join(samples, name), 'utf8'));
    expect(diagnostics.filter((one) => one.severity === 1).map((one) => `${one.code}: ${one.message}`)).toEqual([]);
  });

  test('a mistake is said at its characters, and is gone when it is mended', async () => {
    expect((await client.open(URI, BENCH)).diagnostics.filter((one) => one.severity === 1)).toEqual([]);
    const wrong = client.edit(URI, 'driven by M1', 'driven by M7');
    const { diagnostics } = await client.diagnostics(URI, (one) => one.version === wrong);
    const found = diagnostics.find((one) => one.severity === 1);
    expect(found && client.slice(URI, found.range)).toBe('M7');
    expect(found?.message).toContain('M7');
    expect(found?.codeDescription?.href).toBe('oilway-rule:/NAME.md');
    const right = client.edit(URI, 'driven by M7', 'driven by M1');
    expect((await client.diagnostics(URI, (one) => one.version === right)).diagnostics.filter((one) => one.severity === 1)).toEqual([]);
  });

  test('a half-typed line costs its own statement only', async () => {
    const version = client.edit(URI, 'load C1', 'working V1.A to (\nload C1');
    const { diagnostics } = await client.diagnostics(URI, (one) => one.version === version);
    const lines = new Set(diagnostics.filter((one) => one.severity === 1).map((one) => one.range.start.line));
    expect([...lines]).toEqual([client.at(URI, '|working V1.A to (').line]);
    expect((await client.hover(URI, 'cylinder  C|1'))?.contents).toMatchObject({
      value: expect.stringContaining('**C1** cylinder, Slide'),
    });
    const back = client.edit(URI, 'working V1.A to (\n', '');
    await client.diagnostics(URI, (one) => one.version === back);
  });

  test('a burst of keys ends with the findings of the last text', async () => {
    let version = 0;
    for (const digit of ['2', '3', '4', '5'])
      version = client.edit(URI, /stroke \d+/.exec(client.text(URI))?.[0] ?? '', `stroke ${digit}00`);
    expect((await client.diagnostics(URI, (one) => one.version === version)).version).toBe(version);
    const back = client.edit(URI, 'stroke 500', 'stroke 200');
    await client.diagnostics(URI, (one) => one.version === back);
  });

  test('completion, definition, rename', async () => {
    const labels = (await client.completion(URI, 'driven by |M1')).map((one) => one.label);
    expect(labels).toContain('M1');
    const [definition] = await client.definition(URI, 'energise SO|L2');
    expect(definition && client.slice(URI, definition.range)).toBe('SOL2');
    const edit = await client.rename(URI, 'energise SO|L2', 'Y2');
    const renamed = edit ? client.applied(URI, edit) : '';
    expect(renamed).toBe(BENCH.replaceAll('SOL2', 'Y2'));
    await expect(client.rename(URI, 'energise SO|L2', 'pump')).rejects.toThrow('`pump` is a word of the notation and cannot be a name');
  });

  test('a quick fix mends what it says', async () => {
    const version = client.edit(URI, 'set system', 'set sytsem');
    const { diagnostics } = await client.diagnostics(URI, (one) => one.version === version);
    const found = diagnostics.find((one) => client.slice(URI, one.range) === 'sytsem');
    if (!found) throw new Error('the mistake is not found');
    const actions = await client.codeActions(URI, found.range, [found], ['quickfix']);
    const fix = actions.find((one) => one.title.includes('system'));
    expect(fix?.diagnostics).toEqual([found]);
    const mended = fix?.edit ? client.applied(URI, fix.edit) : '';
    expect(mended).toContain('set system');
    const back = client.edit(URI, 'set sytsem', 'set system');
    await client.diagnostics(URI, (one) => one.version === back);
  });

  test('outline, folding, tokens, selection, signature, symbols answer', async () => {
    const symbols = await client.request<{ readonly name: string }[]>('documentSymbol', URI);
    expect(symbols.map((one) => one.name)).toEqual(expect.arrayContaining(['C1', 'Part']));
    const folds = await client.request<{ readonly startLine: number }[]>('foldingRange', URI);
    expect(folds.map((one) => one.startLine)).toEqual([client.at(URI, '|cycle Part').line]);
    const tokens = await client.request<{ readonly data: readonly number[] }>('semanticTokens/full', URI);
    expect(tokens.data.length % 5).toBe(0);
    expect(tokens.data.length).toBeGreaterThan(100);
    const [selection] = await client.request<{ readonly range: never }[]>('selectionRange', URI, {
      positions: [client.at(URI, 'bore 6|3')],
    });
    expect(selection && client.slice(URI, selection.range)).toBe('63');
    const help = await client.request<{ readonly signatures: { readonly label: string }[] }>('signatureHelp', URI, {
      position: client.at(URI, 'bore 63 mm,| rod'),
    });
    expect(help.signatures[0]?.label).toContain('cylinder (bore 63 mm, stroke 320 mm');
    const found = await client.connection.sendRequest<{ readonly name: string }[]>('workspace/symbol', { query: 'sol' });
    expect(found.map((one) => one.name)).toContain('SOL1');
  });

  test('formatting: only lines that change are sent, a range changes only its own', async () => {
    const crooked = client.edit(URI, 'cylinder  C1 (bore', 'cylinder C1   ( bore');
    await client.diagnostics(URI, (one) => one.version === crooked);
    const options = { tabSize: 2, insertSpaces: true };
    const edits = await client.request<TextEdit[]>('formatting', URI, { options });
    expect(edits.map((one) => one.range.start.line)).toContain(client.at(URI, '|cylinder C1').line);
    expect(client.applied(URI, { changes: { [URI]: edits } })).toContain('cylinder  C1 (bore 63 mm');
    const line = client.at(URI, '|throttle').line;
    const elsewhere = await client.request<TextEdit[]>('rangeFormatting', URI, {
      options,
      range: { start: { line, character: 0 }, end: { line, character: 5 } },
    });
    expect(elsewhere.filter((one) => one.range.start.line !== line)).toEqual([]);
    const back = client.edit(URI, 'cylinder C1   ( bore', 'cylinder  C1 (bore');
    await client.diagnostics(URI, (one) => one.version === back);
  });

  describe('figures', () => {
    const uri = 'file:///circuits/figures.oilway';
    const text = readFileSync(join(samples, '04-traverse-feed.oilway'), 'utf8');
    const missed = (one: Published): boolean => one.diagnostics.some((found) => found.code === 'REQUIREMENT');

    test('come in a second wave: requirements, hover, hints', async () => {
      const low = text.replace('set 1.26 L/min', 'set 2.5 L/min');
      const first = await client.open(uri, low);
      expect(missed(first)).toBe(false);
      const { version, diagnostics } = await client.diagnostics(uri, missed, client.published.indexOf(first) + 1);
      expect(version).toBe(1);
      const found = diagnostics.find((one) => one.code === 'REQUIREMENT');
      expect(found?.message).toContain('Requirement missed');
      expect(found && client.slice(uri, found.range)).toContain('require');
      expect((await client.hover(uri, 'cylinder  1A|1'))?.contents).toMatchObject({
        value: expect.stringMatching(/\| Out extending \|.*mm\/s/),
      });
      expect(client.studied.filter((one) => one.uri === uri)).toHaveLength(1);
      expect(client.hintRefreshes).toBeGreaterThan(0);
      expect((await client.hints(uri)).map((one) => String(one.label))).toEqual(
        expect.arrayContaining([expect.stringMatching(/^out .* mm\/s/), expect.stringMatching(/ s, peak .* bar$/)]),
      );
    });

    test('a changed setting changes the computed finding', async () => {
      const since = client.published.length;
      const version = client.edit(uri, 'set 2.5 L/min', 'set 1.26 L/min');
      const { diagnostics } = await client.diagnostics(uri, (one) => one.version === version && !missed(one), since);
      expect(diagnostics.filter((one) => one.severity === 1).map((one) => one.message)).toEqual([]);
    });

    test('views get circuit, study and findings as they are', async () => {
      const reply = await client.connection.sendRequest<{
        readonly version: number;
        readonly older: boolean;
        readonly study: { readonly steps: readonly { readonly id: string }[] } | null;
      }>('oilway/study', { uri });
      expect(reply.version).toBe(2);
      expect(reply.study?.steps.map((one) => one.id)).toEqual(['Bore.Out', 'Bore.Back']);
      expect(await client.connection.sendRequest('oilway/rulePage', { code: 'A01' })).toContain('# A01');
      expect(await client.connection.sendRequest('oilway/rulePage', { code: 'NAME' })).toContain('# NAME');
      expect(await client.connection.sendRequest('oilway/rulePage', { code: 'none' })).toBeNull();
    });

    test('the way of the oil, as a call hierarchy', async () => {
      const items = await client.request<{ readonly name: string }[]>('prepareCallHierarchy', uri, {
        position: client.at(uri, 'cylinder  1A|1'),
      });
      expect(items.map((one) => one.name)).toEqual(['1A1']);
      const calls = await client.connection.sendRequest<{ readonly from: { readonly name: string; readonly detail: string } }[]>(
        'callHierarchy/incomingCalls',
        { item: items[0] },
      );
      expect(calls.map((one) => one.from.name)).toEqual(['1V1', '1V2', '1V3']);
      expect(calls[0]?.from.detail).toMatch(/^Out: up to [\d.]+ L\/min$/);
    });

    test('switched off nothing is computed; on again it is', async () => {
      let since = client.published.length;
      void client.connection.sendNotification('workspace/didChangeConfiguration', {
        settings: { oilway: { compute: { enabled: false } } },
      });
      await client.diagnostics(uri, () => true, since);
      expect((await client.hints(uri)).map((one) => String(one.label))).toEqual(['meters 1A1 extending']);
      since = client.published.length;
      void client.connection.sendNotification('workspace/didChangeConfiguration', { settings: { oilway: { compute: { enabled: true } } } });
      await client.diagnostics(uri, () => true, since);
      expect((await client.hints(uri)).length).toBeGreaterThan(3);
    });
  });

  test('workspace: findings of files that are not open, kept up with the disk', async () => {
    const room = mkdtempSync(join(tmpdir(), 'oilway-'));
    mkdirSync(join(room, 'axes'));
    const file = join(room, 'axes', 'bench.oilway');
    writeFileSync(file, BENCH.replace('driven by M1', 'driven by M7'));
    writeFileSync(join(room, 'notes.txt'), 'no circuit');
    const one = await Client.start(join(folder, 'server.cjs'), {
      folders: [pathToFileURL(room).href],
      initializationOptions: { settings: { findings: { scope: 'workspace' }, compute: { enabled: false } } },
    });
    const uri = pathToFileURL(file).href;
    const errors = (published: Published): number => published.diagnostics.filter((found) => found.severity === 1).length;
    const first = await one.diagnostics(uri, () => true, 0);
    expect([first.version, errors(first)]).toEqual([undefined, 1]);
    writeFileSync(file, BENCH);
    let since = one.published.length;
    void one.connection.sendNotification('workspace/didChangeWatchedFiles', { changes: [{ uri, type: 2 }] });
    expect(errors(await one.diagnostics(uri, () => true, since))).toBe(0);
    // Open, wrong, closed again: what is on disk counts.
    await one.open(uri, BENCH);
    const wrong = one.edit(uri, 'C1.cap', 'C1.cup');
    expect(errors(await one.diagnostics(uri, (found) => found.version === wrong))).toBeGreaterThan(0);
    since = one.published.length;
    void one.connection.sendNotification('textDocument/didClose', { textDocument: { uri } });
    expect(errors(await one.diagnostics(uri, (found) => found.version === undefined && one.published.indexOf(found) > since, since))).toBe(
      0,
    );
    since = one.published.length;
    void one.connection.sendNotification('workspace/didChangeConfiguration', {
      settings: { oilway: { findings: { scope: 'open files' } } },
    });
    expect((await one.diagnostics(uri, () => true, since)).diagnostics).toEqual([]);
    expect(one.published.filter((found) => found.uri.endsWith('notes.txt'))).toEqual([]);
    expect(await one.stop()).toBe(0);
    rmSync(room, { recursive: true, force: true });
  });

  test('a closed document shows nothing any more', async () => {
    const since = client.published.length;
    void client.connection.sendNotification('textDocument/didClose', { textDocument: { uri: URI } });
    expect((await client.diagnostics(URI, (one) => one.diagnostics.length === 0, since)).diagnostics).toEqual([]);
    expect(await client.request('hover', URI, { position: { line: 0, character: 0 } })).toBeNull();
  });

  test('hostile texts are answered, none with an error of the tool itself', async () => {
    const texts = [
      '',
      '\u0000\uD800 \uFEFF',
      '('.repeat(2000),
      'circuit X\n'.repeat(200),
      `pump P1 (${'displacement 8 cm3/rev, '.repeat(500)})`,
      'cycle A {'.repeat(600),
      BENCH.replaceAll('\n', '\r\n'),
      'let a = 999999999999999999999999999 bar',
    ];
    for (const [index, text] of texts.entries()) {
      const { diagnostics } = await client.open(`file:///circuits/hostile${index}.oilway`, text);
      for (const one of diagnostics) expect(one.message).not.toMatch(/TypeError|RangeError|undefined|NaN|Cannot read|at Object/);
    }
  });
});
