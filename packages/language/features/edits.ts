/** Changes of text as an editor takes them. */
import type { TextEdit, WorkspaceEdit } from 'vscode-languageserver-types';
import type { TextChange } from '@oilway/circuit';
import type { DiagnosticContext } from './diagnostics.ts';

/** Undefined where a document of the changes is not at hand: half a mend is none. */
export function workspaceEdit(changes: readonly TextChange[], context: DiagnosticContext): WorkspaceEdit | undefined {
  const byFile: Record<string, TextEdit[]> = {};
  for (const change of changes) {
    const range = context.range(change);
    if (!range) return undefined;
    const edits = byFile[change.uri] ?? [];
    edits.push({ range, newText: change.text });
    byFile[change.uri] = edits;
  }
  return { changes: byFile };
}
