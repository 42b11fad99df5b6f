/** The items of a property, read one after the other: small words, names, values, texts, groups. */
import type { Origin } from '@oilway/circuit';
import type { Entry, Group, Item, Property, Ref, Value } from '../generated/ast.ts';
import type { Context } from './context.ts';

export type Piece =
  | { readonly is: 'word'; readonly word: string; readonly origin: Origin }
  /** A bare name: word, constant or component, as the schema says. */
  | { readonly is: 'name'; readonly words: readonly string[]; readonly ref: Ref; readonly value: Value; readonly origin: Origin }
  | { readonly is: 'value'; readonly value: Value; readonly other?: Value; readonly tolerance?: Value; readonly origin: Origin }
  | { readonly is: 'group'; readonly group: Group; readonly value: Value; readonly origin: Origin }
  | { readonly is: 'text'; readonly text: string; readonly origin: Origin }
  | { readonly is: 'wanted'; readonly origin: Origin };

/** A text without its quotation marks; a half-typed one lacks the second. */
export function unquoted(text: string | undefined): string {
  return (text ?? '').replace(/^"/, '').replace(/"$/, '');
}

function pieceOfValue(context: Context, item: { value?: Value; other?: Value; tolerance?: Value }, whole: Origin): Piece | undefined {
  const value = item.value;
  if (value === undefined) return undefined;
  const factor = value.terms?.[0]?.factors?.[0];
  const single =
    value.negative !== true &&
    value.terms?.length === 1 &&
    value.terms[0]?.factors?.length === 1 &&
    item.other === undefined &&
    item.tolerance === undefined;
  if (single && factor?.$type === 'RefValue' && factor.arguments === undefined && factor.ref !== undefined) {
    return { is: 'name', words: context.wordsOf(factor.ref), ref: factor.ref, value, origin: context.origin(factor) };
  }
  if (single && factor?.$type === 'Group') return { is: 'group', group: factor, value, origin: context.origin(factor) };
  return {
    is: 'value',
    value,
    ...(item.other === undefined ? {} : { other: item.other }),
    ...(item.tolerance === undefined ? {} : { tolerance: item.tolerance }),
    origin: whole,
  };
}

function piecesOf(context: Context, items: readonly Item[]): Piece[] {
  const pieces: Piece[] = [];
  for (const item of items) {
    const origin = context.origin(item);
    if (item.$type === 'TextItem') pieces.push({ is: 'text', text: unquoted(item.text), origin });
    else if (item.$type === 'Wanted') pieces.push({ is: 'wanted', origin });
    else if (item.$type === 'SmallItem') {
      pieces.push({ is: 'word', word: item.word ?? '', origin: { ...origin, end: origin.start + (item.word ?? '').length } });
      const signed = item.signed === undefined ? undefined : pieceOfValue(context, { value: item.signed }, context.origin(item.signed));
      if (signed !== undefined) pieces.push(signed);
    } else {
      const piece = pieceOfValue(context, item, origin);
      if (piece !== undefined) pieces.push(piece);
    }
  }
  return pieces;
}

export class Items {
  private readonly pieces: readonly Piece[];
  private next = 0;
  /** The whole property, or the entry of a group. */
  readonly origin: Origin;

  constructor(context: Context, node: Property | Entry | { readonly pieces: readonly Piece[]; readonly origin: Origin }) {
    this.pieces = 'pieces' in node ? node.pieces : piecesOf(context, node.items ?? []);
    this.origin = 'pieces' in node ? node.origin : context.origin(node);
  }

  peek(ahead = 0): Piece | undefined {
    return this.pieces[this.next + ahead];
  }

  take(): Piece | undefined {
    return this.pieces[this.next++];
  }

  get rest(): readonly Piece[] {
    return this.pieces.slice(this.next);
  }

  get count(): number {
    return this.pieces.length;
  }

  /** Takes the small word if it stands next. */
  word(word: string): boolean {
    const piece = this.peek();
    if (piece?.is !== 'word' || piece.word !== word) return false;
    this.next++;
    return true;
  }

  /** A single word standing next, small or plain: `rod`, `in`, `centre`. */
  plainWord(ahead = 0): { readonly word: string; readonly origin: Origin } | undefined {
    const piece = this.peek(ahead);
    if (piece?.is === 'word') return { word: piece.word, origin: piece.origin };
    if (piece?.is === 'name' && piece.words.length === 1) return { word: piece.words[0] ?? '', origin: piece.origin };
    return undefined;
  }

  /** The values of the items from the next one on, for a value with a sum: see `Values`. */
  skip(count: number): void {
    this.next += count;
  }

  /** What is left and fits nowhere. */
  get leftover(): Origin | undefined {
    const first = this.peek();
    const last = this.pieces.at(-1);
    if (first === undefined || last === undefined) return undefined;
    return { ...first.origin, end: Math.max(first.origin.end, last.origin.end) };
  }

  /** Where the next item would stand: its place, or the end of what was read. */
  get here(): Origin {
    const piece = this.peek();
    return piece === undefined ? this.origin : piece.origin;
  }
}
