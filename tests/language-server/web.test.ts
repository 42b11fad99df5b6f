/** The web server in a room without Node: no process, no require, no Buffer; messages are objects, the study runs in a worker of its own or, where none is allowed, in this one. */
import { readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import vm from 'node:vm';
import { beforeAll, describe, expect, test } from 'vitest';
import type { Diagnostic } from 'vscode-languageserver-types';
import { bundleWeb } from './support/bundle.ts';

const TEXT = readFileSync(fileURLToPath(new URL('../../samples/04-traverse-feed.oilway', import.meta.url)), 'utf8').replace(
  'set 1.26 L/min',
  'set 2.5 L/min',
);
const URI = 'vscode-vfs://room/feed.oilway';

interface Message {
  readonly id?: number;
  readonly method?: string;
  readonly params?: { readonly uri?: string; readonly diagnostics?: readonly Diagnostic[]; readonly message?: string };
  readonly result?: unknown;
}
/** What a script of the web finds around it. */
interface Scope {
  onmessage: ((event: { readonly data: unknown }) => void) | null;
  [name: string]: unknown;
}

let scripts: { readonly server: string; readonly study: string };
beforeAll(async () => {
  scripts = await bundleWeb();
});

/** Messages cross as copies, a moment later, as between workers. */
const cross = (target: () => ((event: { readonly data: unknown }) => void) | null | undefined, message: unknown): void => {
  const data = structuredClone(message);
  setImmediate(() => target()?.({ data }));
};

function room(script: string, post: (message: unknown) => void, more: Record<string, unknown> = {}): Scope {
  const scope: Scope = {
    onmessage: null,
    postMessage: post,
    addEventListener: () => undefined,
    removeEventListener: () => undefined,
    console,
    performance,
    setTimeout,
    clearTimeout,
    queueMicrotask,
    TextDecoder,
    TextEncoder,
    URL,
    Blob,
    ...more,
  };
  scope.self = scope;
  vm.runInNewContext(script, scope);
  return scope;
}

class WebClient {
  readonly #server: Scope;
  readonly #waiting: { readonly accept: (one: Message) => boolean; readonly resolve: (one: Message) => void }[] = [];
  readonly seen: Message[] = [];
  workers = 0;

  constructor(allowsWorkers: boolean) {
    const self = this;
    class Worker {
      onmessage: ((event: { readonly data: unknown }) => void) | null = null;
      onerror = null;
      readonly #scope: Scope;
      constructor() {
        self.workers += 1;
        this.#scope = room(scripts.study, (message) => cross(() => this.onmessage, message));
      }
      postMessage(message: unknown): void {
        cross(() => this.#scope.onmessage, message);
      }
      terminate(): void {
        this.onmessage = null;
      }
    }
    const fetch = async (): Promise<object> => ({ ok: true, text: async () => scripts.study });
    this.#server = room(
      scripts.server,
      (message) =>
        cross(
          () =>
            ({ data }) =>
              this.#take(data as Message),
          message,
        ),
      { fetch, ...(allowsWorkers ? { Worker } : {}) },
    );
  }

  #take(message: Message): void {
    this.seen.push(message);
    for (const one of [...this.#waiting]) {
      if (!one.accept(message)) continue;
      this.#waiting.splice(this.#waiting.indexOf(one), 1);
      one.resolve(message);
    }
  }
  send(method: string, params: object, id?: number): void {
    cross(() => this.#server.onmessage, { jsonrpc: '2.0', method, params, ...(id === undefined ? {} : { id }) });
  }
  when(accept: (one: Message) => boolean): Promise<Message> {
    const already = this.seen.find(accept);
    return already ? Promise.resolve(already) : new Promise((resolve) => this.#waiting.push({ accept, resolve }));
  }
  async ask(id: number, method: string, params: object): Promise<unknown> {
    this.send(method, params, id);
    return (await this.when((one) => one.id === id && one.method === undefined)).result;
  }
}

describe.each([
  ['with a worker', true],
  ['without workers', false],
])('%s', (_, allowsWorkers) => {
  test('opens, finds, computes, hovers', async () => {
    const client = new WebClient(allowsWorkers);
    const answer = await client.ask(1, 'initialize', {
      processId: null,
      rootUri: null,
      capabilities: {},
      initializationOptions: { studyWorker: 'https://room/study-worker.js' },
    });
    expect(answer).toMatchObject({ serverInfo: { name: 'oilway' } });
    client.send('initialized', {});
    client.send('textDocument/didOpen', { textDocument: { uri: URI, languageId: 'oilway', version: 1, text: TEXT } });
    const shown = await client.when(
      (one) =>
        one.method === 'textDocument/publishDiagnostics' && (one.params?.diagnostics ?? []).some((found) => found.code === 'REQUIREMENT'),
    );
    expect(shown.params?.uri).toBe(URI);
    const before = TEXT.slice(0, TEXT.indexOf('cylinder  1A1') + 'cylinder  1A'.length).split('\n');
    const hover = await client.ask(2, 'textDocument/hover', {
      textDocument: { uri: URI },
      position: { line: before.length - 1, character: before.at(-1)?.length ?? 0 },
    });
    expect(hover).toMatchObject({ contents: { value: expect.stringContaining('| Out extending |') } });
    expect(client.workers).toBe(allowsWorkers ? 1 : 0);
    expect(client.seen.filter((one) => one.method === 'window/logMessage').map((one) => one.params?.message)).toEqual([]);
  });
});
