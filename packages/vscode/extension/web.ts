/** The extension in a browser: the language server is a web worker; files are read through the editor. */
import * as vscode from 'vscode';
import { BrowserMessageReader, BrowserMessageWriter, LanguageClient, type MessageTransports } from 'vscode-languageclient/browser';
import { CLIENT_ID, CLIENT_NAME } from './client.ts';
import { start, stop } from './lifecycle.ts';

let worker: Worker | undefined;

/** A new worker for each start. The transports are made here: the host replaces `Worker`, so the client cannot tell ours from it. */
function connect(address: string): Promise<MessageTransports> {
  worker?.terminate();
  worker = new Worker(address);
  return Promise.resolve({ reader: new BrowserMessageReader(worker), writer: new BrowserMessageWriter(worker) });
}

export function activate(context: vscode.ExtensionContext): Promise<void> {
  const address = (name: string): string => vscode.Uri.joinPath(context.extensionUri, 'dist', 'web', name).toString(true);
  const make = (options: ConstructorParameters<typeof LanguageClient>[3]) =>
    new LanguageClient(CLIENT_ID, CLIENT_NAME, () => connect(address('server.js')), options);
  return start(context, make, { studyWorker: address('study-worker.js') });
}

export async function deactivate(): Promise<void> {
  await stop();
  worker?.terminate();
}
