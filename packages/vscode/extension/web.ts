/** The extension in a browser: the language server is a web worker; files are read through the editor. */
import * as vscode from 'vscode';
import { LanguageClient } from 'vscode-languageclient/browser';
import { CLIENT_ID, CLIENT_NAME } from './client.ts';
import { start, stop } from './lifecycle.ts';

export function activate(context: vscode.ExtensionContext): Promise<void> {
  const address = (name: string): string => vscode.Uri.joinPath(context.extensionUri, 'dist', 'web', name).toString(true);
  const more = { studyWorker: address('study-worker.js') };
  return start(
    context,
    (options) => new LanguageClient(CLIENT_ID, CLIENT_NAME, async () => new Worker(address('server.js')), options),
    more,
  );
}

export function deactivate(): Promise<void> {
  return stop();
}
