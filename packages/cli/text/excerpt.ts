/** The line a finding stands on, with its characters underlined. */
import type { Origin } from '@oilway/circuit';
import type { LineTable } from './position.ts';

/** Longest excerpt shown; a longer line is cut around the place. */
const WIDTH = 120;

/** Two lines: the source line with its number, and carets under the range (a range over several lines is underlined to its first line's end). */
export function excerpt(lines: LineTable, origin: Pick<Origin, 'start' | 'end'>, gutter: number, mark: (text: string) => string): string[] {
  const from = lines.at(origin.start);
  const to = lines.at(Math.max(origin.start, origin.end));
  const source = lines.line(from.line);
  const first = from.column - 1;
  const last = Math.max(first + 1, to.line === from.line ? to.column - 1 : source.length);
  const cut = Math.max(0, Math.min(first - 20, source.length - WIDTH));
  const shown = source.slice(cut, cut + WIDTH);
  // Tabs stay tabs so that the carets stand under their characters at any tab width.
  const lead = source.slice(cut, first).replace(/[^\t]/g, ' ');
  const carets = '^'.repeat(Math.max(1, Math.min(last, cut + WIDTH) - first));
  const number = String(from.line).padStart(gutter);
  return [`${number} | ${shown}`, `${' '.repeat(gutter)} | ${lead}${mark(carets)}`];
}

/** Width of the line numbers of some places. */
export function gutterFor(lines: LineTable, offsets: readonly number[]): number {
  return Math.max(3, ...offsets.map((offset) => String(lines.at(offset).line).length));
}
