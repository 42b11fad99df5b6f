/** Said once, at the first use: what the figures are, and who decides. */
import * as vscode from 'vscode';

const SAID = 'caution said';

export async function sayCautionOnce(context: vscode.ExtensionContext): Promise<void> {
  if (context.globalState.get<boolean>(SAID)) return;
  await context.globalState.update(SAID, true);
  void vscode.window.showInformationMessage(
    vscode.l10n.t(
      'Oilway calculates from what the text declares. Hydraulic machines can hurt people: local codes, the standards named and a competent person decide.',
    ),
    // With a button the editor shows all of the words, and keeps them until they are read.
    vscode.l10n.t('Understood'),
  );
}
