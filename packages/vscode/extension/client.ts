/** What the node and the web client share: which documents, what is watched, what the output channel is. */
import * as vscode from 'vscode';
import type { BaseLanguageClient, LanguageClientOptions } from 'vscode-languageclient';

export const LANGUAGE = 'oilway';
export const CLIENT_ID = 'oilway';
export const CLIENT_NAME = 'Oilway';

/** Starts nothing: the entry for the host (node or web) adds how the server is run. */
export type MakeClient = (options: LanguageClientOptions) => BaseLanguageClient;

export function clientOptions(output: vscode.LogOutputChannel, more: Record<string, unknown>): LanguageClientOptions {
  return {
    documentSelector: [{ language: LANGUAGE }],
    outputChannel: output,
    synchronize: { fileEvents: vscode.workspace.createFileSystemWatcher('**/*.oilway') },
    // Asked for anew at each start. Plain data: what the editor hands out has functions in it, which no worker takes.
    initializationOptions: () => ({
      settings: JSON.parse(JSON.stringify(vscode.workspace.getConfiguration(LANGUAGE))),
      suggestCommand: 'editor.action.triggerSuggest',
      ...more,
    }),
  };
}
