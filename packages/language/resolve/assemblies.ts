/** Assemblies: their insides are read for what is wrong in them, with their parameters at their defaults. Their units are not computed. */
import type { Finding } from '@oilway/rules';
import type { Assembly as AssemblyNode, Statement } from '../generated/ast.ts';
import type { Parsed } from '../parse/parse.ts';
import type { Context } from './context.ts';
import type { SymbolIndex } from './symbols.ts';

/** What an assembly's body sees: parts and constants of its file, and its own statements. */
export function bodyOf(assembly: AssemblyNode, file: readonly Statement[]): readonly Statement[] {
  const shared = file.filter((statement) => statement.$type === 'Let' || (statement.$type === 'Component' && statement.reusable === true));
  return [...shared, ...(assembly.statements ?? [])];
}

/** Ports are names a line may lead to, parameters are constants. */
export function declareHead(context: Context, assembly: AssemblyNode): void {
  for (const port of assembly.ports ?? []) context.declare(port, 'line', assembly);
  const { properties } = assembly;
  const entries = [properties?.first, ...(properties?.rest ?? []).map((next) => next.property)];
  for (const entry of entries) {
    const name = entry?.head?.text;
    if (entry === undefined || name === undefined) continue;
    const item = entry.items?.[0];
    const value = item?.$type === 'ValueItem' ? item.value : undefined;
    if (context.declareWord(name, context.origin(entry.head), 'constant', context.origin(entry)) === undefined) continue;
    context.constants.set(name, { name: entry.head, value });
    if (value === undefined || (entry.items ?? []).length > 1) {
      context.report({ code: 'VALUE', what: `The parameter \`${name}\` needs one value as its default`, origin: context.origin(entry) });
    }
  }
}

/** Findings and names of the body that stand in it; what the file says of its own parts is said there. Ids of the body begin with the assembly's name. */
export function within(
  parsed: Parsed,
  assembly: AssemblyNode,
  inner: { readonly findings: readonly Finding[]; readonly symbols: SymbolIndex },
): { readonly findings: readonly Finding[]; readonly symbols: SymbolIndex } {
  const { start, end } = parsed.originOf(assembly);
  const inside = (place: { readonly origin: { readonly start: number; readonly end: number } }): boolean =>
    place.origin.start >= start && place.origin.end <= end;
  const own = new Set(inner.symbols.declarations.filter(inside).map((declaration) => declaration.id));
  const id = (name: string): string => (own.has(name) ? `${assembly.name?.text ?? ''}.${name}` : name);
  return {
    findings: inner.findings.filter((finding) => inside(finding) && finding.code !== 'NOT-COMPUTED'),
    symbols: {
      declarations: inner.symbols.declarations.filter(inside).map((declaration) => ({ ...declaration, id: id(declaration.id) })),
      references: inner.symbols.references.filter(inside).map((reference) => ({ ...reference, target: id(reference.target) })),
      ports: inner.symbols.ports.filter(inside).map((port) => ({ ...port, component: id(port.component) })),
    },
  };
}
