/** A finding's code leads to the page of its rule, shown as a preview; the server writes the page. */
import * as vscode from 'vscode';
import type { BaseLanguageClient } from 'vscode-languageclient';

const SCHEME = 'oilway-rule';
const COMMAND = 'oilway.showRule';

/** Where the link of a finding's code leads; `{code}` stands for the code. */
export const RULE_PAGE = `command:${COMMAND}?${encodeURIComponent('["')}{code}${encodeURIComponent('"]')}`;

export function serveRulePages(current: () => BaseLanguageClient | undefined): vscode.Disposable {
  const pages: vscode.TextDocumentContentProvider = {
    async provideTextDocumentContent(uri) {
      const code = uri.path.replace(/^\/|\.md$/g, '');
      const page = await current()?.sendRequest<string | null>('oilway/rulePage', { code });
      return page ?? vscode.l10n.t('There is no page for {0}.', code);
    },
  };
  const show = async (code: unknown): Promise<void> => {
    // The command can be called from any link: a code is letters, digits and dashes, nothing else.
    if (typeof code !== 'string' || !/^[A-Za-z0-9-]+$/.test(code)) return;
    const uri = vscode.Uri.from({ scheme: SCHEME, path: `/${code}.md` });
    await vscode.commands.executeCommand('markdown.showPreviewToSide', uri);
  };
  return vscode.Disposable.from(
    vscode.workspace.registerTextDocumentContentProvider(SCHEME, pages),
    vscode.commands.registerCommand(COMMAND, show),
  );
}
