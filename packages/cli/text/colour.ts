/** Colour on a terminal, none elsewhere. */

export interface Paint {
  error(text: string): string;
  warning(text: string): string;
  information(text: string): string;
  good(text: string): string;
  strong(text: string): string;
  faint(text: string): string;
}

const code = (on: string, off: string) => (text: string) => `\u001b[${on}m${text}\u001b[${off}m`;
const plain = (text: string) => text;

export const PLAIN: Paint = { error: plain, warning: plain, information: plain, good: plain, strong: plain, faint: plain };
export const COLOURED: Paint = {
  error: code('31', '39'),
  warning: code('33', '39'),
  information: code('36', '39'),
  good: code('32', '39'),
  strong: code('1', '22'),
  faint: code('2', '22'),
};

/** Colour is used when the output is a terminal, unless NO_COLOR (any value but the empty one) or a dumb terminal says no. */
export function paintFor(terminal: boolean, environment: Readonly<Record<string, string | undefined>>): Paint {
  const refused = (environment.NO_COLOR ?? '') !== '' || environment.TERM === 'dumb';
  return terminal && !refused ? COLOURED : PLAIN;
}
