/**
 * `npm run test:nets`: 2,000 random networks of the engine's generator and 200 random machines as texts. Each is solved, or refused with a reason in
 * words; no figure that is no number, and an end within its time. Ends with `N passed, M failed`. `NETS`, `MACHINES`, `FROM` (first seed) change the counts.
 */
import { type Circuit, type Study, study } from '@oilway/circuit';
import { compile, solveSteady, Transient } from '@oilway/engine';
import { analyse } from '@oilway/language';
import { runRules } from '@oilway/rules';
import { notNumbers } from '../../circuit/properties/support/numbers.ts';
import { nastyNet, random } from '../../engine/nets.ts';
import { randomMachine } from './machines.ts';

const NETS = Number(process.env.NETS ?? 2000);
const MACHINES = Number(process.env.MACHINES ?? 200);
const FROM = Number(process.env.FROM ?? 1);
/** Longest time of one network and of one machine, ms: many times what they need on a slow computer. */
const NET_TIME = 20_000;
const MACHINE_TIME = 60_000;
/** A reason has at least this many letters, more than one word, and no figure that is no number. */
const REASON = 20;

const isReason = (words: string | undefined): boolean =>
  words !== undefined && words.length > REASON && / /.test(words) && notNumbers(words).length === 0;
const allNumbers = (...lists: readonly Iterable<number>[]): boolean => lists.every((list) => [...list].every(Number.isFinite));

let passed = 0;
const failures: string[] = [];
const counts = new Map<string, number>();
const count = (what: string): void => void counts.set(what, (counts.get(what) ?? 0) + 1);

function judge(name: string, time: number, check: () => readonly string[]): void {
  const began = Date.now();
  let wrong: readonly string[];
  try {
    wrong = check();
  } catch (error) {
    wrong = [error instanceof Error ? (error.stack ?? error.message) : String(error)];
  }
  const spent = Date.now() - began;
  if (spent > time) wrong = [...wrong, `took ${spent} ms of at most ${time} ms`];
  if (wrong.length === 0) passed += 1;
  else failures.push(`${name}: ${wrong.slice(0, 3).join('; ')}`);
}

/** Steady state, then two seconds with valves and pumps switched. */
function network(seed: number): readonly string[] {
  const made = nastyNet(seed);
  const net = compile(made.spec);
  net.parameters.set(made.parameters);
  const request = { positions: made.positions, loads: made.loads, gas: made.gas, locked: made.locked };
  const result = solveSteady(net, request);
  if (!allNumbers(result.pressures, result.velocities, result.flows, result.stopForces))
    return ['a figure of the steady state is no number'];
  if (!result.converged) {
    count('networks refused in steady state');
    const reason = result.diagnosis.find((one) => one.kind === 'NO EQUILIBRIUM');
    if (reason?.kind !== 'NO EQUILIBRIUM' || !isReason(reason.why)) return ['refused without a reason'];
  } else count('networks solved in steady state');
  const next = random(seed * 7 + 1);
  const run = new Transient(net, request, result, { dynamics: seed % 2 === 0, maxSteps: 3000 });
  const switched = made.spec.elements.flatMap((one) =>
    one.type === 'path' && one.opening !== undefined ? [one.opening] : one.type === 'pump' ? [one.running] : [],
  );
  for (let instant = 1; instant <= 2; instant += 1) {
    const parameter = switched[Math.floor(next() * switched.length)];
    if (parameter !== undefined)
      run.ramp(parameter, run.parameters[parameter]!, next() < 0.5 ? 1 : 0, run.time, run.time + (next() < 0.3 ? 0 : 0.05));
    const report = run.advance(instant);
    const now = run.now();
    if (!allNumbers(now.pressures, now.velocities, now.flows, run.positions)) return ['a figure of the run is no number'];
    if (report.failed === undefined) continue;
    count('runs of networks refused');
    return isReason(report.failed) ? [] : ['the run ended without a reason'];
  }
  count('runs of networks to their end');
  return [];
}

/** The whole way from the text: findings, states, the cycle, requirements. */
function machine(seed: number): readonly string[] {
  const text = randomMachine(seed);
  const wrong: string[] = [];
  let circuit: Circuit | undefined;
  const end = Date.now() + MACHINE_TIME;
  let cut = false;
  const { documents } = analyse([{ uri: `random-${seed}.oilway`, text }], {
    study: (one): Study => {
      circuit = one;
      return study(one, {
        cancelled: () => {
          cut ||= Date.now() > end;
          return cut;
        },
      });
    },
    rules: (context) => {
      const { findings, failed = [] } = runRules(context);
      wrong.push(...failed.map((one) => `rule ${one.code}: ${one.why}`));
      return findings;
    },
  });
  const done = documents[0]!;
  if (done.failed !== undefined) return [...wrong, done.failed];
  const result = done.study;
  if (circuit === undefined || result === undefined) return [...wrong, 'not computed at all'];
  if (cut) wrong.push(`does not come to an end in ${MACHINE_TIME} ms`);
  // Generated texts are valid: what is told of them is told by rules and study, never by the grammar.
  const misread = done.findings.filter((one) => ['VALUE', 'NAME', 'SYNTAX', 'CHAIN', 'M07', 'M08'].includes(one.code));
  wrong.push(...misread.map((one) => `${one.code} ${one.what}`));
  wrong.push(...notNumbers(result).slice(0, 3), ...notNumbers(done.findings).slice(0, 3));
  const points = [
    ...result.states.flatMap((one) => one.variants.map((variant) => variant.point)),
    ...result.steps.flatMap((one) => one.points),
  ];
  if (points.length === 0) wrong.push('nothing was studied');
  for (const point of points) {
    count(point.solved ? 'points solved' : 'points refused');
    if (point.solved) continue;
    const reason = point.diagnosis.find((one) => one.kind === 'NO EQUILIBRIUM');
    if (reason?.kind !== 'NO EQUILIBRIUM' || !isReason(reason.why)) wrong.push(`${point.label}: refused without a reason`);
    if (!done.findings.some((one) => one.code === 'NOT-COMPUTED')) wrong.push(`${point.label}: not solved, and nothing says so`);
  }
  for (const cycle of result.cycles) {
    if (cycle.completed) {
      count('cycles run through');
      if (!(cycle.time! > 0)) wrong.push(`${cycle.id} takes no time and says nothing of it`);
      const energy = Object.values(cycle.duty).reduce((sum, one) => sum + one.mean, 0);
      if (Math.abs(energy - cycle.heat! - cycle.work!) > 1e-6 * Math.max(1, energy))
        wrong.push(`${cycle.id}: shafts are not heat and work`);
    } else {
      count(`cycles ended: ${cycle.faults[0]?.kind ?? 'without a reason'}`);
      if (!cycle.faults.some((one) => isReason(one.words))) wrong.push(`${cycle.id} ends without a reason`);
    }
  }
  if (result.requirements.length !== circuit.requirements.length) wrong.push('a requirement is not answered');
  return wrong;
}

const began = Date.now();
for (let seed = FROM; seed < FROM + NETS; seed += 1) judge(`network ${seed}`, NET_TIME, () => network(seed));
console.log(`${NETS} networks in ${((Date.now() - began) / 1000).toFixed(0)} s`);
const later = Date.now();
for (let seed = FROM; seed < FROM + MACHINES; seed += 1) judge(`machine ${seed}`, 2 * MACHINE_TIME, () => machine(seed));
console.log(`${MACHINES} machines in ${((Date.now() - later) / 1000).toFixed(0)} s`);
for (const [what, many] of [...counts].sort()) console.log(`${String(many).padStart(8)} ${what}`);
for (const one of failures) console.log(`FAILED ${one}`);
console.log(`${passed} passed, ${failures.length} failed`);
process.exitCode = failures.length === 0 ? 0 : 1;
