/** A broken line costs no good line: fifteen kinds of broken line, each tried on every line of two circuits it can befall. */
import type { TextAnalysis } from '@oilway/language';
import { describe, expect, it } from 'vitest';
import { circuitText, read } from './support.ts';

interface Break {
  readonly name: string;
  /** The broken line, or nothing where this kind cannot befall the line. */
  readonly make: (line: string) => string | undefined;
}

const replaceFirst = (line: string, find: RegExp | string, by: string): string | undefined => {
  const changed = line.replace(find, by);
  return changed === line ? undefined : changed;
};

const BREAKS: readonly Break[] = [
  {
    name: 'cut in the middle',
    make: (line) => (line.endsWith('{') || line === '}' ? undefined : line.slice(0, Math.max(1, Math.floor(line.length * 0.6)))),
  },
  { name: 'closing bracket lost', make: (line) => replaceFirst(line, /\)(?=[^)]*$)/, '') },
  { name: 'opening bracket lost', make: (line) => replaceFirst(line, '(', '') },
  { name: 'one bracket too many', make: (line) => replaceFirst(line, ')', '))') },
  { name: 'comma lost', make: (line) => replaceFirst(line, ',', '') },
  {
    name: 'name lost',
    make: (line) => (/^\s*[a-z]+\s+[A-Z0-9]\w*/.test(line) ? replaceFirst(line, /^(\s*[a-z]+\s+)\w+/, '$1') : undefined),
  },
  {
    name: 'stray character',
    make: (line) => (line === '}' ? undefined : `${line.slice(0, Math.floor(line.length / 2))};${line.slice(Math.floor(line.length / 2))}`),
  },
  { name: 'head mistyped', make: (line) => replaceFirst(line, /^(\s*)([a-z])([a-z])([a-z]+)/, '$1$2$4') },
  { name: 'text not closed', make: (line) => replaceFirst(line, /"(?=[^"]*$)/, '') },
  { name: '`to` lost', make: (line) => replaceFirst(line, / to /, ' ') },
  { name: 'decimal comma', make: (line) => replaceFirst(line, /([0-9])\.([0-9])(?![^"]*"[^"]*(?:"[^"]*"[^"]*)*$)/, '$1,$2') },
  { name: 'unit unknown', make: (line) => replaceFirst(line, /([0-9]) (?:bar|mm|kW|L\/min|s|kg|rpm)\b/, '$1 qqq') },
  { name: 'setting half typed', make: (line) => replaceFirst(line, /^(.*\([^()]*[a-z])\s+[^\s,()]+\)([^()]*)$/, '$1)$2') },
  { name: 'closing brace lost', make: (line) => (line === '}' ? '' : undefined) },
  { name: 'opening brace lost', make: (line) => replaceFirst(line, / \{$/, '') },
];

/** Texts of all statements, those in blocks too. */
function statements({ text, parsed }: TextAnalysis): string[] {
  const found: string[] = [];
  const visit = (nodes: TextAnalysis['parsed']['statements']): void => {
    for (const node of nodes) {
      const inner = node.$type === 'Cycle' ? node.lines : node.$type === 'Assembly' ? node.statements : undefined;
      const { start, end } = parsed.originOf(node);
      if (inner !== undefined) visit(inner);
      else found.push(text.slice(start, end).trim());
    }
  };
  visit(parsed.statements);
  return found;
}

describe('broken lines', () => {
  for (const file of ['09-load-sensing.oilway', '12-moulding.oilway']) {
    const lines = circuitText(file).split('\n');
    const whole = statements(read(lines.join('\n')));
    for (const kind of BREAKS) {
      it(`${kind.name} in ${file}: no good line lost, no error on another line`, () => {
        let tried = 0;
        lines.forEach((line, number) => {
          if (/^\s*(\/\/|$)/.test(line)) return;
          const broken = kind.make(line);
          if (broken === undefined) return;
          const text = [...lines.slice(0, number), broken, ...lines.slice(number + 1)].join('\n');
          const analysis = read(text);
          const { findings } = analysis;
          // A line cut where it still reads as a whole one says something else: what follows from that is said rightly elsewhere.
          if (kind.name === 'cut in the middle' && !findings.some((finding) => finding.code === 'SYNTAX')) return;
          tried++;
          const lostBrace = line.trim() === '}';
          // A lost closing brace is said at the brace that stays open.
          const opening = lostBrace ? lines.slice(0, number).findLastIndex((other) => other.endsWith('{')) : number;
          const elsewhere = findings.filter((finding) => {
            const at = text.slice(0, finding.origin.start).split('\n').length - 1;
            return finding.severity === 'error' && at !== number && at !== opening;
          });
          expect(
            elsewhere.map((finding) => `${finding.what} @ ${text.slice(finding.origin.start, finding.origin.end)}`),
            `line ${number + 1}: ${broken}`,
          ).toEqual([]);
          const left = new Set(statements(analysis));
          const lost = whole.filter((statement) => !left.has(statement) && statement !== line.trim());
          expect(lost, `line ${number + 1}: ${broken}`).toEqual([]);
        });
        // Not every kind can befall every file, but each must have been tried somewhere in it.
        expect(tried).toBeGreaterThan(kind.name.includes('brace') ? 0 : 1);
      });
    }
  }
});
