/** A finding as text: what and where, the line with its underline, why, what would mend it, the other places. */
import type { Finding } from '@oilway/rules';
import { pathOf } from '../files.ts';
import type { Paint } from './colour.ts';
import { excerpt, gutterFor } from './excerpt.ts';
import { LineTable } from './position.ts';

/** Line tables of texts by URI, each made once. */
export class Texts {
  readonly #tables = new Map<string, LineTable>();
  readonly #text: (uri: string) => string | undefined;

  constructor(text: (uri: string) => string | undefined) {
    this.#text = text;
  }

  table(uri: string): LineTable {
    let known = this.#tables.get(uri);
    if (known === undefined) {
      known = new LineTable(this.#text(uri) ?? '');
      this.#tables.set(uri, known);
    }
    return known;
  }
}

/** Breaks words into lines of at most `width` characters behind a lead of blanks. */
function wrapped(label: string, words: string, indent: string, width = 110): string[] {
  const lines: string[] = [];
  let line = `${indent}${label}`;
  let empty = true;
  for (const word of words.split(/\s+/).filter((part) => part !== '')) {
    if (!empty && line.length + 1 + word.length > width) {
      lines.push(line);
      line = indent + ' '.repeat(label.length) + word;
    } else line += empty ? word : ` ${word}`;
    empty = false;
  }
  if (!empty) lines.push(line);
  return lines;
}

export function findingLines(finding: Finding, texts: Texts, paint: Paint): string[] {
  const table = texts.table(finding.origin.uri);
  const at = table.at(finding.origin.start);
  const colour = paint[finding.severity];
  const place = `${pathOf(finding.origin.uri)}:${at.line}:${at.column}`;
  const gutter = gutterFor(table, [finding.origin.start]);
  const indent = ' '.repeat(gutter + 1);
  const lines = [
    `${paint.strong(place)}: ${colour(`${finding.severity} ${finding.code}`)}: ${finding.what}`,
    ...excerpt(table, finding.origin, gutter, colour),
  ];
  if (finding.why) lines.push(...wrapped('why:  ', finding.why, indent).map(paint.faint));
  if (finding.ground && !finding.why?.includes(finding.ground)) lines.push(...wrapped('see:  ', finding.ground, indent).map(paint.faint));
  if (finding.mend) lines.push(...wrapped('mend: ', finding.mend, indent));
  for (const related of finding.related) {
    const there = texts.table(related.origin.uri).at(related.origin.start);
    lines.push(`${indent}also: ${pathOf(related.origin.uri)}:${there.line}:${there.column}: ${related.message}`);
  }
  // Where the covered findings stand among the other places they are told there.
  const told = finding.related.some((related) => finding.hides?.some((code) => related.message.includes(code)));
  if (finding.hides && finding.hides.length > 0 && !told)
    lines.push(paint.faint(`${indent}covers ${finding.hides.join(', ')} at the same place`));
  return lines;
}

/** A finding as plain data for other programs: the same object with lines and columns (from 1) in place of offsets. */
export function findingData(finding: Finding, texts: Texts): Record<string, unknown> {
  const span = (origin: Finding['origin']) => {
    const table = texts.table(origin.uri);
    const from = table.at(origin.start);
    const to = table.at(origin.end);
    return { file: pathOf(origin.uri), line: from.line, column: from.column, endLine: to.line, endColumn: to.column };
  };
  return {
    code: finding.code,
    severity: finding.severity,
    what: finding.what,
    why: finding.why ?? null,
    mend: finding.mend ?? null,
    ground: finding.ground ?? null,
    place: finding.place,
    state: finding.state ?? null,
    ...span(finding.origin),
    related: finding.related.map((related) => ({ message: related.message, ...span(related.origin) })),
    fixes: finding.fixes.map((fix) => ({ title: fix.title, safe: fix.safe })),
    hides: finding.hides ?? [],
    computed: finding.computed,
    accepted: finding.accepted ?? null,
  };
}
