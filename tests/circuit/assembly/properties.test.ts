/** Properties that hold for every setting: what flows into a line flows out of it, units do not matter, mirrored circuits mirror, more gives more. */
import type { Machine, Setting, Solution } from '@oilway/circuit';
import fc from 'fast-check';
import { expect, test } from 'vitest';
import { HEAD_AND_FEED, LIFT, TWO_CYLINDERS } from '../support/machines.ts';
import { blank, load, machineOf } from '../support/text.ts';

const MACHINES: readonly {
  readonly machine: Machine;
  readonly valves: readonly string[];
  readonly stroke: Readonly<Record<string, number>>;
}[] = [
  { machine: machineOf(HEAD_AND_FEED), valves: ['V2'], stroke: { C2: 0.32 } },
  { machine: machineOf(LIFT), valves: ['V1'], stroke: { C1: 1.2 } },
  { machine: machineOf(TWO_CYLINDERS), valves: ['V1'], stroke: { C1: 0.05, C2: 0.2 } },
];

const settings = (index: number) => {
  const { valves, stroke } = MACHINES[index] as (typeof MACHINES)[number];
  return fc
    .record({
      stand: fc.constantFrom('a' as const, 'b' as const, 'centre' as const),
      open: fc.boolean(),
      share: fc.array(fc.double({ min: 0.01, max: 0.99, noNaN: true }), { minLength: 2, maxLength: 2 }),
      resist: fc.double({ min: 0, max: 40000, noNaN: true }),
      fixed: fc.double({ min: -40000, max: 20000, noNaN: true }),
      on: fc.boolean(),
      leakage: fc.boolean(),
    })
    .map((r): Setting => {
      const ids = Object.keys(stroke);
      return {
        ...blank,
        drives: { M1: r.on },
        valves: { ...Object.fromEntries(valves.map((v) => [v, { position: r.stand }])), V0: { position: r.open ? 'a' : 'b' } },
        positions: Object.fromEntries(ids.map((id, i) => [id, (stroke[id] ?? 0) * (r.share[i] ?? 0.5)])),
        loads: Object.fromEntries(ids.map((id) => [id, load(r.fixed, r.resist, 300)])),
        leakage: r.leakage,
      };
    });
};

/** Flow into everything at a net; a line with a loss of its own counts at both sides. */
function balance(machine: Machine, s: Solution): { readonly worst: number; readonly net: string; readonly scale: number } {
  let worst = 0;
  let name = '';
  let scale = 0;
  for (const net of machine.circuit.nets) {
    if (net.reservoir !== undefined) continue;
    let sum = 0;
    for (const p of net.ports) {
      const q = s.flows[`${p.component}.${p.port}`] ?? 0;
      sum += q;
      scale = Math.max(scale, Math.abs(q));
    }
    for (const piece of machine.circuit.pieces) {
      const q = s.flows[piece.id];
      if (q === undefined) continue;
      if (piece.nets[0] === net.id) sum += q;
      if (piece.nets[1] === net.id) sum -= q;
    }
    if (Math.abs(sum) > worst) {
      worst = Math.abs(sum);
      name = net.id;
    }
  }
  return { worst, net: name, scale };
}

test.each([0, 1, 2])('machine %d: what flows into a line flows out of it', (index) => {
  const machine = MACHINES[index]?.machine;
  if (machine === undefined) return;
  fc.assert(
    fc.property(settings(index), (setting) => {
      const s = machine.settle(setting);
      expect(s.solved).toBe(true);
      for (const p of Object.values(s.pressures)) expect(Number.isFinite(p)).toBe(true);
      // Where oil is missing (below -0.7 bar) or has no outlet the core adds or takes some, and says so.
      if (s.diagnosis.some((d) => d.kind !== 'CLOSED VOLUME') || Object.values(s.pressures).some((p) => p < -0.69e5)) return;
      const { worst, net, scale } = balance(machine, s);
      // 1e-9 of the largest flow, and what the solver leaves over where it stops: 1e-9 L/s a node.
      expect(worst, `${net} of ${JSON.stringify(setting)}`).toBeLessThan(1e-9 * scale + 3e-12);
    }),
    { numRuns: 60 },
  );
});

// 1 psi = 6894.757293168361 Pa, 1 US gal = 3.785411784 L, 1 in = 25.4 mm exactly, 1 lbf = 4.4482216152605 N.
const US = `fluid HM46 (grade 46, index 100, temperature 113 degF)
reservoir R1 (volume 20 gal)
drive M1 (power 10 hp, speed 1450 rpm)
pump P1 (displacement 2 in3/rev, driven by M1, volumetric 94 %, rated 3000 psi)
relief RV1 (set 2000 psi, passes 20 gpm at 80 psi)
directional V1 (4/3, centre tandem, spring to centre, coil a SOL1, coil b SOL2, passes 20 gpm at 75 psi)
throttle FC1 (set 1 gpm, compensated, reverse check)
cylinder C1 (bore 2.5 in, rod 1.5 in, stroke 12 in, attitude level)
working V1.A to C1.cap (hose, bore 0.5 in, length 60 in)`;
const METRIC = `fluid HM46 (grade 46, index 100, temperature 45 degC)
reservoir R1 (volume 75.70823568 L)
drive M1 (power 7.456998715822702 kW, speed 1450 rpm)
pump P1 (displacement 32.774128 cm3/rev, driven by M1, volumetric 94 %, rated 206.84271879505083 bar)
relief RV1 (set 137.89514586336722 bar, passes 75.70823568 L/min at 5.515805834534689 bar)
directional V1 (4/3, centre tandem, spring to centre, coil a SOL1, coil b SOL2, passes 75.70823568 L/min at 5.171067969876271 bar)
throttle FC1 (set 3.785411784 L/min, compensated, reverse check)
cylinder C1 (bore 63.5 mm, rod 38.1 mm, stroke 304.8 mm, attitude level)
working V1.A to C1.cap (hose, bore 12.7 mm, length 1524 mm)`;
const JOINED = `
suction R1 to P1
working P1 to RV1, V1.P
working C1.rod to FC1 to V1.B
return V1.T, RV1 to R1`;

test('metric and US text of one circuit give the same answer', () => {
  const [us, metric] = [machineOf(US + JOINED), machineOf(METRIC + JOINED)];
  fc.assert(
    fc.property(
      fc.constantFrom('a' as const, 'b' as const, 'centre' as const),
      fc.double({ min: 0, max: 20000, noNaN: true }),
      (position, resist) => {
        const setting = { ...blank, valves: { V1: { position } }, positions: { C1: 0.1 }, loads: { C1: load(0, resist, 100) } };
        const [x, y] = [us.settle(setting), metric.settle(setting)];
        for (const [net, p] of Object.entries(x.pressures)) {
          expect(Math.abs(p - (y.pressures[net] ?? Number.NaN))).toBeLessThan(1e-12 * Math.max(2e7, Math.abs(p)));
        }
        expect(Math.abs((x.velocities.C1 ?? 0) - (y.velocities.C1 ?? 1))).toBeLessThan(1e-12);
      },
    ),
    { numRuns: 20 },
  );
});

const MIRROR = (cap: string, rod: string) => `
fluid HM46 (grade 46, temperature 45 degC)
reservoir R1 (volume 60 L)
drive M1 (power 3 kW, speed 1450 rpm)
pump P1 (displacement 16 cm3/rev, driven by M1)
relief RV1 (set 80 bar, passes 30 L/min at 3 bar)
directional V1 (4/3, centre tandem, spring to centre, coil a SOL1, coil b SOL2, passes 40 L/min at 4 bar)
throttle OR1 (orifice 2 mm)
cylinder C1 (bore 50 mm, rod 28 mm, through, stroke 400 mm, cushion 25 mm, attitude level)
suction R1 to P1
working P1 to RV1, V1.P
working V1.A to C1.${cap}
working V1.B to OR1 to C1.${rod}
return V1.T, RV1 to R1`;

test('a circuit with cap and rod side exchanged moves the other way', () => {
  const [one, other] = [machineOf(MIRROR('cap', 'rod')), machineOf(MIRROR('rod', 'cap'))];
  fc.assert(
    fc.property(
      fc.constantFrom('a' as const, 'b' as const),
      fc.double({ min: 0.005, max: 0.395, noNaN: true }),
      fc.double({ min: -8000, max: 8000, noNaN: true }),
      (position, x, force) => {
        const at = { ...blank, valves: { V1: { position } } };
        const s = one.settle({ ...at, positions: { C1: x }, loads: { C1: load(force) } });
        const m = other.settle({ ...at, positions: { C1: 0.4 - x }, loads: { C1: load(-force) } });
        expect(Math.abs((s.velocities.C1 ?? 0) + (m.velocities.C1 ?? 1))).toBeLessThan(1e-9);
        expect(Math.abs((s.pressures['V1.A'] ?? 0) - (m.pressures['V1.A'] ?? -1e9))).toBeLessThan(1);
      },
    ),
    { numRuns: 30 },
  );
});

test('a higher relief setting never lowers the pressure, a larger flow setting never the speed', () => {
  const circuit = (set: number, flow: number) =>
    machineOf(HEAD_AND_FEED.replace('set 160 bar', `set ${set} bar`).replace('set 1.26 L/min', `set ${flow} L/min`));
  const feed: Setting = {
    ...blank,
    valves: { V0: { position: 'b' }, V2: { position: 'a' } },
    positions: { C2: 0.3 },
    loads: { C2: load(0, 9000, 250) },
  };
  let before: Solution | undefined;
  for (const set of [60, 90, 120, 160, 200]) {
    const s = circuit(set, 1.26).settle(feed);
    if (before !== undefined) {
      expect(s.pressures.pressure).toBeGreaterThan(before.pressures.pressure ?? Number.NaN);
      expect(s.velocities.C2).toBeGreaterThanOrEqual((before.velocities.C2 ?? Number.NaN) * (1 - 1e-6));
    }
    before = s;
  }
  const speeds = [0.3, 0.6, 1.26, 2.5, 5].map((flow) => circuit(160, flow).settle(feed).velocities.C2 ?? 0);
  expect([...speeds].sort((x, y) => x - y)).toEqual(speeds);
});
