/** Solving with memory: unloading valves that have lifted, burst valves that have shut, piloted valves that lack pilot pressure. */
import type { Assembled } from './assembled.ts';
import type { Memory, PilotedValve } from './assembly.ts';
import type { Setting, Solution, Stand } from './machine.ts';
import { BAR, LITRE_PER_MINUTE } from './units.ts';

type Solve = (setting: Setting, near?: Solution) => Solution;

/** Share of `needs` above which a shifted piloted valve stays (common practice, from memory). */
export const STAYS = 0.6;
const MOST_TURNS = 12;
/** Below this, Pa, a threshold counts as reached: the solver's own closeness. */
const REACHED = 50;

const shown = (pa: number): string => {
  const bar = pa / BAR;
  return Math.abs(bar) < 10 ? bar.toFixed(1) : bar.toFixed(0);
};

/** `base` is the solve that `solution` was made of. */
export function settleMachine(
  assembled: Assembled,
  solve: Solve,
  wanted: Setting,
  near?: Solution,
): { readonly solution: Solution; readonly base: Solution } {
  const remarks: { of: string; words: string }[] = [];
  let setting = wanted;
  // Piloted valves first stand as they stood; they shift when the pilot pressure seen there is enough.
  const pending = assembled.piloted.filter((v) => {
    const asked = wanted.valves[v.component];
    const rest = restOf(assembled, v);
    if (asked === undefined || asked.position === rest) return false;
    return near?.stands[v.component]?.position !== asked.position;
  });
  if (pending.length > 0) {
    const stands: Record<string, Stand> = { ...setting.valves };
    for (const v of pending) stands[v.component] = near?.stands[v.component] ?? { position: restOf(assembled, v) };
    setting = { ...setting, valves: stands };
  }
  let { solution, bits } = withBits(assembled, solve, setting, near, remarks);
  if (pending.length > 0) {
    const stands: Record<string, Stand> = { ...setting.valves };
    for (const v of pending) {
      const pilot = pilotOf(assembled, v, solution);
      const asked = wanted.valves[v.component];
      if (pilot >= v.needs - REACHED && asked !== undefined) stands[v.component] = asked;
      else remarks.push({ of: v.component, words: `${v.component} cannot shift: ${shown(pilot)} of ${shown(v.needs)} bar` });
    }
    setting = { ...setting, valves: stands };
    ({ solution, bits } = withBits(assembled, solve, { ...setting, bits }, solution, remarks));
  }
  for (let pass = 0; pass < assembled.piloted.length; pass++) {
    const fallen = assembled.piloted.filter((v) => {
      const stand = setting.valves[v.component];
      return stand !== undefined && stand.position !== restOf(assembled, v) && pilotOf(assembled, v, solution) < STAYS * v.needs - REACHED;
    });
    if (fallen.length === 0) break;
    const stands: Record<string, Stand> = { ...setting.valves };
    for (const v of fallen) {
      remarks.push({
        of: v.component,
        words: `${v.component} does not stay shifted: ${shown(pilotOf(assembled, v, solution))} of ${shown(STAYS * v.needs)} bar`,
      });
      stands[v.component] = { position: restOf(assembled, v) };
    }
    setting = { ...setting, valves: stands };
    ({ solution, bits } = withBits(assembled, solve, { ...setting, bits }, solution, remarks));
  }
  return { solution: remarks.length === 0 ? solution : { ...solution, remarks: [...solution.remarks, ...remarks] }, base: solution };
}

const restOf = (assembled: Assembled, v: PilotedValve): Stand['position'] =>
  assembled.valves.find((x) => x.component === v.component)?.rest ?? 'centre';

/** Pressure at a node, Pa, from a solution in net names; a node without a net counts as without pressure. */
function at(assembled: Assembled, node: number, solution: Solution): number {
  const net = assembled.netOf.get(node);
  return net === undefined ? 0 : (solution.pressures[net] ?? 0);
}
export const pilotOf = (assembled: Assembled, v: PilotedValve, solution: Solution): number =>
  at(assembled, v.pilot, solution) - at(assembled, v.drain, solution);

/** Which way a bit wants to turn at this solution; undefined: it stays. */
export function turned(assembled: Assembled, m: Memory, on: boolean, solution: Solution): boolean | undefined {
  if (m.kind === 'lifted') {
    const z = at(assembled, m.pilot, solution) - at(assembled, m.drain, solution);
    if (!on && z >= m.set + m.band - REACHED) return true;
    if (on && z <= m.closes + REACHED) return false;
    return undefined;
  }
  if (m.kind === 'held') {
    const sum = m.pilots.reduce((total, x) => total + x.weight * at(assembled, x.node, solution), 0);
    return on && sum > m.crack ? false : undefined;
  }
  if (!on && (solution.flows[`${m.component}.C`] ?? 0) > m.closes * (1 + 1e-9)) return true;
  if (on && at(assembled, m.v, solution) >= at(assembled, m.c, solution) - REACHED) return false;
  return undefined;
}

function withBits(
  assembled: Assembled,
  solve: Solve,
  setting: Setting,
  near: Solution | undefined,
  remarks: { of: string; words: string }[],
): { solution: Solution; bits: Readonly<Record<string, boolean>> } {
  const bits: Record<string, boolean> = { ...setting.bits };
  for (const m of assembled.memories) {
    if (m.kind !== 'held') bits[m.component] ??= false;
    if (m.kind === 'held' && setting.bits[m.component] === undefined) bits[m.component] = (near?.openings[m.component] ?? 0) <= 0;
  }
  const turns = new Map<string, number>();
  const frozen = new Set<string>();
  let solution = solve({ ...setting, bits }, near);
  for (let pass = 0; pass < MOST_TURNS; pass++) {
    let changed = false;
    for (const m of assembled.memories) {
      if (frozen.has(m.component)) continue;
      const to = turned(assembled, m, bits[m.component] === true, solution);
      if (to === undefined) continue;
      const n = (turns.get(m.component) ?? 0) + 1;
      turns.set(m.component, n);
      bits[m.component] = to;
      changed = true;
      // On, off, and on again: neither state holds.
      if (n >= 3) {
        frozen.add(m.component);
        if (m.kind === 'lifted')
          remarks.push({ of: m.component, words: `${m.component} hunts between ${shown(m.closes)} and ${shown(m.set)} bar` });
        else if (m.kind === 'shut')
          remarks.push({
            of: m.component,
            words: `${m.component} shuts and opens again at ${(m.closes / LITRE_PER_MINUTE).toPrecision(3)} L/min`,
          });
      }
    }
    if (!changed) break;
    solution = solve({ ...setting, bits: { ...bits } }, solution);
  }
  for (const m of assembled.memories) {
    if (m.kind === 'shut' && bits[m.component] === true && !frozen.has(m.component) && !remarks.some((r) => r.of === m.component)) {
      remarks.push({ of: m.component, words: `${m.component} has shut` });
    }
  }
  return { solution, bits };
}
