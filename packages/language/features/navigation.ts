/** Definition, references and highlights: all read from the list of names. */
import type { Origin } from '@oilway/circuit';
import type { Analysis, Occurrence } from './analysis.ts';

/** Where the name under the cursor is declared. */
export function definitionAt(analysis: Analysis, offset: number): Origin[] {
  const here = analysis.occurrenceAt(offset);
  if (!here) return [];
  return analysis.occurrences.filter((one) => one.symbol === here.symbol && one.role === 'declaration').map((one) => one.origin);
}

export function referencesAt(analysis: Analysis, offset: number, withDeclaration: boolean): Origin[] {
  return sameAs(analysis, offset)
    .filter((one) => withDeclaration || one.role === 'use')
    .map((one) => one.origin);
}

/** In this document only; a declaration is a write. */
export function highlightsAt(analysis: Analysis, offset: number): readonly { readonly origin: Origin; readonly write: boolean }[] {
  return sameAs(analysis, offset)
    .filter((one) => one.origin.uri === analysis.uri)
    .map((one) => ({ origin: one.origin, write: one.role === 'declaration' }));
}

export function sameAs(analysis: Analysis, offset: number): Occurrence[] {
  const here = analysis.occurrenceAt(offset);
  return here ? analysis.occurrences.filter((one) => one.symbol === here.symbol) : [];
}
