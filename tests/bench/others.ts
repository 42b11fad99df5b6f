/**
 * The program against general-purpose software on reference circuit 07 (rapid traverse and feed, quasi-static, tolerance 1e-4), in one run.
 * Counted of the program: start at rest, control, switches, samples and the integration. Part of `npm run bench`; never fails.
 */
import { spawnSync } from 'node:child_process';
import { readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { assemble } from '@oilway/circuit';
import { analyseText } from '@oilway/language';
import { runCycle } from '../../packages/circuit/study/cycle.ts';
import { plantOf } from '../../packages/circuit/study/scene.ts';
import { emit, median, row, spent } from './rows.ts';

const WARM = 150;
const COUNTED = 30;
/** So many runs together: the clock of the processor is coarse. */
const TOGETHER = 5;
const ROUNDS = 3;
const ASKED = [
  { by: 'ngspice', what: 'circuit 07 against ngspice transient', target: 25 },
  { by: 'Radau', what: 'circuit 07 against SciPy Radau', target: 100 },
  { by: 'CVODE', what: 'circuit 07 against CVODE in C', target: 1 },
] as const;

const uri = 'file:///07.oilway';
const { circuit } = analyseText({ uri, text: readFileSync(new URL('../slow/reference/circuits/07.oilway', import.meta.url), 'utf8') });
const cycle = circuit.cycles[0];
if (cycle === undefined) throw new Error('circuit 07 has no cycle');
const machine = assemble(circuit);
const own: number[] = [];
let ends: number[] = [];
const run = (): void => {
  const ran = runCycle(plantOf(circuit, machine), cycle);
  ends = (ran.result.run?.steps ?? []).map((one) => one.to - one.from);
};
for (let round = 0; round < WARM; round += 1) run();
for (let round = 0; round < COUNTED; round += 1) {
  const began = spent();
  for (let k = 0; k < TOGETHER; k += 1) run();
  own.push((spent() - began) / TOGETHER);
}
emit(row('circuit 07, two steps, warm', own, 'ms', { note: `steps end after ${ends.map((end) => end.toFixed(4)).join(' and ')} s` }));

const python = ['/usr/bin/python3', 'python3'].find(
  (one) => spawnSync(one, ['-c', 'import scipy.integrate'], { stdio: 'ignore' }).status === 0,
);
type Answer = { readonly seconds: readonly number[]; readonly ends: readonly number[] } | { readonly why: string };
function answersOf(): Readonly<Record<string, Answer>> {
  if (python === undefined) return Object.fromEntries(ASKED.map((one) => [one.by, { why: 'no Python with SciPy' }]));
  const folder = fileURLToPath(new URL('../output/bench/', import.meta.url));
  const script = fileURLToPath(new URL('./others.py', import.meta.url));
  const done = spawnSync(python, [script, folder, String(ROUNDS)], { encoding: 'utf8', timeout: 120_000 });
  if (done.status === 0) return JSON.parse(done.stdout) as Record<string, Answer>;
  const why = done.stderr.trim().split('\n').at(-1) ?? 'no answer in 120 s';
  return Object.fromEntries(ASKED.map((one) => [one.by, { why }]));
}
const answers = answersOf();
for (const { by, what, target } of ASKED) {
  const answer = answers[by] ?? { why: 'no answer' };
  if ('why' in answer) emit({ what, why: answer.why });
  else {
    const ratios = answer.seconds.map((s) => (1000 * s) / median(own));
    const note = `${(1000 * median(answer.seconds)).toPrecision(3)} ms; steps end after ${answer.ends.map((end) => end.toFixed(4)).join(' and ')} s`;
    emit(row(what, ratios, 'x', { target, atLeast: true, note }));
  }
}
