/** The extension on a desktop: the language server is a process of its own, spoken to over IPC. */
import type * as vscode from 'vscode';
import { LanguageClient, TransportKind } from 'vscode-languageclient/node';
import { CLIENT_ID, CLIENT_NAME } from './client.ts';
import { start, stop } from './lifecycle.ts';

export function activate(context: vscode.ExtensionContext): Promise<void> {
  const module = context.asAbsolutePath('dist/node/server.cjs');
  const run = { module, transport: TransportKind.ipc };
  const debug = { ...run, options: { execArgv: ['--nolazy', '--inspect=6019', '--enable-source-maps'] } };
  return start(context, (options) => new LanguageClient(CLIENT_ID, CLIENT_NAME, { run, debug }, options));
}

export function deactivate(): Promise<void> {
  return stop();
}
