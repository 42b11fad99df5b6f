/** Signature help inside brackets: the kind's properties, the one being written marked. */
import type { SignatureHelp } from 'vscode-languageserver-types';
import type { Analysis } from './analysis.ts';
import { bracketEntry, cursorAt } from './completion/context.ts';
import { propertyAbout, propertyTable } from './completion/properties.ts';

export function signatureAt(analysis: Analysis, offset: number): SignatureHelp | undefined {
  const cursor = cursorAt(analysis, offset);
  if (cursor.quiet) return undefined;
  const inside = bracketEntry(cursor);
  const table = inside && propertyTable(cursor.before);
  const head = cursor.before[0]?.text ?? '';
  if (!inside || !table || table.length === 0) return undefined;
  const current = inside.entry[0]?.text ?? cursor.prefix;
  const required = table.filter((spec) => spec.required || spec.group);
  const optional = table.filter((spec) => !spec.required && !spec.group);
  const ordered = [...required, ...optional];
  const shown = ordered.map((spec) => (spec.required || spec.group ? spec.example : `[${spec.example}]`));
  const active = ordered.findIndex((spec) => spec.name === current);
  let place = head.length + 2;
  const parameters = ordered.map((spec, index) => {
    const text = shown[index] ?? '';
    const label: [number, number] = [place, place + text.length];
    place += text.length + 2;
    return { label, documentation: { kind: 'markdown' as const, value: propertyAbout(spec) } };
  });
  return {
    signatures: [{ label: `${head} (${shown.join(', ')})`, parameters, ...(active >= 0 ? { activeParameter: active } : {}) }],
    activeSignature: 0,
    ...(active >= 0 ? { activeParameter: active } : {}),
  };
}
