/** Compares the program with SciPy and ngspice on the reference circuits; one line a circuit. */
import { spawnSync } from 'node:child_process';
import { readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { circuits, programOf, type Stated } from './program.ts';

/** Steady figures: relative, with 0.01 Pa for pressures about nothing. */
export const STEADY = 1e-6;
const NOTHING = 1e-8;
/** Times of steps: relative. */
const TIME = 2e-4;
/** Pressures at the ends of steps, MPa. */
const END = 1e-3;
/** What is stored for the quick test is what SciPy gives now. */
const STORED = 1e-9;

type Figures = Readonly<Record<string, number>>;
export interface Steady {
  readonly pressures: Figures;
  readonly speeds: Figures;
}
interface Reference extends Steady {
  readonly runs: readonly { readonly by: string; readonly time: number; readonly pressures: Figures }[];
}

/** Largest share of its tolerance that any figure takes, and words for those beyond it. */
export function steadyDifference(of: string, want: Steady, got: Steady, tolerance = STEADY): { worst: number; faults: string[] } {
  let worst = 0;
  const faults: string[] = [];
  for (const kind of ['pressures', 'speeds'] as const) {
    for (const [name, value] of Object.entries(want[kind])) {
      const found = got[kind][name] ?? Number.NaN;
      const off = Math.abs(found - value) / (Math.abs(value) + NOTHING / tolerance);
      if (!(off <= worst)) worst = off;
      if (!(off <= tolerance)) faults.push(`${of} ${name}: ${found}, reference ${value}`);
    }
  }
  return { worst, faults };
}

function referenceOf(python: string, circuit: string): Readonly<Record<string, Reference>> {
  const script = fileURLToPath(new URL('./reference.py', import.meta.url));
  const done = spawnSync(python, [script, circuit], { encoding: 'utf8', timeout: 300_000 });
  if (done.status !== 0) throw new Error(`the reference of circuit ${circuit} has no answer: ${done.stderr.slice(-600)}`);
  return (JSON.parse(done.stdout) as Record<string, Record<string, Reference>>)[circuit] ?? {};
}

function checkRun(step: string, reference: Reference, program: Stated, says: string[], faults: string[]): void {
  for (const run of reference.runs) {
    const off = Math.abs(program.time - run.time) / run.time;
    let end = 0;
    for (const [net, value] of Object.entries(run.pressures)) {
      const by = Math.abs((program.ends[net] ?? Number.NaN) - value);
      if (!(by <= end)) end = by;
    }
    says.push(
      `${step} ${program.time.toFixed(5)} s, ${run.by} ${run.time.toFixed(5)} s (${off.toExponential(1)}), ends ${end.toExponential(1)} MPa`,
    );
    if (!(off <= TIME)) faults.push(`${step} takes ${program.time} s, by ${run.by} ${run.time} s: ${off.toExponential(1)} off`);
    if (!(end <= END)) faults.push(`${step} ends ${end.toExponential(1)} MPa from ${run.by}`);
  }
}

/** Runs all; returns how many circuits disagree. */
export function compareAll(python: string): number {
  const stored = JSON.parse(readFileSync(new URL('../../reference/equations.json', import.meta.url), 'utf8')) as {
    readonly circuits: Readonly<Record<string, Readonly<Record<string, Steady>>>>;
  };
  let failed = 0;
  for (const circuit of circuits) {
    const says: string[] = [];
    const faults: string[] = [];
    let worst = 0;
    try {
      const program = programOf(circuit);
      const reference = referenceOf(python, circuit);
      if (Object.keys(reference).length === 0) faults.push('the reference has no steps');
      for (const [step, want] of Object.entries(reference)) {
        const got = program[step];
        if (got === undefined) {
          faults.push(`${step} is not a step of the program`);
          continue;
        }
        const steady = steadyDifference(step, want, got);
        worst = Math.max(worst, steady.worst);
        faults.push(...steady.faults);
        const kept = stored.circuits[circuit]?.[step];
        if (kept === undefined) faults.push(`${step} is not stored for the quick test`);
        else faults.push(...steadyDifference(`stored ${step}`, want, kept, STORED).faults);
        checkRun(step, want, got, says, faults);
      }
    } catch (error) {
      faults.push(error instanceof Error ? error.message : String(error));
    }
    if (faults.length > 0) failed++;
    console.log(
      `${faults.length > 0 ? 'FAIL' : 'ok  '} ${circuit}: steady ${worst.toExponential(1)}${says.map((one) => `; ${one}`).join('')}`,
    );
    for (const fault of faults) console.log(`       ${fault}`);
  }
  console.log(`${circuits.length - failed} passed, ${failed} failed`);
  return failed;
}
