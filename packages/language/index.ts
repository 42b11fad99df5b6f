/**
 * The language: text to syntax tree, tree to circuit, and everything said about both, as data.
 *
 * Names: references are resolved by our own code, not by the parser framework. `resolve` returns a `SymbolIndex` with every declared name and
 * every use of it (`symbolAt`, `placesOf`): definition, references, rename and highlights read it.
 * The framework's parser and grammar are used through `parseText`; its document store, linker and scopes are not.
 */
export * from './parse/parse.ts';
export * from './parse/words.ts';
export { finding } from './parse/finding.ts';
export { nearest } from './parse/near.ts';
export { type Layout, type LayoutToken, type LayoutStatement, layout } from './parse/layout.ts';
export { scan } from './parse/scanner.ts';
export * from './resolve/resolve.ts';
export * from './resolve/symbols.ts';
export { STATE_NAMES } from './resolve/places.ts';
export { MEASURES, type Subject, measureOf, measuresOf } from './resolve/measures.ts';
export { format } from './format/format.ts';
export { LANGUAGE_CODES, type CodePage } from './code-pages.ts';
export * from './service.ts';
