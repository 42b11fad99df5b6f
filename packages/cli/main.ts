/** The `oilway` command: reads its arguments, runs one command, sets the exit status. */
// First: what follows may use it while it is loaded.
import './older-node.ts';
import { parseArgs } from 'node:util';
import { check } from './commands/check.ts';
import { explain } from './commands/explain.ts';
import type { Exit, Output } from './commands/outcome.ts';
import { run } from './commands/run.ts';
import { HELP } from './help.ts';
import { paintFor } from './text/colour.ts';
import { COMMAND_VERSION } from './version.ts';

const OPTIONS = {
  help: { type: 'boolean', short: 'h' },
  version: { type: 'boolean' },
  format: { type: 'string' },
  cycle: { type: 'string' },
  accepted: { type: 'boolean' },
  limit: { type: 'string' },
} as const;

interface Arguments {
  readonly values: { help?: boolean; version?: boolean; format?: string; cycle?: string; accepted?: boolean; limit?: string };
  readonly positionals: readonly string[];
}

function readArguments(args: readonly string[]): Arguments | string {
  try {
    return parseArgs({ args: [...args], options: OPTIONS, allowPositionals: true, strict: true });
  } catch (error) {
    return error instanceof Error ? (error.message.split('. ')[0] ?? error.message) : String(error);
  }
}

/** Options that belong to another command are a mistake worth saying. */
const TAKEN: Readonly<Record<string, readonly string[]>> = {
  check: ['format', 'accepted', 'limit'],
  run: ['format', 'cycle', 'limit'],
  explain: [],
};

export async function main(args: readonly string[], output: Output): Promise<Exit> {
  const refuse = (why: string): Exit => {
    output.err(`oilway: ${why}; see oilway --help`);
    return 2;
  };
  const read = readArguments(args);
  if (typeof read === 'string') return refuse(read);
  const { values, positionals } = read;
  if (values.help) {
    output.out(HELP.trimEnd());
    return 0;
  }
  if (values.version) {
    output.out(COMMAND_VERSION);
    return 0;
  }
  const [command, ...rest] = positionals;
  if (command === undefined) return refuse('no command given (check, run, explain)');
  const taken = TAKEN[command];
  if (taken === undefined) return refuse(`there is no command ${command} (check, run, explain)`);
  for (const option of Object.keys(values)) if (!taken.includes(option)) return refuse(`${command} does not take --${option}`);
  const paint = paintFor(process.stdout.isTTY === true, process.env);
  if (command === 'explain') {
    if (rest.length > 1) return refuse('explain takes one code or word');
    return explain(rest[0], output, paint);
  }
  const formats = command === 'check' ? ['text', 'json'] : ['text', 'json', 'csv'];
  const format = values.format ?? 'text';
  if (!formats.includes(format)) return refuse(`${command} has no format ${format} (${formats.join(', ')})`);
  const seconds = values.limit === undefined ? undefined : Number(values.limit);
  if (seconds !== undefined && !(seconds > 0)) return refuse(`--limit takes seconds, not ${values.limit}`);
  const limit = seconds === undefined ? {} : { limit: seconds };
  if (command === 'check') {
    return check(
      { paths: rest.length === 0 ? ['.'] : rest, format: format as 'text' | 'json', accepted: values.accepted === true, ...limit },
      output,
      paint,
    );
  }
  const [path, ...more] = rest;
  if (path === undefined || more.length > 0) return refuse('run takes one file');
  return run(
    { path, format: format as 'text' | 'json' | 'csv', ...(values.cycle === undefined ? {} : { cycle: values.cycle }), ...limit },
    output,
    paint,
  );
}

/** Runs the command on the process's own streams. */
export async function start(): Promise<void> {
  // A reader that closes early (a pager, head) is no fault.
  process.stdout.on('error', (error: NodeJS.ErrnoException) => {
    if (error.code !== 'EPIPE') throw error;
  });
  const output: Output = {
    out: (line) => void process.stdout.write(`${line}\n`),
    err: (line) => void process.stderr.write(`${line}\n`),
  };
  try {
    process.exitCode = await main(process.argv.slice(2), output);
  } catch (error) {
    output.err(`oilway: internal error, please report it: ${error instanceof Error ? (error.stack ?? error.message) : String(error)}`);
    process.exitCode = 2;
  }
}
