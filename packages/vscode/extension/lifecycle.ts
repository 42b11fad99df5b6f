/** Starts the language client, restarts it, and gives it up in order; the same for node and web. */
import * as vscode from 'vscode';
import type { BaseLanguageClient } from 'vscode-languageclient';
import { sayCautionOnce } from './caution.ts';
import { CLIENT_NAME, clientOptions, type MakeClient } from './client.ts';
import { registerCommands } from './commands.ts';
import { serveFiles } from './files.ts';
import { RULE_PAGE, serveRulePages } from './rule-pages.ts';
import { StatusItem } from './status.ts';

let running: BaseLanguageClient | undefined;

/** `more`: what the server of this host needs besides the settings (where its study worker lies). */
export async function start(context: vscode.ExtensionContext, make: MakeClient, more: Record<string, unknown> = {}): Promise<void> {
  const output = vscode.window.createOutputChannel(CLIENT_NAME, { log: true });
  const status = new StatusItem();
  context.subscriptions.push(
    output,
    status,
    serveRulePages(() => running),
  );

  const launch = async (): Promise<void> => {
    const client = make(clientOptions(output, { rulePage: RULE_PAGE, suggestCommand: 'editor.action.triggerSuggest', ...more }));
    running = client;
    status.follow(client);
    context.subscriptions.push(serveFiles(client));
    await client.start();
  };
  const restart = async (): Promise<void> => {
    if (running) {
      if (running.needsStop()) await running.stop();
      await running.start();
    } else {
      await launch();
    }
  };
  void sayCautionOnce(context);
  registerCommands(context, { output, restart });
  try {
    await launch();
  } catch (error) {
    running = undefined;
    output.error(error instanceof Error ? error : String(error));
    void vscode.window.showErrorMessage(vscode.l10n.t('The Oilway language server did not start. The output channel says why.'));
  }
}

export async function stop(): Promise<void> {
  const client = running;
  running = undefined;
  if (client?.needsStop()) await client.stop();
}
