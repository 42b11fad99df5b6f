/** Requests of an editor, each answered by one pure feature; here positions become offsets and answers become protocol. */
import {
  ErrorCodes,
  ResponseError,
  SemanticTokensRequest,
  SymbolKind,
  type CallHierarchyItem,
  type Connection,
  type Location,
} from 'vscode-languageserver';
import { KINDS, type Component, type Origin } from '@oilway/circuit';
import type { Analysis } from '../features/analysis.ts';
import { codeActions } from '../features/code-actions.ts';
import { cursorAt, expectsMore } from '../features/completion/context.ts';
import { completionAt, type CompletionOptions } from '../features/completion/index.ts';
import type { DiagnosticContext } from '../features/diagnostics.ts';
import { workspaceEdit } from '../features/edits.ts';
import { foldingRanges } from '../features/folding.ts';
import { formatEdits } from '../features/format.ts';
import { hoverAt } from '../features/hover/index.ts';
import { inlayHints, type HintSettings } from '../features/inlay-hints.ts';
import { definitionAt, highlightsAt, referencesAt } from '../features/navigation.ts';
import { componentAt, neighbours } from '../features/oil-way.ts';
import { outline, workspaceSymbols } from '../features/outline.ts';
import { renameAt, renameTarget } from '../features/rename.ts';
import { selectionAt } from '../features/selection.ts';
import { semanticTokens } from '../features/semantic-tokens.ts';
import { signatureAt } from '../features/signature.ts';
import { format } from '../format/format.ts';
import { RulePage, StudyOf, type StudyReply } from './protocol.ts';
import { ruleList, rulePage } from './rules.ts';

/** What the answers need of the server. */
export interface RequestRoom {
  /** The document as it stands; undefined where it is not known. */
  analysis(uri: string): Analysis | undefined;
  uris(): readonly string[];
  context(analysis: Analysis): DiagnosticContext;
  /** Undefined where hints are switched off. */
  hints(): HintSettings | undefined;
  /** What the client can do with proposals. */
  proposals(): Pick<CompletionOptions, 'snippets' | 'suggestCommand'>;
}

/** A refusal that the editor shows as it is. */
const refuse = (problem: string): ResponseError<void> => new ResponseError<void>(ErrorCodes.InvalidRequest, problem);

export function answerRequests(connection: Connection, room: RequestRoom): void {
  /** The document's analysis and the offset asked about, or nothing where it is not known. */
  const at = (
    uri: string,
    position: { readonly line: number; readonly character: number },
  ): { readonly analysis: Analysis; readonly offset: number } | undefined => {
    const analysis = room.analysis(uri);
    return analysis ? { analysis, offset: analysis.lines.offset(position) } : undefined;
  };
  const locations = (origins: readonly Origin[], context: DiagnosticContext): Location[] =>
    origins.flatMap((origin) => {
      const range = context.range(origin);
      return range ? [{ uri: origin.uri, range }] : [];
    });
  connection.onHover(({ textDocument, position }) => {
    const here = at(textDocument.uri, position);
    const found = here && hoverAt(here.analysis, here.offset);
    return found && here ? { contents: { kind: 'markdown', value: found.markdown }, range: here.analysis.lines.range(found) } : null;
  });
  connection.onCompletion(({ textDocument, position, context }) => {
    const here = at(textDocument.uri, position);
    if (!here || (context?.triggerCharacter === ' ' && !expectsMore(cursorAt(here.analysis, here.offset)))) return [];
    return completionAt(here.analysis, here.offset, {
      ...room.proposals(),
      rules: ruleList(),
    });
  });
  connection.onSignatureHelp(({ textDocument, position }) => {
    const here = at(textDocument.uri, position);
    return (here && signatureAt(here.analysis, here.offset)) ?? null;
  });
  connection.onDefinition(({ textDocument, position }) => {
    const here = at(textDocument.uri, position);
    return here ? locations(definitionAt(here.analysis, here.offset), room.context(here.analysis)) : [];
  });
  connection.onReferences(({ textDocument, position, context }) => {
    const here = at(textDocument.uri, position);
    return here ? locations(referencesAt(here.analysis, here.offset, context.includeDeclaration), room.context(here.analysis)) : [];
  });
  connection.onDocumentHighlight(({ textDocument, position }) => {
    const here = at(textDocument.uri, position);
    return here
      ? highlightsAt(here.analysis, here.offset).map((one) => ({ range: here.analysis.lines.range(one.origin), kind: one.write ? 3 : 2 }))
      : [];
  });
  connection.onPrepareRename(({ textDocument, position }) => {
    const here = at(textDocument.uri, position);
    const target = here && renameTarget(here.analysis, here.offset);
    if (!here || !target) return null;
    if (!target.ok) return refuse(target.problem);
    return { range: here.analysis.lines.range(target.value), placeholder: target.value.name };
  });
  connection.onRenameRequest(({ textDocument, position, newName }) => {
    const here = at(textDocument.uri, position);
    const answer = here && renameAt(here.analysis, here.offset, newName);
    if (!here || !answer) return null;
    return answer.ok ? (workspaceEdit(answer.value, room.context(here.analysis)) ?? null) : refuse(answer.problem);
  });
  connection.onDocumentSymbol(({ textDocument }) => {
    const analysis = room.analysis(textDocument.uri);
    return analysis ? outline(analysis) : [];
  });
  connection.onWorkspaceSymbol(({ query }) =>
    room.uris().flatMap((uri) => {
      const analysis = room.analysis(uri);
      return analysis ? workspaceSymbols(analysis, query) : [];
    }),
  );
  connection.onFoldingRanges(({ textDocument }) => {
    const analysis = room.analysis(textDocument.uri);
    return analysis ? foldingRanges(analysis) : [];
  });
  connection.onSelectionRanges(({ textDocument, positions }) => {
    const analysis = room.analysis(textDocument.uri);
    return analysis ? positions.map((position) => selectionAt(analysis, analysis.lines.offset(position))) : [];
  });
  connection.onCodeAction(({ textDocument, range, context }) => {
    const analysis = room.analysis(textDocument.uri);
    if (!analysis) return [];
    return codeActions(
      analysis,
      {
        start: analysis.lines.offset(range.start),
        end: analysis.lines.offset(range.end),
        shown: context.diagnostics,
        ...(context.only ? { only: context.only } : {}),
      },
      room.context(analysis),
    );
  });
  connection.languages.inlayHint.on(({ textDocument, range }) => {
    const settings = room.hints();
    const analysis = settings && room.analysis(textDocument.uri);
    if (!settings || !analysis) return [];
    return inlayHints(analysis, { start: analysis.lines.offset(range.start), end: analysis.lines.offset(range.end) }, settings);
  });
  connection.onDocumentFormatting(({ textDocument }) => {
    const analysis = room.analysis(textDocument.uri);
    return analysis ? formatEdits(analysis, format(analysis.text)) : [];
  });
  connection.onDocumentRangeFormatting(({ textDocument, range }) => {
    const analysis = room.analysis(textDocument.uri);
    return analysis
      ? formatEdits(analysis, format(analysis.text), { start: analysis.lines.offset(range.start), end: analysis.lines.offset(range.end) })
      : [];
  });
  const itemOf = (analysis: Analysis, component: Component, detail: string): CallHierarchyItem[] => {
    const context = room.context(analysis);
    const range = context.range(component.origin);
    const selectionRange = context.range(component.nameOrigin);
    if (!range || !selectionRange) return [];
    return [
      {
        name: component.id,
        kind: SymbolKind.Object,
        detail,
        uri: component.origin.uri,
        range,
        selectionRange,
        data: { uri: analysis.uri, id: component.id },
      },
    ];
  };
  const waysOf = (item: CallHierarchyItem, into: boolean): CallHierarchyItem[] => {
    const { uri, id } = item.data as { readonly uri: string; readonly id: string };
    const analysis = room.analysis(uri);
    return analysis ? neighbours(analysis, id, into).flatMap((one) => itemOf(analysis, one.component, one.detail)) : [];
  };
  connection.languages.callHierarchy.onPrepare(({ textDocument, position }) => {
    const here = at(textDocument.uri, position);
    const component = here && componentAt(here.analysis, here.offset);
    return here && component ? itemOf(here.analysis, component, component.title ?? KINDS[component.kind].noun) : [];
  });
  connection.languages.callHierarchy.onIncomingCalls(({ item }) =>
    waysOf(item, true).map((from) => ({ from, fromRanges: [from.selectionRange] })),
  );
  connection.languages.callHierarchy.onOutgoingCalls(({ item }) =>
    waysOf(item, false).map((to) => ({ to, fromRanges: [item.selectionRange] })),
  );
  connection.onRequest(SemanticTokensRequest.type, ({ textDocument }) => {
    const analysis = room.analysis(textDocument.uri);
    return analysis ? semanticTokens(analysis) : { data: [] };
  });
  connection.onRequest(StudyOf, ({ uri }): StudyReply | null => {
    const analysis = room.analysis(uri);
    if (!analysis) return null;
    return {
      version: analysis.version,
      circuit: analysis.circuit ?? null,
      study: analysis.studied?.study ?? null,
      older: analysis.studied?.older ?? false,
      findings: analysis.findings,
    };
  });
  connection.onRequest(RulePage, ({ code }) => rulePage(code) ?? null);
}
