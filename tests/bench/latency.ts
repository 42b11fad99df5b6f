/**
 * Latency of the bundled server over stdio: key to diagnostics at 1,000 lines, hover, completion. Printed, never asserted: a timed test
 * fails on a busy machine. Part of `npm run bench`.
 */
import { existsSync, readFileSync, rmSync } from 'node:fs';
import { join } from 'node:path';
import { bundleServer } from '../language-server/support/bundle.ts';
import { Client } from '../language-server/support/client.ts';
import { longCircuit } from './long.ts';
import { emit, row } from './rows.ts';

/** Processor time the server has used so far, ms (Linux; elsewhere NaN): tells what a key costs on a machine that others use too. */
function processorTime(pid: number | undefined): number {
  const file = `/proc/${pid}/stat`;
  if (pid === undefined || !existsSync(file)) return Number.NaN;
  const fields = readFileSync(file, 'utf8')
    .replace(/^.*\) /, '')
    .split(' ');
  // Fields 14 and 15 of the line (user, system), in hundredths of a second.
  return 10 * (Number(fields[11]) + Number(fields[12]));
}

const folder = await bundleServer();
const began = performance.now();
const client = await Client.start(join(folder, 'server.cjs'), {
  initializationOptions: { settings: { compute: { enabled: process.argv.includes('--study') } } },
});
const uri = 'file:///bench/long.oilway';
await client.open(uri, longCircuit(Number(process.argv.find((one) => /^\d+$/.test(one)) ?? 1000)));
emit(row('server: start to first findings, 1,000 lines, study off', [performance.now() - began], 'ms'));
let counted = Number.NaN;
const keys: number[] = [];
const hovers: number[] = [];
const completions: number[] = [];
for (let round = 0; round < 40; round += 1) {
  const from = /stroke \d+ mm/.exec(client.text(uri))?.[0] ?? '';
  if (round === 10) counted = processorTime(client.pid);
  const t0 = performance.now();
  const version = client.edit(uri, from, `stroke ${200 + round} mm`);
  await client.diagnostics(uri, (one) => one.version === version);
  const t1 = performance.now();
  await client.hover(uri, 'cylinder C|10 ');
  const t2 = performance.now();
  await client.completion(uri, 'supply to |V10.P');
  const t3 = performance.now();
  // The first rounds warm the code up.
  if (round < 10) continue;
  keys.push(t1 - t0);
  hovers.push(t2 - t1);
  completions.push(t3 - t2);
}
emit(row('server: key to findings, 1,000 lines, study off', keys, 'ms'));
emit(row('server: hover', hovers, 'ms'));
emit(row('server: completion', completions, 'ms'));
const each = (processorTime(client.pid) - counted) / keys.length;
if (Number.isFinite(each)) emit(row('server: processor time of key, hover and completion together', [each], 'ms'));
await client.stop();
rmSync(folder, { recursive: true, force: true });
