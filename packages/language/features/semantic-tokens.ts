/** Semantic colouring: names by what they are; the grammar of the editor colours words, numbers and units. */
import { SemanticTokensBuilder, type SemanticTokens } from 'vscode-languageserver';
import type { Analysis, SymbolKind } from './analysis.ts';

export const TOKEN_TYPES = ['class', 'variable', 'event', 'interface', 'function', 'namespace', 'type', 'parameter', 'property'] as const;
export const TOKEN_MODIFIERS = ['declaration', 'readonly'] as const;

const TYPE: Readonly<Record<SymbolKind, (typeof TOKEN_TYPES)[number]>> = {
  circuit: 'namespace',
  component: 'class',
  coil: 'event',
  line: 'interface',
  constant: 'variable',
  cycle: 'namespace',
  step: 'function',
  part: 'type',
  assembly: 'type',
  parameter: 'parameter',
  port: 'property',
  property: 'property',
};

export function semanticTokens(analysis: Analysis): SemanticTokens {
  const builder = new SemanticTokensBuilder();
  const own = analysis.occurrences.filter((one) => one.origin.uri === analysis.uri).sort((a, b) => a.origin.start - b.origin.start);
  let last = -1;
  for (const one of own) {
    if (one.origin.start < last) continue;
    last = one.origin.end;
    const { line, character } = analysis.lines.position(one.origin.start);
    const modifiers = (one.role === 'declaration' ? 1 : 0) | (one.kind === 'constant' ? 2 : 0);
    builder.push(line, character, one.origin.end - one.origin.start, TOKEN_TYPES.indexOf(TYPE[one.kind]), modifiers);
  }
  return builder.build();
}
