/** Reads figures off the hover text of a line, as a person would: flow, velocity and Reynolds number of one place. */
import { analyseText } from '@oilway/language';
import { parseQuantity } from '@oilway/quantity';
import { Analysis } from '../../packages/language/features/analysis.ts';
import { hoverAt } from '../../packages/language/features/hover/index.ts';
import { occurrencesOf } from '../../packages/language/features/names.ts';
import type { Bench } from './bench.ts';

/** What hover shows over the word that begins `line`. */
function shown(bench: Bench, line: string, into = 1): string {
  const { uri } = bench.circuit;
  const { circuit, findings, symbols } = analyseText({ uri, text: bench.text });
  const analysis = new Analysis({
    uri,
    version: 1,
    text: bench.text,
    circuit,
    findings,
    occurrences: occurrencesOf(symbols, uri),
    studied: { study: bench.study, circuit: bench.circuit, older: false },
  });
  return hoverAt(analysis, bench.text.indexOf(line) + into)?.markdown ?? '';
}

/** Kinematic viscosity, m2/s, that hover shows over the fluid. */
export function fluidViscosity(bench: Bench): number {
  const text = shown(bench, 'fluid F1', 'fluid '.length + 1);
  const q = parseQuantity(/viscosity ([^,]+),/.exec(text)?.[1] ?? '');
  if (!q.ok) throw new Error(`no viscosity in: ${text}`);
  return q.value.si;
}

/** Figures of the row of `place` in the table that hover shows over the word that begins `line`. */
export function lineFigures(
  bench: Bench,
  line: string,
  place: string,
): { readonly flow: number; readonly velocity: number; readonly reynolds: number } {
  const text = shown(bench, line);
  const rows = text
    .split('\n')
    .filter((row) => row.startsWith('|'))
    .map((row) => row.split('|').map((cell) => cell.trim()));
  const head = rows[0] ?? [];
  const row = rows.find((cells) => cells[head.indexOf('Step')]?.startsWith(place));
  if (row === undefined) throw new Error(`no row ${place} in the hover of ${line}:\n${text}`);
  const cell = (title: string) => row[head.indexOf(title)] ?? '';
  const figure = (title: string) => {
    const q = parseQuantity(cell(title));
    if (!q.ok) throw new Error(`${title}: ${q.problem}`);
    return q.value.si;
  };
  return { flow: figure('Flow'), velocity: figure('Velocity'), reynolds: Number.parseFloat(cell('Reynolds number')) };
}
