/** The one status item: whether the server runs, shown in the language status of `.oilway` editors only. */
import * as vscode from 'vscode';
import { type BaseLanguageClient, State } from 'vscode-languageclient';
import { LANGUAGE } from './client.ts';

export class StatusItem implements vscode.Disposable {
  private readonly item = vscode.languages.createLanguageStatusItem('oilway.server', { language: LANGUAGE });

  constructor() {
    this.item.name = 'Oilway';
    this.item.command = { command: 'oilway.showOutput', title: vscode.l10n.t('Show output') };
    this.show(State.Starting);
  }

  follow(client: BaseLanguageClient): void {
    client.onDidChangeState(({ newState }) => this.show(newState));
    client.onNotification('oilway/studied', ({ ms }: { ms: number }) => {
      this.item.detail = vscode.l10n.t('last computed in {0} s', (ms / 1000).toFixed(2));
    });
  }

  private show(state: State): void {
    this.item.busy = state === State.Starting;
    this.item.text =
      state === State.Running
        ? 'Oilway'
        : state === State.Starting
          ? vscode.l10n.t('Oilway is starting')
          : vscode.l10n.t('Oilway has stopped');
    this.item.severity = state === State.Stopped ? vscode.LanguageStatusSeverity.Warning : vscode.LanguageStatusSeverity.Information;
    this.item.command =
      state === State.Stopped
        ? { command: 'oilway.restart', title: vscode.l10n.t('Restart') }
        : { command: 'oilway.showOutput', title: vscode.l10n.t('Show output') };
  }

  dispose(): void {
    this.item.dispose();
  }
}
