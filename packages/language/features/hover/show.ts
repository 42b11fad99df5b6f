/** Figures as this circuit shows them, and small pieces of Markdown. */
import { format, formatNumber, type Dimension, type FormatOptions } from '@oilway/quantity';
import type { Circuit } from '@oilway/circuit';

export class Show {
  readonly #options: FormatOptions;

  constructor(circuit: Pick<Circuit, 'display' | 'units'>) {
    this.#options = { display: circuit.display, units: circuit.units };
  }

  /** SI value with its unit. */
  figure(si: number | undefined, dimension: Dimension, options: FormatOptions = {}): string {
    return si === undefined ? '—' : format(si, dimension, { ...this.#options, ...options });
  }

  position(si: number | undefined, dimension: Dimension = 'length'): string {
    return this.figure(si, dimension, { position: true });
  }

  /** `9.9 to 10.1 mm/s`; one value where the two are within 1 %. */
  span(low: number, high: number, dimension: Dimension): string {
    if (Math.abs(high - low) <= 0.01 * Math.max(Math.abs(low), Math.abs(high)))
      return this.figure(Math.abs(low) > Math.abs(high) ? low : high, dimension);
    const number = formatNumber(low, dimension, this.#options);
    const most = this.figure(high, dimension);
    // What reads alike is one value.
    return number === formatNumber(high, dimension, this.#options) ? most : `${number} to ${most}`;
  }

  /** `17.3 of 250 bar`: the first number without its unit. */
  of(have: number, need: number, dimension: Dimension): string {
    return `${formatNumber(have, dimension, this.#options)} of ${this.figure(need, dimension)}`;
  }

  /** `17.3 / 9.25 kN`: the first number without its unit. */
  against(have: number, need: number, dimension: Dimension): string {
    return `${formatNumber(have, dimension, this.#options)} / ${this.figure(need, dimension)}`;
  }
}

/** Text that Markdown must not read as marks. */
export function literal(text: string): string {
  return text.replace(/[\\`*_[\]<>|]/g, (mark) => `\\${mark}`);
}

/** A table; a column that is empty in every row is left out. */
export function table(head: readonly string[], rows: readonly (readonly string[])[]): string {
  const used = head.map((_, column) => column === 0 || rows.some((row) => (row[column] ?? '') !== '' && row[column] !== '—'));
  const line = (cells: readonly string[]): string =>
    `| ${cells
      .filter((_, column) => used[column])
      // A number and its unit stay on one line of the narrow table; text to be copied keeps its spaces.
      .map((cell) => (cell.includes('`') ? cell : cell.replace(/(\d) (?=\S)/g, '$1\u00a0')).replace(/\|/g, '\\|'))
      .join(' | ')} |`;
  return [line(head), line(head.map(() => '---')), ...rows.map(line)].join('\n');
}

/** Paragraphs of Markdown, empty ones left out. */
export function paragraphs(...parts: readonly (string | undefined)[]): string {
  return parts.filter((part) => part !== undefined && part !== '').join('\n\n');
}

/** `a, b and c` */
export function list(words: readonly string[]): string {
  if (words.length <= 1) return words[0] ?? '';
  return `${words.slice(0, -1).join(', ')} and ${words.at(-1)}`;
}
