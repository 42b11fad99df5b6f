/** A small make-believe machine for tests of the control's logic: speeds and pressures by a rule of the test, no physics. */
import type { Body, Circuit, Machine, MachineRun, RunReport, Setting, Solution, Stand, Watch } from '@oilway/circuit';

export interface Rule {
  /** m/s of each body as set. */
  velocity?(stands: Readonly<Record<string, Stand>>, position: number, body: string): number;
  /** Pa of each net, from stands, positions and the time since the stands last changed. */
  pressure?(net: string, stands: Readonly<Record<string, Stand>>, positions: Readonly<Record<string, number>>, since: number): number;
}

export interface Fake extends Machine {
  /** Settings solved so far. */
  readonly asked: Setting[];
}

export function fakeMachine(circuit: Circuit, rule: Rule, strokes: Readonly<Record<string, number>>): Fake {
  const bodies: Body[] = Object.entries(strokes).map(([id, stroke]) => ({
    id,
    actuators: [id],
    type: 'linear',
    stroke,
    begins: 0,
    sealFriction: 0,
    knots: [],
  }));
  const asked: Setting[] = [];
  const picture = (setting: Setting, since: number): Solution => {
    const positions = Object.fromEntries(bodies.map((one) => [one.id, setting.positions[one.id] ?? 0]));
    const velocities = Object.fromEntries(
      bodies.map((one) => {
        const x = positions[one.id]!;
        const v = setting.locked?.includes(one.id) ? 0 : (rule.velocity?.(setting.valves, x, one.id) ?? 0);
        const held = !setting.free?.includes(one.id) && ((v < 0 && x <= 0) || (v > 0 && x >= one.stroke));
        return [one.id, held ? 0 : v];
      }),
    );
    return {
      solved: true,
      pressures: Object.fromEntries(circuit.nets.map((net) => [net.id, rule.pressure?.(net.id, setting.valves, positions, since) ?? 0])),
      undetermined: {},
      flows: Object.fromEntries(bodies.map((one) => [`${one.id}.cap`, velocities[one.id]! * 3e-3])),
      openings: {},
      lifting: [],
      velocities,
      positions,
      forces: {},
      stopForces: {},
      shaft: {},
      oil: {},
      stands: setting.valves,
      bits: setting.bits,
      diagnosis: [],
      remarks: [],
      iterations: 1,
    };
  };
  const solve = (setting: Setting) => {
    asked.push(setting);
    return picture(setting, 1e9);
  };
  return {
    circuit,
    bodies,
    asked,
    assumptions: [],
    notComputed: {},
    heads: {},
    temperature: 318.15,
    solve,
    settle: solve,
    sensitivities: () => [],
    start: (setting) => fakeRun(setting, bodies, picture),
  };
}

function fakeRun(start: Setting, bodies: readonly Body[], picture: (setting: Setting, since: number) => Solution): MachineRun {
  let setting = start;
  let time = 0;
  let changed = 0;
  const statistics = { steps: 0, rejected: 0, newton: 0, events: 0 };
  const read = (watch: Watch, solution: Solution) =>
    watch.what === 'position'
      ? (solution.positions[watch.body] ?? 0)
      : watch.what === 'pressure'
        ? (solution.pressures[watch.net] ?? 0)
        : 0;
  return {
    get time() {
      return time;
    },
    now: () => picture(setting, time - changed),
    shift(valve, to) {
      setting = { ...setting, valves: { ...setting.valves, [valve]: to } };
      changed = time;
    },
    command(coil, to) {
      const { [coil]: _old, ...rest } = setting.commands;
      setting = { ...setting, commands: to === undefined ? rest : { ...rest, [coil]: to } };
    },
    drive(id, on) {
      setting = { ...setting, drives: { ...setting.drives, [id]: on } };
    },
    load(body, load) {
      setting = { ...setting, loads: { ...setting.loads, [body]: load } };
    },
    gasExponent: () => undefined,
    advance(until, watches, onStep): RunReport {
      const step = 1e-3;
      while (time < until - 1e-12) {
        const before = picture(setting, time - changed);
        const dt = Math.min(step, until - time);
        const positions: Record<string, number> = {};
        for (const one of bodies) {
          positions[one.id] = Math.min(one.stroke, Math.max(0, (before.positions[one.id] ?? 0) + dt * (before.velocities[one.id] ?? 0)));
        }
        setting = { ...setting, positions };
        time += dt;
        statistics.steps += 1;
        const after = picture(setting, time - changed);
        onStep?.(time, after);
        const fired = watches.flatMap((watch, index) => {
          const [a, b] = [read(watch, before), read(watch, after)];
          const crossed =
            watch.edge === 'rising' ? a < watch.threshold && b >= watch.threshold : a > watch.threshold && b <= watch.threshold;
          return crossed ? [index] : [];
        });
        if (fired.length > 0) {
          statistics.events += 1;
          return { time, fired, happened: [] };
        }
      }
      return { time, fired: [], happened: [] };
    },
    statistics,
  };
}
