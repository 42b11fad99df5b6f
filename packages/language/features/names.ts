/** The names of a document as features want them: declarations, uses and ports in one list. */
import type { SymbolIndex, SymbolKind as Declared } from '../resolve/symbols.ts';
import type { Occurrence, SymbolKind } from './analysis.ts';

const KIND: Readonly<Record<Declared, SymbolKind>> = {
  component: 'component',
  part: 'part',
  assembly: 'assembly',
  unit: 'component',
  coil: 'coil',
  line: 'line',
  constant: 'constant',
  cycle: 'cycle',
  step: 'step',
};

export function occurrencesOf(index: SymbolIndex, uri: string): Occurrence[] {
  const found: Occurrence[] = [];
  const kinds = new Map<string, SymbolKind>();
  for (const one of index.declarations) {
    const kind = KIND[one.what];
    // A name given twice is an error; both places stay one name, so that a rename keeps what was written.
    if (!kinds.has(one.id)) kinds.set(one.id, kind);
    found.push({ symbol: `${uri}#${one.id}`, kind, id: one.id, origin: one.origin, role: 'declaration' });
  }
  for (const one of index.references) {
    const kind = kinds.get(one.target);
    if (kind) found.push({ symbol: `${uri}#${one.target}`, kind, id: one.target, origin: one.origin, role: 'use' });
  }
  for (const one of index.ports) {
    const id = `${one.component}.${one.port}`;
    found.push({ symbol: `${uri}#port ${id}`, kind: 'port', id, origin: one.origin, role: 'use' });
  }
  return found.sort((a, b) => a.origin.start - b.origin.start);
}
