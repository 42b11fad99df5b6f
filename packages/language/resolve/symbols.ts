/** Every declared name with its place, and every place that uses it: for definition, references, rename, highlights. */
import type { KindName, Origin } from '@oilway/circuit';

export type SymbolKind = 'component' | 'part' | 'assembly' | 'unit' | 'coil' | 'line' | 'constant' | 'cycle' | 'step';

export interface SymbolDeclaration {
  /** Unique in the file: `C1`, `SOL1`, `pressure`, `Drill`, `Drill.Clamp`. */
  readonly id: string;
  /** As written: `Clamp` for `Drill.Clamp`. */
  readonly name: string;
  readonly what: SymbolKind;
  /** Kind of a component or part. */
  readonly kind?: KindName;
  /** The name where it is declared. */
  readonly origin: Origin;
  /** The whole statement. */
  readonly statement: Origin;
}

export interface SymbolReference {
  /** The characters that name it (one word: a port after the dot is not part of it). */
  readonly origin: Origin;
  /** Id of the declaration. */
  readonly target: string;
}

/** A port written after a component's name. */
export interface PortMention {
  readonly origin: Origin;
  readonly component: string;
  readonly port: string;
}

export interface SymbolIndex {
  readonly declarations: readonly SymbolDeclaration[];
  readonly references: readonly SymbolReference[];
  readonly ports: readonly PortMention[];
}

/** The declaration named at an offset, whether there it is declared or used. */
export function symbolAt(index: SymbolIndex, offset: number): SymbolDeclaration | undefined {
  const holds = (origin: Origin): boolean => origin.start <= offset && offset <= origin.end;
  const declared = index.declarations.find((declaration) => holds(declaration.origin));
  if (declared !== undefined) return declared;
  const used = index.references.find((reference) => holds(reference.origin));
  return used === undefined ? undefined : index.declarations.find((declaration) => declaration.id === used.target);
}

/** All places of one symbol in text order, the declaration among them. */
export function placesOf(index: SymbolIndex, id: string): readonly Origin[] {
  const places = index.references.filter((reference) => reference.target === id).map((reference) => reference.origin);
  const declared = index.declarations.filter((declaration) => declaration.id === id).map((declaration) => declaration.origin);
  return [...declared, ...places].sort((a, b) => a.start - b.start);
}
