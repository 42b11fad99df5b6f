/**
 * Latency of the bundled server over stdio: key to diagnostics at 1,000 lines, hover, completion. Printed, never asserted: a timed test
 * fails on a busy machine. Run: npx node tests/bench/latency.ts
 */
import { existsSync, readFileSync, rmSync } from 'node:fs';
import { join } from 'node:path';
import { bundleServer } from '../language-server/support/bundle.ts';
import { Client } from '../language-server/support/client.ts';

/** A circuit of so many lines: axes side by side on one supply. */
export function longCircuit(lines: number): string {
  const head = [
    'circuit Long',
    'fluid HM46 (grade 46, temperature 45 degC)',
    'reservoir R1 (volume 400 L)',
    'drive M1 (power 30 kW, speed 1450 rpm)',
    'pump P1 (displacement 80 cm3/rev, driven by M1, rated 250 bar)',
    'relief RV1 (set 160 bar, passes 200 L/min at 6 bar)',
    'suction R1 to P1',
    'working supply: P1 to RV1',
    'return RV1 to R1',
  ];
  const axis = (n: number): string[] => [
    `directional V${n} (4/3, centre closed, spring to centre, coil a SOL${n}A, coil b SOL${n}B, passes 40 L/min at 5 bar) "Axis ${n}"`,
    `throttle FC${n} (set 6 L/min, compensated, reverse check)`,
    `cylinder C${n} (bore 63 mm, rod 36 mm, stroke 200 mm, attitude level, rated 250 bar)`,
    `switch LS${n} (on C${n}, from 195 mm to 200 mm)`,
    `working supply to V${n}.P`,
    `working V${n}.A to C${n}.cap`,
    `working C${n}.rod to FC${n} to V${n}.B`,
    `return V${n}.T to R1`,
    `load C${n} (friction 200 N, resist 4 kN extending)`,
    '',
  ];
  const body: string[] = [];
  for (let n = 1; head.length + body.length < lines; n += 1) body.push(...axis(n));
  return `${[...head, ...body].slice(0, lines).join('\n')}\n`;
}

const quantile = (values: readonly number[], share: number): number =>
  [...values].sort((a, b) => a - b)[Math.min(values.length - 1, Math.floor(share * values.length))] ?? Number.NaN;
const line = (name: string, values: readonly number[]): void =>
  console.log(
    `${name.padEnd(42)} median ${quantile(values, 0.5).toFixed(1)} ms, p95 ${quantile(values, 0.95).toFixed(1)} ms (${values.length})`,
  );

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
console.log(`start to first diagnostics                 ${(performance.now() - began).toFixed(0)} ms`);
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
line('didChange to diagnostics', keys);
line('hover', hovers);
line('completion', completions);
console.log(`processor time a round (key, hover, completion) ${((processorTime(client.pid) - counted) / keys.length).toFixed(1)} ms`);
await client.stop();
rmSync(folder, { recursive: true, force: true });
