/** The server's side of the connection: hello, settings, documents and files, findings out. Requests are answered in requests.ts. */
import {
  CodeActionKind,
  DidChangeConfigurationNotification,
  FileChangeType,
  TextDocuments,
  TextDocumentSyncKind,
  type Connection,
  type InitializeParams,
  type InitializeResult,
  type Range,
} from 'vscode-languageserver';
import { TextDocument } from 'langium';
import type { Origin } from '@oilway/circuit';
import type { Finding } from '@oilway/rules';
import type { Analysis } from '../features/analysis.ts';
import { FIX_ALL } from '../features/code-actions.ts';
import { toDiagnostic, type DiagnosticContext } from '../features/diagnostics.ts';
import { TOKEN_MODIFIERS, TOKEN_TYPES } from '../features/semantic-tokens.ts';
import { Lines } from '../features/text/lines.ts';
import type { Analyser } from './analyser.ts';
import type { Host } from './host.ts';
import { ReadDirectory, ReadFile, Studied, type InitializationOptions } from './protocol.ts';
import { answerRequests } from './requests.ts';
import { rulePage } from './rules.ts';
import { Session } from './session.ts';
import { DEFAULT_SETTINGS, readSettings, type Settings } from './settings.ts';

export const SERVER_NAME = 'oilway';
/** Address of a rule's page where the client names none. */
const RULE_PAGE = 'oilway-rule:/{code}.md';
/** Letters behind which an editor asks for proposals by itself. */
const TRIGGERS = ['.', ' '];

export function startServer(connection: Connection, host: Host, analyser: Analyser): void {
  let options: InitializationOptions = {};
  let settings: Settings = DEFAULT_SETTINGS;
  let client: InitializeParams['capabilities'] = {};
  let folders: readonly string[] = [];
  let session: Session | undefined;
  let pageAddress = RULE_PAGE;
  const documents = new TextDocuments(TextDocument);
  const log = (message: string): void => connection.console.error(message);

  const linesOf = (uri: string): Lines | undefined => {
    const text = session?.textOf(uri);
    return text === undefined ? undefined : new Lines(text);
  };
  const contextOf = (analysis?: Analysis): DiagnosticContext => {
    const known = new Map<string, Lines | undefined>(analysis ? [[analysis.uri, analysis.lines]] : []);
    return {
      range(origin: Origin): Range | undefined {
        if (!known.has(origin.uri)) known.set(origin.uri, linesOf(origin.uri));
        return known.get(origin.uri)?.range(origin);
      },
      page: (code) => (rulePage(code) === undefined ? undefined : pageAddress.replaceAll('{code}', code)),
    };
  };

  const publish = (uri: string, version: number | undefined, findings: readonly Finding[]): void => {
    const context = contextOf();
    const diagnostics = findings.filter((one) => one.origin.uri === uri).flatMap((one) => toDiagnostic(one, context) ?? []);
    void connection.sendDiagnostics({ uri, diagnostics, ...(version === undefined ? {} : { version }) });
  };
  const refreshHints = (): void => {
    if (client.workspace?.inlayHint?.refreshSupport) void connection.languages.inlayHint.refresh();
  };

  const readFile = async (uri: string): Promise<string | undefined> => {
    const own = await host.readFile?.(uri);
    if (own !== undefined) return own;
    if (uri.startsWith('file:') && host.readFile) return undefined;
    return (await connection.sendRequest(ReadFile, { uri })) ?? undefined;
  };

  connection.onInitialize((params): InitializeResult => {
    options = (params.initializationOptions ?? {}) as InitializationOptions;
    settings = readSettings(options.settings);
    client = params.capabilities;
    pageAddress = options.rulePage ?? RULE_PAGE;
    folders = (params.workspaceFolders ?? []).map((one) => one.uri);
    session = new Session({
      analyser,
      runner: host.study(options),
      readFile,
      publish,
      studied: (uri, version, ms) => {
        refreshHints();
        void connection.sendNotification(Studied, { uri, version, ms });
      },
      log,
    });
    session.compute = settings.compute;
    return {
      serverInfo: { name: SERVER_NAME },
      capabilities: {
        textDocumentSync: { openClose: true, change: TextDocumentSyncKind.Incremental, save: false },
        hoverProvider: true,
        completionProvider: { triggerCharacters: TRIGGERS },
        signatureHelpProvider: { triggerCharacters: ['(', ','], retriggerCharacters: [' '] },
        definitionProvider: true,
        referencesProvider: true,
        documentHighlightProvider: true,
        renameProvider: { prepareProvider: true },
        documentSymbolProvider: true,
        workspaceSymbolProvider: true,
        foldingRangeProvider: true,
        selectionRangeProvider: true,
        callHierarchyProvider: true,
        codeActionProvider: { codeActionKinds: [CodeActionKind.QuickFix, FIX_ALL] },
        inlayHintProvider: true,
        documentFormattingProvider: true,
        documentRangeFormattingProvider: true,
        semanticTokensProvider: { legend: { tokenTypes: [...TOKEN_TYPES], tokenModifiers: [...TOKEN_MODIFIERS] }, full: true },
        workspace: { workspaceFolders: { supported: true, changeNotifications: true } },
      },
    };
  });

  connection.onInitialized(() => {
    if (client.workspace?.didChangeConfiguration?.dynamicRegistration)
      void connection.client.register(DidChangeConfigurationNotification.type, { section: SERVER_NAME });
    if (client.workspace?.configuration) void askSettings();
    if (client.workspace?.workspaceFolders) {
      connection.workspace.onDidChangeWorkspaceFolders((event) => {
        const gone = new Set(event.removed.map((one) => one.uri));
        folders = [...folders.filter((one) => !gone.has(one)), ...event.added.map((one) => one.uri)];
        void readWorkspace();
      });
    }
    void readWorkspace();
  });

  async function askSettings(): Promise<void> {
    try {
      take(readSettings(await connection.workspace.getConfiguration(SERVER_NAME)));
    } catch (reason) {
      log(`settings: ${String(reason)}`);
    }
  }
  function take(next: Settings): void {
    const wider = next.scope !== settings.scope;
    settings = next;
    if (session) session.compute = next.compute;
    if (wider) void readWorkspace();
    refreshHints();
  }
  connection.onDidChangeConfiguration((change) => {
    if (client.workspace?.configuration) void askSettings();
    else take(readSettings((change.settings as Record<string, unknown> | undefined)?.[SERVER_NAME]));
  });

  /** Findings for the whole workspace, where that is wanted: circuits that are not open are read from their files. */
  async function readWorkspace(): Promise<void> {
    if (!session) return;
    if (settings.scope !== 'workspace') {
      for (const uri of session.uris) if (!session.isOpen(uri)) forget(uri);
      return;
    }
    for (const folder of folders) {
      for (const uri of await listCircuits(folder)) {
        if (session.uris.includes(uri)) continue;
        const text = await readFile(uri).catch(() => undefined);
        if (text !== undefined && !session.isOpen(uri)) session.update(uri, undefined, text);
      }
    }
  }
  async function listCircuits(folder: string): Promise<readonly string[]> {
    const own = await host.listCircuits?.(folder);
    if (own) return own;
    const found: string[] = [];
    const waiting = [folder];
    for (let uri = waiting.pop(); uri !== undefined && found.length < MOST_FILES; uri = waiting.pop()) {
      const entries = await connection.sendRequest(ReadDirectory, { uri }).catch(() => null);
      for (const entry of entries ?? []) {
        const name = entry.uri.slice(entry.uri.lastIndexOf('/') + 1);
        if (entry.isFile && name.endsWith('.oilway')) found.push(entry.uri);
        if (entry.isDirectory && name !== 'node_modules' && !name.startsWith('.')) waiting.push(entry.uri);
      }
    }
    return found;
  }
  function forget(uri: string): void {
    session?.close(uri);
    void connection.sendDiagnostics({ uri, diagnostics: [] });
  }

  documents.onDidChangeContent(({ document }) => session?.update(document.uri, document.version, document.getText()));
  documents.onDidClose(({ document }) => {
    forget(document.uri);
    if (settings.scope === 'workspace') void reread(document.uri);
  });
  async function reread(uri: string): Promise<void> {
    const text = await readFile(uri).catch(() => undefined);
    if (text !== undefined && session && !session.isOpen(uri)) session.update(uri, undefined, text);
  }
  connection.onDidChangeWatchedFiles(({ changes }) => {
    for (const { uri, type } of changes) {
      if (!session || session.isOpen(uri)) continue;
      session.fileChanged(uri);
      if (settings.scope !== 'workspace') continue;
      if (type === FileChangeType.Deleted) forget(uri);
      else void reread(uri);
    }
  });

  answerRequests(connection, {
    analysis: (uri) => session?.analysis(uri),
    uris: () => session?.uris ?? [],
    context: contextOf,
    hints: () => (settings.hints.enabled ? settings.hints : undefined),
    proposals: () => ({
      snippets: client.textDocument?.completion?.completionItem?.snippetSupport === true,
      ...(options.suggestCommand ? { suggestCommand: options.suggestCommand } : {}),
    }),
  });

  connection.onShutdown(() => {
    session?.dispose();
    session = undefined;
  });
  documents.listen(connection);
  connection.listen();
}

/** As many circuits as a workspace is read for. */
const MOST_FILES = 2000;
