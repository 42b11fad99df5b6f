/** Energy: in steady points the power of the pumps is what is lost in the components and what the loads get; over a run the same, with what is stored. */
import { type Circuit, type Point, read, type Run, type Study, study } from '@oilway/circuit';
import { describe, expect, it } from 'vitest';
import { circuitOf } from '../support/text.ts';

const HEAD = `circuit Bench
fluid HM46 (grade 46, temperature 45 degC)
reservoir R1 (volume 100 L)
drive M1 (power 15 kW, speed 1450 rpm)
pump P1 (displacement 16 cm3/rev, driven by M1, volumetric 93 %, mechanical 90 %, rated 210 bar)
relief RV1 (set 100 bar, passes 40 L/min at 4 bar)
cylinder C1 (bore 50 mm, rod 28 mm, stroke 300 mm, attitude level)
switch LS1 (on C1, from 295 mm to 300 mm)
switch LS2 (on C1, from 0 mm to 3 mm)
suction R1 to P1
`;
const CYCLE = `cycle Go {
  step Out energise SOL1 until LS1 on, at most 60 s
  step Back energise SOL2 until LS2 on, at most 60 s
}
`;
const VALVE =
  'directional V1 (4/3, centre tandem, spring to centre, coil a SOL1, coil b SOL2, passes 40 L/min at 5 bar)\nreturn V1.T, RV1 to R1\n';

/** Machines in which every loss stands between two ports of the same flow, or in a pipe: nothing is stored but in the accumulator. */
const MACHINES: readonly { readonly name: string; readonly text: string }[] = [
  {
    name: 'plain',
    text: `${HEAD}${VALVE}working P1 to RV1, V1.P\nworking V1.A to C1.cap\nworking V1.B to C1.rod\nload C1 (resist 6 kN, friction 300 N)\n${CYCLE}`,
  },
  {
    name: 'flow control, most of the oil over the relief, pipes with losses',
    text: `${HEAD}${VALVE}throttle FC1 (set 4 L/min, compensated, reverse check)
check K1 (crack 1 bar, passes 40 L/min at 3 bar)
working P1 to K1
working K1 to RV1, V1.P
working V1.A to C1.cap (hose, bore 8 mm, length 4 m)
working C1.rod to FC1 to V1.B
load C1 (resist 5 kN, friction 200 N)
${CYCLE}`,
  },
  {
    name: 'a weight lowered through a counterbalance valve',
    text: `${HEAD}${VALVE}counterbalance CB1 (set 90 bar, ratio 3:1, passes 40 L/min at 6 bar)
working P1 to RV1, V1.P
working V1.A to CB1.V
working CB1.C to C1.cap
working V1.B to C1.rod
pilot V1.B to CB1.X
load C1 (mass 500 kg, friction 200 N)
${CYCLE}`.replace('attitude level', 'attitude rod up'),
  },
];

/** Pa, gauge at the port's net. */
const at = (circuit: Circuit, pressures: Readonly<Record<string, number>>, component: string, port: string): number => {
  const net = circuit.nets.find((one) => one.ports.some((p) => p.component === component && p.port === port));
  return net === undefined ? Number.NaN : (pressures[net.id] ?? 0);
};

/** Sum of p q over the ports of a component, W: what it takes from the oil. Negative: what it gives to the oil. */
const taken = (circuit: Circuit, point: Point, component: string): number =>
  Object.entries(point.flows).reduce((sum, [key, flow]) => {
    const dot = key.lastIndexOf('.');
    if (key.slice(0, dot) !== component) return sum;
    return sum + at(circuit, point.pressures, component, key.slice(dot + 1)) * flow;
  }, 0);

interface Balance {
  /** W the pumps give to the oil. */
  readonly pumps: number;
  /** W lost in valves, filters and pipes. */
  readonly lost: number;
  /** W taken by the actuators. */
  readonly actuators: number;
}
function balanceOf(circuit: Circuit, point: Point): Balance {
  let [pumps, lost, actuators] = [0, 0, 0];
  for (const one of circuit.components) {
    const watts = taken(circuit, point, one.id);
    if (one.kind === 'pump') pumps -= watts;
    else if (one.kind === 'cylinder') actuators += watts;
    else lost += watts;
  }
  for (const piece of circuit.pieces) {
    const flow = point.flows[piece.id];
    if (flow !== undefined) lost += flow * ((point.pressures[piece.nets[0]] ?? 0) - (point.pressures[piece.nets[1]] ?? 0));
  }
  return { pumps, lost, actuators };
}
const movingPoints = (result: Study): readonly Point[] =>
  result.steps.flatMap((one) =>
    one.points.filter(
      (point) =>
        point.solved &&
        point.diagnosis.length === 0 &&
        point.actuators.some((a) => Math.abs(a.velocity) > 1e-3) &&
        // Where the core adds oil against cavitation there is more than the circuit in the balance.
        Object.values(point.pressures).every((p) => p > -0.5e5),
    ),
  );

describe.each(MACHINES)('$name', ({ text }) => {
  const circuit = circuitOf(text);
  const result = study(circuit);
  const points = movingPoints(result);

  it('runs through', () => {
    expect(result.cycles[0]?.faults).toEqual([]);
    expect(points.length).toBeGreaterThanOrEqual(4);
  });
  it('pump power is losses and power of the actuators, to 1e-6', () => {
    for (const point of points) {
      const { pumps, lost, actuators } = balanceOf(circuit, point);
      expect(Math.abs(pumps)).toBeGreaterThan(1);
      expect(Math.abs(pumps - lost - actuators), point.label).toBeLessThan(1e-6 * Math.max(Math.abs(pumps), Math.abs(actuators)));
    }
  });
  it('no component gives energy to the oil but pumps and what a load drives', () => {
    for (const point of points) {
      for (const one of circuit.components) {
        if (one.kind === 'pump' || one.kind === 'cylinder') continue;
        // 1e-6 of the power of the pump, 15 kW at most.
        expect(taken(circuit, point, one.id), `${one.id} ${point.label}`).toBeGreaterThan(-1.5e-2);
      }
    }
  });
  it('the power of an actuator is the force on the load and the seal friction, at its speed, to 1e-6', () => {
    const seal = 3e5 * Math.PI * 0.025 ** 2;
    for (const point of points) {
      const { actuators } = balanceOf(circuit, point);
      const rod = point.actuators[0]!;
      const given = rod.force * rod.velocity + seal * Math.abs(rod.velocity);
      expect(Math.abs(actuators - given), point.label).toBeLessThan(1e-6 * Math.abs(actuators) + 1e-6);
    }
  });
  it('shaft power is pump power over the mechanical share, with what leaks inside', () => {
    const pump = circuit.components.find((one) => one.id === 'P1')!;
    const [mechanical, volumetric] = [read.si(pump, 'mechanical')!, read.si(pump, 'volumetric')!];
    const theory = (16e-6 * 1450) / 60;
    for (const point of points) {
      const dp = at(circuit, point.pressures, 'P1', 'P') - at(circuit, point.pressures, 'P1', 'S');
      const leak = (1 - volumetric) * theory * (dp / 210e5);
      const displaced = -(point.flows['P1.P'] ?? 0) + leak;
      // The core lets 1e-6 L/s a MPa pass wherever there is pressure, so that no volume is without a way out.
      expect(Math.abs(displaced - theory)).toBeLessThan(1.1e-15 * dp + 1e-12);
      expect(Math.abs(point.power.P1! - (displaced * dp) / mechanical)).toBeLessThan(2e-5 * point.power.P1!);
    }
  });
  it('over the run: shafts = work given to the loads + heat, as summed from the samples', () => {
    const cycle = result.cycles[0]!;
    const run = cycle.run!;
    const { shaft, work, time } = summed(run, circuit);
    // Up to 400 samples are kept of the run; the ends of every event are among them, and the figures are linear between them but for
    // the moments in which a valve shifts (50 ms each, where pressures bend): 2 % of the energy of the shafts.
    const bound = 0.02 * shaft;
    expect(time).toBeCloseTo(cycle.time!, 6);
    expect(Math.abs(cycle.duty.M1!.mean * time - shaft)).toBeLessThan(bound);
    expect(Math.abs(cycle.work! * time - work)).toBeLessThan(bound);
    expect(Math.abs((cycle.heat! + cycle.work!) * time - shaft)).toBeLessThan(bound);
    expect(cycle.heat!).toBeGreaterThan(0);
  });
});

/** Energies by trapezoids over the samples handed on, J: of the shafts, and of the chambers less seal friction. */
function summed(run: Run, circuit: Circuit): { readonly shaft: number; readonly work: number; readonly time: number } {
  const cap = Math.PI * 0.025 ** 2;
  const rod = Math.PI * (0.025 ** 2 - 0.014 ** 2);
  const net = (port: string) => circuit.nets.find((one) => one.ports.some((p) => p.component === 'C1' && p.port === port))!.id;
  const [a, b, x, v] = [run.pressures[net('cap')]!, run.pressures[net('rod')]!, run.positions.C1!, run.velocities.C1!];
  let [shaft, work] = [0, 0];
  const force = (i: number): number => a[i]! * cap - b[i]! * rod - 3e5 * cap * Math.sign(v[i]!);
  for (let i = 0; i + 1 < run.times.length; i += 1) {
    shaft += ((run.times[i + 1]! - run.times[i]!) * (run.power.M1![i]! + run.power.M1![i + 1]!)) / 2;
    work += ((x[i + 1]! - x[i]!) * (force(i) + force(i + 1))) / 2;
  }
  return { shaft, work, time: run.times.at(-1)! };
}
