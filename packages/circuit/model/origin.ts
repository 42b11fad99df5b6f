/** Where a datum stands in the text, so that any number and any finding can be traced to its characters. */
export interface Origin {
  /** URI of the document. */
  readonly uri: string;
  /** First character, UTF-16 offset from the document's start. */
  readonly start: number;
  /** One past the last character. */
  readonly end: number;
}

/** One replacement of text; `start === end` inserts. */
export interface TextChange {
  readonly uri: string;
  readonly start: number;
  readonly end: number;
  readonly text: string;
}
