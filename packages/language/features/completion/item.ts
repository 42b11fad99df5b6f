/** A proposal before it becomes an editor's completion item. */
import { CompletionItemKind, InsertTextFormat, type CompletionItem } from 'vscode-languageserver-types';
import type { Analysis } from '../analysis.ts';
import type { Cursor } from './context.ts';

export interface Proposal {
  readonly label: string;
  readonly kind: CompletionItemKind;
  readonly detail?: string;
  readonly about?: string;
  /** Text to insert where it is not the label. */
  readonly insert?: string;
  readonly snippet?: boolean;
  /** Lower comes first; within a rank by text order. */
  readonly rank?: number;
  /** Ask for further proposals at once (units after a space, ports after a dot). */
  readonly again?: boolean;
}

export const word = (label: string, detail = '', rank = 5): Proposal => ({ label, kind: CompletionItemKind.Keyword, detail, rank });

export function toItem(
  proposal: Proposal,
  order: number,
  analysis: Analysis,
  cursor: Cursor,
  options: { readonly snippets: boolean; readonly suggestCommand?: string },
): CompletionItem | undefined {
  const text = proposal.insert ?? proposal.label;
  if (proposal.snippet && !options.snippets) return undefined;
  const rank = String(proposal.rank ?? 5).padStart(2, '0');
  return {
    label: proposal.label,
    kind: proposal.kind,
    sortText: `${rank}${String(order).padStart(4, '0')}`,
    ...(proposal.detail ? { detail: proposal.detail } : {}),
    ...(proposal.about ? { documentation: { kind: 'markdown' as const, value: proposal.about } } : {}),
    ...(proposal.snippet ? { insertTextFormat: InsertTextFormat.Snippet } : {}),
    ...(proposal.again && options.suggestCommand ? { command: { title: 'More', command: options.suggestCommand } } : {}),
    textEdit: { range: analysis.lines.range(cursor.replace), newText: text },
  };
}
