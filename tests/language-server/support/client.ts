/** A plain client: starts the bundled server, speaks JSON-RPC over stdio, waits for diagnostics by document. No sleeps. */
import { spawn, type ChildProcess } from 'node:child_process';
import { createMessageConnection, StreamMessageReader, StreamMessageWriter, type MessageConnection } from 'vscode-jsonrpc/node';
import type {
  CodeAction,
  CompletionItem,
  Diagnostic,
  Hover,
  InlayHint,
  Location,
  Position,
  Range,
  TextEdit,
  WorkspaceEdit,
} from 'vscode-languageserver-types';

export interface Published {
  readonly uri: string;
  readonly version?: number;
  readonly diagnostics: readonly Diagnostic[];
}
interface Waiter {
  readonly uri: string;
  readonly accept: (one: Published) => boolean;
  readonly resolve: (one: Published) => void;
}

export class Client {
  readonly #process: ChildProcess;
  readonly connection: MessageConnection;
  readonly #waiters: Waiter[] = [];
  readonly published: Published[] = [];
  readonly logged: string[] = [];
  readonly studied: { readonly uri: string; readonly version: number; readonly ms: number }[] = [];
  #hintRefreshes = 0;
  readonly #texts = new Map<string, { version: number; text: string }>();

  private constructor(process: ChildProcess, connection: MessageConnection) {
    this.#process = process;
    this.connection = connection;
    connection.onNotification('textDocument/publishDiagnostics', (one: Published) => {
      this.published.push(one);
      for (const waiter of [...this.#waiters]) {
        if (waiter.uri !== one.uri || !waiter.accept(one)) continue;
        this.#waiters.splice(this.#waiters.indexOf(waiter), 1);
        waiter.resolve(one);
      }
    });
    connection.onNotification('window/logMessage', (one: { readonly message: string }) => {
      this.logged.push(one.message);
    });
    connection.onNotification('oilway/studied', (one: { readonly uri: string; readonly version: number; readonly ms: number }) => {
      this.studied.push(one);
    });
    connection.onRequest('client/registerCapability', () => null);
    connection.onRequest('workspace/inlayHint/refresh', () => {
      this.#hintRefreshes += 1;
      return null;
    });
    connection.onRequest('oilway/readFile', () => null);
    connection.onRequest('oilway/readDirectory', () => null);
    connection.listen();
  }

  static async start(
    server: string,
    options: { readonly initializationOptions?: unknown; readonly folders?: readonly string[] } = {},
  ): Promise<Client> {
    const child = spawn(process.execPath, [server, '--stdio'], { stdio: ['pipe', 'pipe', 'inherit'] });
    if (!child.stdout || !child.stdin) throw new Error('the server has no streams');
    const client = new Client(child, createMessageConnection(new StreamMessageReader(child.stdout), new StreamMessageWriter(child.stdin)));
    client.capabilities = await client.connection.sendRequest('initialize', {
      processId: process.pid,
      rootUri: null,
      workspaceFolders: options.folders?.map((uri) => ({ uri, name: uri })) ?? null,
      initializationOptions: options.initializationOptions ?? {},
      capabilities: {
        workspace: { inlayHint: { refreshSupport: true } },
        textDocument: {
          completion: { completionItem: { snippetSupport: true } },
          publishDiagnostics: { relatedInformation: true, versionSupport: true },
        },
      },
    });
    await client.connection.sendNotification('initialized', {});
    return client;
  }

  capabilities: unknown;

  get pid(): number | undefined {
    return this.#process.pid;
  }

  get hintRefreshes(): number {
    return this.#hintRefreshes;
  }

  /** The next publication of a document that is accepted, or one that has come already since `since`. */
  diagnostics(uri: string, accept: (one: Published) => boolean = () => true, since = this.published.length): Promise<Published> {
    const already = this.published.slice(since).find((one) => one.uri === uri && accept(one));
    if (already) return Promise.resolve(already);
    return new Promise((resolve) => {
      this.#waiters.push({ uri, accept, resolve });
    });
  }

  open(uri: string, text: string): Promise<Published> {
    this.#texts.set(uri, { version: 1, text });
    const answer = this.diagnostics(uri, (one) => one.version === 1);
    void this.connection.sendNotification('textDocument/didOpen', { textDocument: { uri, languageId: 'oilway', version: 1, text } });
    return answer;
  }

  text(uri: string): string {
    return this.#texts.get(uri)?.text ?? '';
  }

  /** Replaces the first occurrence of `from` and tells the server of just that; the version it has then. */
  edit(uri: string, from: string, to: string): number {
    const document = this.#texts.get(uri);
    if (!document) throw new Error(`${uri} is not open`);
    const start = document.text.indexOf(from);
    if (start < 0) throw new Error(`${JSON.stringify(from)} does not stand in the text`);
    const range: Range = { start: this.position(uri, start), end: this.position(uri, start + from.length) };
    document.text = document.text.slice(0, start) + to + document.text.slice(start + from.length);
    document.version += 1;
    void this.connection.sendNotification('textDocument/didChange', {
      textDocument: { uri, version: document.version },
      contentChanges: [{ range, text: to }],
    });
    return document.version;
  }

  position(uri: string, offset: number): Position {
    const before = this.text(uri).slice(0, offset).split('\n');
    return { line: before.length - 1, character: before.at(-1)?.length ?? 0 };
  }
  /** Position of the first place where the marked text stands: `|` is the cursor. */
  at(uri: string, marked: string): Position {
    const bar = marked.indexOf('|');
    const plain = marked.replace('|', '');
    const start = this.text(uri).indexOf(plain);
    if (start < 0 || bar < 0) throw new Error(`${JSON.stringify(marked)} does not stand in the text`);
    return this.position(uri, start + bar);
  }
  slice(uri: string, range: Range): string {
    const lines = this.text(uri).split('\n');
    const offset = (one: Position): number => lines.slice(0, one.line).reduce((sum, line) => sum + line.length + 1, 0) + one.character;
    return this.text(uri).slice(offset(range.start), offset(range.end));
  }
  /** The text with the edits done. */
  applied(uri: string, edit: WorkspaceEdit): string {
    const text = this.text(uri);
    const lines = text.split('\n');
    const offset = (one: Position): number => lines.slice(0, one.line).reduce((sum, line) => sum + line.length + 1, 0) + one.character;
    const edits: TextEdit[] = [...(edit.changes?.[uri] ?? [])].sort((a, b) => offset(b.range.start) - offset(a.range.start));
    return edits.reduce((now, one) => now.slice(0, offset(one.range.start)) + one.newText + now.slice(offset(one.range.end)), text);
  }

  #ask<T>(method: string, uri: string, more: object): Promise<T> {
    return this.connection.sendRequest<T>(`textDocument/${method}`, { textDocument: { uri }, ...more });
  }
  hover(uri: string, marked: string): Promise<Hover | null> {
    return this.#ask('hover', uri, { position: this.at(uri, marked) });
  }
  completion(uri: string, marked: string): Promise<CompletionItem[]> {
    return this.#ask('completion', uri, { position: this.at(uri, marked) });
  }
  definition(uri: string, marked: string): Promise<Location[]> {
    return this.#ask('definition', uri, { position: this.at(uri, marked) });
  }
  references(uri: string, marked: string): Promise<Location[]> {
    return this.#ask('references', uri, { position: this.at(uri, marked), context: { includeDeclaration: true } });
  }
  rename(uri: string, marked: string, newName: string): Promise<WorkspaceEdit | null> {
    return this.#ask('rename', uri, { position: this.at(uri, marked), newName });
  }
  codeActions(uri: string, range: Range, diagnostics: readonly Diagnostic[], only?: readonly string[]): Promise<CodeAction[]> {
    return this.#ask('codeAction', uri, { range, context: { diagnostics, ...(only ? { only } : {}) } });
  }
  hints(uri: string): Promise<InlayHint[]> {
    return this.#ask('inlayHint', uri, { range: { start: { line: 0, character: 0 }, end: { line: 10_000, character: 0 } } });
  }
  request<T>(method: string, uri: string, more: object = {}): Promise<T> {
    return this.#ask(method, uri, more);
  }

  /** In order, as an editor does; the process must end by itself. */
  async stop(): Promise<number | null> {
    const ended = new Promise<number | null>((resolve) => this.#process.once('exit', (code) => resolve(code)));
    await this.connection.sendRequest('shutdown');
    await this.connection.sendNotification('exit');
    const code = await ended;
    this.connection.dispose();
    return code;
  }
}
