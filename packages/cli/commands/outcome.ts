/** What a command hands back: text for the two streams and the exit status. */

/** 0 clean, 1 findings (or requirements missed), 2 cannot run. */
export type Exit = 0 | 1 | 2;

export interface Output {
  out(line: string): void;
  err(line: string): void;
}

export function plural(count: number, one: string, many = `${one}s`): string {
  return `${count} ${count === 1 ? one : many}`;
}
