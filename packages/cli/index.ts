/** The `oilway` command as a library: `main` runs it on given arguments and streams. */
export { main, start } from './main.ts';
export type { Exit, Output } from './commands/outcome.ts';
