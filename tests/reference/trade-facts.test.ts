/** Facts of the trade as practitioners say them, in round numbers, each as a circuit. All: common practice, no source. */
import { describe, expect, it } from 'vitest';
import { type Bench, bench, bothWays, inUnits, supply } from './bench.ts';

const IDEAL = 'seal 0 bar';
const near = (value: number, said: number, within: number) =>
  expect(Math.abs(value / said - 1), `${value} of about ${said}`).toBeLessThanOrEqual(within);
const speed = (of: Bench, step: string, id = 'C1') => Math.abs(of.actuator(step, id).velocity);
const force = (of: Bench, step: string, id = 'C1') => Math.abs(of.actuator(step, id).available ?? Number.NaN);

describe('a bore of 8 in at 1000 psi with 20 gpm and a stroke of 15 in (common practice, no source)', () => {
  const opened = bench(bothWays({ flow: '20 gpm', set: '1000 psi', cylinder: `bore 8 in, rod 4 in, stroke 15 in, ${IDEAL}` }));
  it('presses with about 50 000 lbf, 25 short tons', async () => {
    near(inUnits(force(await opened, 'Out'), 'lbf'), 50000, 0.01);
    near(inUnits(force(await opened, 'Out'), 'tonf'), 25, 0.01);
  });
  it('closes in about 10 s, on about 750 in3', async () => {
    const of = await opened;
    const seconds = of.step('Out').time ?? Number.NaN;
    near(seconds, 10, 0.03);
    near(inUnits(of.flow('Out', 'C1.cap', 'C1') * seconds, 'in3'), 750, 0.02);
    near(inUnits(of.flow('Out', 'C1.cap', 'C1') * seconds, 'gal'), 3.25, 0.02);
  });
});

describe('holding over the relief valve at 1000 psi with 20 gpm (common practice, no source)', () => {
  // The pump delivers 20 gpm at 1000 psi: 90 % of 22.2 gpm.
  const opened = bench(`circuit Bench
fluid F1 (grade 46, temperature 40 degC)
reservoir R1 (volume 100 gal)
drive M1 (power 20 hp, speed 1000 rpm)
pump P1 (displacement 20 gpm / 0.9 / 1000 rpm, driven by M1, volumetric 90 %, mechanical 90 %, rated 1000 psi)
relief RV1 (set 1000 psi, passes 1000 gpm at 50 psi, override 1 %)
suction R1 to P1
working P1 to RV1
return RV1 to R1
require RV1 power in REST at most 20 hp
`);
  it('wastes nearly 15 hp at the shaft, 11.7 hp of it in the oil', async () => {
    const of = await opened;
    const shaft = inUnits(of.state('REST').power.P1 ?? Number.NaN, 'hp');
    expect(shaft).toBeGreaterThan(14);
    expect(shaft).toBeLessThan(15);
    near(inUnits(of.requirement(0).worst?.value ?? Number.NaN, 'hp'), 11.7, 0.01);
  });
});

describe('regeneration with a 2:1 cylinder (common practice, no source)', () => {
  const cylinder = `bore 100 mm, rod 70.7107 mm, stroke 400 mm, ${IDEAL}`;
  const regenerative = bench(`circuit Bench
${supply('40 L/min', '100 bar', ', V1.P, C1.rod')}
directional V1 (3/2, normally closed, coil a SOL1, passes 6000 L/min at 0.1 bar, takes 1 ms)
cylinder C1 (${cylinder}, attitude level)
working V1.A to C1.cap
return V1.T to R1
cycle T {
  step Out energise SOL1 until C1 extended
  step Back until C1 retracted
}
`);
  const plain = bench(bothWays({ flow: '40 L/min', set: '100 bar', cylinder }));
  it('has equal speeds and forces both ways', async () => {
    const of = await regenerative;
    near(speed(of, 'Out'), speed(of, 'Back'), 0.01);
    near(force(of, 'Out'), force(of, 'Back'), 0.01);
  });
  it('takes half the time and gives half the force of a plain extension', async () => {
    const [a, b] = [await regenerative, await plain];
    near((a.step('Out').time ?? Number.NaN) / (b.step('Out').time ?? Number.NaN), 0.5, 0.02);
    near(force(a, 'Out') / force(b, 'Out'), 0.5, 0.01);
  });
});

describe('a double-rod cylinder (common practice, no source)', () => {
  it('has equal speeds and forces both ways', async () => {
    const of = await bench(
      bothWays({ flow: '20 L/min', set: '80 bar', cylinder: `bore 50 mm, rod 28 mm, through, stroke 300 mm, ${IDEAL}` }),
    );
    near(speed(of, 'Out'), speed(of, 'Back'), 0.001);
    near(force(of, 'Out'), force(of, 'Back'), 0.001);
  });
});

/** One cylinder with its flow control in the supply, in the return or beside. */
function controlled(how: 'in' | 'out' | 'bleed', load: string): Promise<Bench> {
  const control = {
    in: 'throttle FC1 (set 6 L/min, compensated)',
    out: 'throttle FC1 (set 4.2 L/min, compensated)',
    bleed: 'throttle FC1 (set 14 L/min, compensated)',
  }[how];
  const lines = {
    in: 'working V1.A to FC1 to C1.cap\nworking C1.rod to V1.B\nreturn V1.T to R1',
    out: 'working V1.A to C1.cap\nworking C1.rod to FC1 to V1.B\nreturn V1.T to R1',
    bleed: 'working V1.A to C1.cap, FC1.in\nworking C1.rod to V1.B\nreturn V1.T, FC1.out to R1',
  }[how];
  return bench(`circuit Bench
${supply('20 L/min', '100 bar', ', V1.P')}
directional V1 (4/2, detent, coil a SOL1, coil b SOL2, passes 600 L/min at 0.1 bar, takes 1 ms)
cylinder C1 (bore 50 mm, rod 27.4 mm, stroke 300 mm, ${IDEAL}, attitude level)
${control}
${lines}
load C1 (${load})
cycle T {
  step Out energise SOL1 until C1 extended
}
`);
}
/** 6 L/min on 50 mm. */
const METERED = 6e-3 / 60 / ((Math.PI / 4) * 0.05 ** 2);

describe('flow controls (common practice, no source)', () => {
  const resisting = 'resist 8 kN extending';
  it('bleed-off lets the pump work at load pressure', async () => {
    const of = await controlled('bleed', resisting);
    near(of.pressure('Out', 'P1.P', 'C1'), of.actuator('Out', 'C1').needed / ((Math.PI / 4) * 0.05 ** 2), 0.01);
    near(speed(of, 'Out'), METERED, 0.02);
  });
  it.each(['in', 'out'] as const)('meter-%s holds it at the relief setting', async (how) => {
    const of = await controlled(how, resisting);
    near(of.pressure('Out', 'P1.P', 'C1'), 100e5, 0.01);
    near(speed(of, 'Out'), METERED, 0.03);
  });
  it('meter-out holds a load that runs ahead, meter-in and bleed-off do not', async () => {
    const ahead = 'outward 4 kN';
    near(speed(await controlled('out', ahead), 'Out'), METERED, 0.03);
    for (const how of ['in', 'bleed'] as const) {
      const of = await controlled(how, ahead);
      const emptied = of.point('Out').diagnosis.some((one) => one.kind === 'STARVED') || of.pressure('Out', 'C1.cap') < -0.2e5;
      expect(emptied || speed(of, 'Out') > 1.5 * METERED, how).toBe(true);
    }
  });
});

describe('two pumps (common practice, no source)', () => {
  const highLow = (load: string) =>
    bench(`circuit Bench
fluid F1 (grade 46, temperature 40 degC)
reservoir R1 (volume 200 L)
drive M1 (power 11 kW, speed 1500 rpm)
pump P1 (displacement 40 L/min / 1500 rpm, driven by M1, volumetric 100 %, mechanical 100 %)
pump P2 (displacement 8 L/min / 1500 rpm, driven by M1, volumetric 100 %, mechanical 100 %)
check CV1 (crack 0.5 bar, passes 100 L/min at 0.6 bar)
unloading UV1 (set 50 bar, passes 100 L/min at 1 bar)
relief RV1 (set 200 bar, passes 1000 L/min at 1 bar, override 1 %)
directional V1 (4/2, detent, coil a SOL1, coil b SOL2, passes 6000 L/min at 0.1 bar, takes 1 ms)
cylinder C1 (bore 80 mm, rod 40 mm, stroke 300 mm, ${IDEAL}, attitude level)
suction R1 to P1, P2
working P1 to UV1, CV1
working high: P2, CV1 to RV1, V1.P
pilot high to UV1.X
working V1.A to C1.cap
working V1.B to C1.rod
return V1.T, UV1, RV1 to R1
load C1 (${load})
cycle T {
  step Out energise SOL1 until C1 extended, at most 60 s
}
`);
  const area = (Math.PI / 4) * 0.08 ** 2;
  it('the motor is sized by the larger of both flows at the unloading setting and the small flow at the relief setting', async () => {
    const kilowatt = (of: Bench) => Math.max(...Object.values(of.study.cycles[0]?.duty ?? {}).map((one) => one.highest)) / 1000;
    // Just below the unloading setting both pumps work: 48 L/min at 50 bar. Above it only the small one: 8 L/min at up to 200 bar.
    const both = await highLow(`resist ${49 * area * 1e5} N`);
    near(kilowatt(both), (48 * 50) / 600, 0.04);
    const small = await highLow(`resist ${190 * area * 1e5} N`);
    const steady = small.point('Out', 'C1').power.M1 ?? Number.NaN;
    expect(steady / 1000).toBeLessThan((48 * 50) / 600);
    near(steady / 1000, (8 * 190 + 40) / 600, 0.05);
    near(speed(small, 'Out'), 8e-3 / 60 / area, 0.02);
    near(speed(both, 'Out'), 48e-3 / 60 / area, 0.02);
  });
});

/** A first cylinder that stands at its stop, then a second one behind a sequence valve. */
function sequence(load: string, reducing: boolean): Promise<Bench> {
  return bench(`circuit Bench
${supply('20 L/min', '200 bar', ', V1.P')}
directional V1 (3/2, normally closed, coil a SOL1, passes 6000 L/min at 0.1 bar, takes 1 ms)
sequence SV1 (set 80 bar, passes 200 L/min at 1 bar)
${reducing ? 'reducing PR1 (set 90 bar, relieving yes, passes 200 L/min at 1 bar)' : ''}
cylinder C1 (bore 50 mm, stroke 50 mm, begins extended, single cap, spring 1 N to 2 N, ${IDEAL}, attitude level)
cylinder C2 (bore 80 mm, stroke 500 mm, single cap, spring 1 N to 2 N, ${IDEAL}, attitude level)
working V1.A to ${reducing ? 'PR1' : 'C1.cap'}
${reducing ? 'working PR1.A to C1.cap\ndrain PR1.Y to R1' : ''}
working V1.A to SV1 to C2.cap
drain SV1.Y to R1
return V1.T to R1
load C2 (${load})
cycle T {
  step Go energise SOL1 until C2 extended
}
`);
}
const ON_80_MM = (bar: number) => `resist ${((Math.PI / 4) * 0.08 ** 2 * bar * 1e5).toFixed(1)} N extending`;

describe('a sequence valve (common practice, no source)', () => {
  it('keeps the first actuator at its setting at least', async () => {
    const of = await sequence(ON_80_MM(20), false);
    const first = inUnits(of.pressure('Go', 'C1.cap', 'C2'), 'bar');
    expect(first).toBeGreaterThanOrEqual(80);
    expect(first).toBeLessThan(90);
    near(inUnits(of.pressure('Go', 'C2.cap', 'C2'), 'bar'), 20, 0.01);
  });
  it('lets the first one rise with the second above the setting', async () => {
    const of = await sequence(ON_80_MM(150), false);
    expect(inUnits(of.pressure('Go', 'C1.cap', 'C2'), 'bar')).toBeGreaterThanOrEqual(150);
  });
  it('a pressure-reducing valve in the first branch caps it', async () => {
    const of = await sequence(ON_80_MM(150), true);
    near(inUnits(of.peak('Go', 'C1.cap'), 'bar'), 90, 0.05);
  });
});

describe('one valve with different pilots and drains (common practice, no source)', () => {
  const unloaded = (valve: string, lines: string) =>
    bench(`circuit Bench
fluid F1 (grade 46, temperature 40 degC)
reservoir R1 (volume 200 L)
drive M1 (power 11 kW, speed 1500 rpm)
pump P1 (displacement 40 L/min / 1500 rpm, driven by M1, volumetric 100 %)
pump P2 (displacement 8 L/min / 1500 rpm, driven by M1, volumetric 100 %)
relief RV1 (set 200 bar, passes 1000 L/min at 1 bar)
relief RV2 (set 100 bar, passes 1000 L/min at 1 bar)
${valve}
suction R1 to P1, P2
working P1 to RV1
working high: P2 to RV2
return RV1, RV2 to R1
${lines}
`);
  it('a sequence valve with remote pilot and its outlet to the reservoir unloads a pump as an unloading valve does', async () => {
    const unloading = await unloaded(
      'unloading U1 (set 50 bar, passes 80 L/min at 4 bar)',
      'working P1.P to U1\npilot high to U1.X\nreturn U1 to R1',
    );
    const asSequence = await unloaded(
      'sequence U1 (set 50 bar, external pilot, internal drain, passes 80 L/min at 4 bar)',
      'working P1.P to U1.P\npilot high to U1.X\nreturn U1.A to R1',
    );
    const outlet = (of: Bench) =>
      of.state('REST').pressures[
        of.circuit.nets.find((net) => net.ports.some((port) => port.component === 'P1' && port.port === 'P'))?.id ?? ''
      ] ?? Number.NaN;
    near(outlet(asSequence), outlet(unloading), 0.01);
    near(inUnits(outlet(unloading), 'bar'), 1, 0.05);
  });
});

describe('a holding valve without a remote pilot (common practice, no source)', () => {
  const held = (valve: string, lines: string) =>
    bench(`circuit Bench
${supply('10 L/min', '100 bar', ', V1.P')}
directional V1 (4/2, detent, coil a SOL1, coil b SOL2, passes 600 L/min at 0.1 bar, takes 1 ms)
cylinder C1 (bore 50 mm, rod 28 mm, stroke 300 mm, ${IDEAL}, attitude level)
${valve}
working V1.A to C1.cap
${lines}
return V1.T to R1
load C1 (outward 3 kN)
cycle T {
  step Out energise SOL1 until C1 extended
}
`);
  it('a counterbalance valve and a sequence valve in the same place hold the rod side at the same pressure', async () => {
    const counterbalance = await held(
      'counterbalance H1 (set 60 bar, ratio 1:1, passes 200 L/min at 4 bar)',
      'working C1.rod to H1.C\nworking H1.V to V1.B',
    );
    const asSequence = await held(
      'sequence H1 (set 60 bar, reverse check, passes 200 L/min at 4 bar)',
      'working C1.rod to H1 to V1.B\ndrain H1.Y to R1',
    );
    const rod = (of: Bench) => of.pressure('Out', 'C1.rod', 'C1');
    near(rod(counterbalance), rod(asSequence), 0.02);
    expect(inUnits(rod(counterbalance), 'bar')).toBeGreaterThanOrEqual(60);
    expect(inUnits(rod(counterbalance), 'bar')).toBeLessThan(66);
  });
});

describe('an accumulator, a pressure switch, a vented relief valve and a check valve (common practice, no source)', () => {
  it('let the pump work only a few seconds of a long hold', async () => {
    // Dry nitrogen precharged to 600 psi; the pump fills up when the pressure has fallen to 900 psi.
    const of = await bench(`circuit Bench
fluid F1 (grade 46, temperature 40 degC)
reservoir R1 (volume 100 gal)
drive M1 (power 20 hp, speed 1000 rpm)
pump P1 (displacement 20 gpm / 1000 rpm, driven by M1, rated 3000 psi)
relief RV1 (set 1100 psi, piloted, vented 40 psi, passes 40 gpm at 50 psi)
directional V0 (2/2, normally open, coil a SOL0, passes 2 gpm at 15 psi)
check CV1 (crack 5 psi, passes 40 gpm at 30 psi)
accumulator ACC1 (bladder, volume 5 gal, precharge 600 psi at 68 degF, gas nitrogen)
switch PS1 (rises 1000 psi, falls 900 psi)
directional V1 (4/2, detent, coil a SOL1, coil b SOL2, passes 40 gpm at 50 psi)
cylinder C1 (bore 8 in, rod 4 in, stroke 15 in, attitude level, leak 100 cm3/min at 70 bar)
shutoff BV1 (open)
suction R1 to P1
working P1 to RV1, CV1
working system: CV1 to V1.P, BV1.A, PS1
working BV1.B to ACC1
pilot RV1.X to V0.P
drain V0.A to R1
working V1.A to C1.cap
working V1.B to C1.rod
return V1.T, RV1 to R1
cycle Press {
  while Press and PS1 off energise SOL0
  step Close energise SOL1 until C1 extended
  step Hold energise SOL1 for 120 s
  step Open energise SOL2 until C1 retracted
}
`);
    const run = of.study.cycles[0]?.run;
    const hold = run?.steps.find((one) => one.id === 'Press.Hold');
    if (run === undefined || hold === undefined) throw new Error('the hold is not reached');
    const power = run.power.M1 ?? [];
    const full = Math.max(...power);
    let seconds = 0;
    run.times.forEach((time, i) => {
      const next = run.times[i + 1];
      if (next !== undefined && time >= hold.from && next <= hold.to && (power[i] ?? 0) > full / 2) seconds += next - time;
    });
    expect(hold.to - hold.from).toBeGreaterThan(100);
    expect(seconds).toBeLessThan(10);
    // Once filled, it holds the press all the while.
    const system = run.pressures[of.circuit.nets.find((net) => net.name === 'system')?.id ?? ''] ?? [];
    const held = system.filter((_, i) => (run.times[i] ?? 0) > hold.from + seconds + 1 && (run.times[i] ?? 0) <= hold.to);
    expect(held.length).toBeGreaterThan(0);
    expect(inUnits(Math.min(...held), 'psi')).toBeGreaterThan(850);
  });
});

describe('a vented relief valve (common practice, no source)', () => {
  it('opens at very low pressure', async () => {
    const of = await bench(`circuit Bench
fluid F1 (grade 46, temperature 40 degC)
reservoir R1 (volume 200 L)
drive M1 (power 11 kW, speed 1500 rpm)
pump P1 (displacement 40 L/min / 1500 rpm, driven by M1, volumetric 100 %)
relief RV1 (set 160 bar, piloted, passes 80 L/min at 3 bar)
suction R1 to P1
working P1 to RV1
pilot RV1.X to R1
return RV1 to R1
require P1 pressure in REST at most 10 bar
`);
    expect(of.requirement(0).verdict).toBe('met');
    expect(inUnits(of.requirement(0).worst?.value ?? Number.NaN, 'bar')).toBeLessThan(6);
  });
});

describe('stopping in mid-stroke (common practice, no source)', () => {
  const stopped = (centre: string) =>
    bench(`circuit Bench
fluid F1 (grade 46, temperature 40 degC)
reservoir R1 (volume 200 L)
drive M1 (power 11 kW, speed 1500 rpm)
pump P1 (displacement 20 L/min / 1500 rpm, driven by M1, volumetric 100 %)
relief RV1 (set 160 bar, passes 80 L/min at 3 bar)
directional V1 (4/3, centre ${centre}, spring to centre, coil a SOL1, coil b SOL2, passes 60 L/min at 3 bar)
cylinder C1 (bore 50 mm, rod 28 mm, stroke 300 mm, begins 150 mm, ${IDEAL}, attitude level)
suction R1 to P1
working P1 to RV1, V1.P
working V1.A to C1.cap
working V1.B to C1.rod
return RV1, V1.T to R1
load C1 (inward 5 kN)
require C1 still in STOP
`);
  it.each([
    ['closed', 'met'],
    ['tandem', 'met'],
    ['float', 'missed'],
    ['open', 'missed'],
  ])('needs a centre that blocks the cylinder ports: %s, %s', async (centre, verdict) => {
    expect((await stopped(centre)).requirement(0).verdict).toBe(verdict);
  });
});
