/** Offsets to lines and columns, for messages. */

export interface Place {
  /** From 1. */
  readonly line: number;
  /** From 1, in UTF-16 units as editors count. */
  readonly column: number;
}

/** Line and column of offsets in one text. */
export class LineTable {
  readonly #text: string;
  readonly #starts: number[] = [0];

  constructor(text: string) {
    this.#text = text;
    for (let i = 0; i < text.length; i++) {
      const char = text[i];
      if (char === '\n' || (char === '\r' && text[i + 1] !== '\n')) this.#starts.push(i + 1);
    }
  }

  /** The place of an offset; offsets outside the text count as its nearest end. */
  at(offset: number): Place {
    const inside = Math.min(Math.max(0, offset), this.#text.length);
    let low = 0;
    let high = this.#starts.length - 1;
    while (low < high) {
      const middle = (low + high + 1) >> 1;
      if ((this.#starts[middle] ?? 0) <= inside) low = middle;
      else high = middle - 1;
    }
    return { line: low + 1, column: inside - (this.#starts[low] ?? 0) + 1 };
  }

  /** The text of a line (from 1) without its end. */
  line(number: number): string {
    const start = this.#starts[number - 1];
    if (start === undefined) return '';
    return this.#text.slice(start, this.#starts[number] ?? this.#text.length).replace(/[\r\n]+$/, '');
  }
}
