/** Offsets to lines and columns and back: UTF-16, as editors count; CRLF, LF and CR end a line. */
import type { Position, Range } from 'vscode-languageserver-types';

export interface Span {
  readonly start: number;
  readonly end: number;
}

export class Lines {
  readonly #starts: number[];
  readonly #length: number;

  constructor(text: string) {
    const starts = [0];
    for (let i = 0; i < text.length; i += 1) {
      const code = text.charCodeAt(i);
      if (code === 10) starts.push(i + 1);
      else if (code === 13 && text.charCodeAt(i + 1) !== 10) starts.push(i + 1);
    }
    this.#starts = starts;
    this.#length = text.length;
  }

  get count(): number {
    return this.#starts.length;
  }

  /** Line (from 0) that holds the offset. */
  lineOf(offset: number): number {
    let low = 0;
    let high = this.#starts.length - 1;
    while (low < high) {
      const middle = (low + high + 1) >> 1;
      if ((this.#starts[middle] ?? 0) <= offset) low = middle;
      else high = middle - 1;
    }
    return low;
  }

  position(offset: number): Position {
    const inside = Math.max(0, Math.min(offset, this.#length));
    const line = this.lineOf(inside);
    return { line, character: inside - (this.#starts[line] ?? 0) };
  }

  range(span: Span): Range {
    return { start: this.position(span.start), end: this.position(span.end) };
  }

  offset(position: Position): number {
    const start = this.#starts[Math.max(0, position.line)];
    if (start === undefined) return this.#length;
    const next = this.#starts[position.line + 1] ?? this.#length;
    return Math.min(start + Math.max(0, position.character), next);
  }

  /** Offset of the line's first character. */
  start(line: number): number {
    return this.#starts[line] ?? this.#length;
  }
}
