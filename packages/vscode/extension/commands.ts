/** The commands of the extension, all under the category Oilway. */
import * as vscode from 'vscode';
import { LANGUAGE } from './client.ts';
import { plainTables } from './figures.ts';
import { NEW_CIRCUIT } from './new-circuit.ts';

export interface CommandParts {
  readonly output: vscode.LogOutputChannel;
  readonly restart: () => Promise<void>;
}

async function toggleHints(): Promise<void> {
  const settings = vscode.workspace.getConfiguration(LANGUAGE, vscode.window.activeTextEditor?.document);
  await settings.update('hints.enabled', !settings.get<boolean>('hints.enabled', true), vscode.ConfigurationTarget.Global);
}

/** What the hover at the cursor says, tables tab-separated, so that a spreadsheet takes them. */
async function copyFigures(): Promise<void> {
  const editor = vscode.window.activeTextEditor;
  if (editor?.document.languageId !== LANGUAGE) return;
  const hovers = await vscode.commands.executeCommand<vscode.Hover[]>(
    'vscode.executeHoverProvider',
    editor.document.uri,
    editor.selection.active,
  );
  const text = hovers
    .flatMap((hover) => hover.contents)
    .map((content) => plainTables(typeof content === 'string' ? content : content.value))
    .filter((part) => part !== '')
    .join('\n');
  if (text === '') {
    void vscode.window.showInformationMessage(vscode.l10n.t('There are no figures at the cursor.'));
    return;
  }
  await vscode.env.clipboard.writeText(text);
  vscode.window.setStatusBarMessage(vscode.l10n.t('Figures copied'), 2000);
}

async function newCircuit(): Promise<void> {
  const document = await vscode.workspace.openTextDocument({ language: LANGUAGE, content: NEW_CIRCUIT });
  await vscode.window.showTextDocument(document);
}

export function registerCommands(context: vscode.ExtensionContext, parts: CommandParts): void {
  const commands: Record<string, () => unknown> = {
    'oilway.restart': parts.restart,
    'oilway.showOutput': () => parts.output.show(),
    'oilway.toggleHints': toggleHints,
    'oilway.copyFigures': copyFigures,
    'oilway.newCircuit': newCircuit,
  };
  for (const [id, run] of Object.entries(commands)) context.subscriptions.push(vscode.commands.registerCommand(id, run));
}
