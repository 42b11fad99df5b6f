/** Random nasty networks: solved, or refused with a reason; never NaN, never without end. `NETS` sets how many (200; `npm run test:nets` 2000). */
import { compile, solveSteady, Transient } from '@oilway/engine';
import { expect, it } from 'vitest';
import { nastyNet, random } from './nets.ts';

const count = Number(process.env.NETS ?? 200);
const finite = (values: Iterable<number>): boolean => {
  for (const value of values) if (!Number.isFinite(value)) return false;
  return true;
};

it(`${count} networks in steady state`, { timeout: 600_000 }, () => {
  let refused = 0;
  for (let seed = 1; seed <= count; seed++) {
    const made = nastyNet(seed);
    const net = compile(made.spec);
    net.parameters.set(made.parameters);
    const result = solveSteady(net, { positions: made.positions, loads: made.loads, gas: made.gas, locked: made.locked });
    expect(finite(result.pressures) && finite(result.velocities) && finite(result.flows) && finite(result.stopForces), `net ${seed}`).toBe(
      true,
    );
    if (result.converged) continue;
    refused++;
    expect(
      result.diagnosis.some((d) => d.kind === 'NO EQUILIBRIUM' && d.why.length > 20),
      `net ${seed}`,
    ).toBe(true);
  }
  expect(refused).toBeLessThanOrEqual(Math.ceil(count / 500));
});

it(`${count / 2} networks over five seconds with valves and pumps switched`, { timeout: 600_000 }, () => {
  let refused = 0;
  for (let seed = 1; seed <= count / 2; seed++) {
    const made = nastyNet(seed);
    const next = random(seed * 7 + 1);
    const net = compile(made.spec);
    net.parameters.set(made.parameters);
    const request = { positions: made.positions, loads: made.loads, gas: made.gas, locked: made.locked };
    const run = new Transient(net, request, solveSteady(net, request), { dynamics: seed % 2 === 0, maxSteps: 5000 });
    const switched = made.spec.elements.flatMap((e) =>
      e.type === 'path' && e.opening !== undefined ? [e.opening] : e.type === 'pump' ? [e.running] : [],
    );
    for (let k = 1; k <= 5; k++) {
      const parameter = switched[Math.floor(next() * switched.length)];
      if (parameter !== undefined)
        run.ramp(parameter, run.parameters[parameter]!, next() < 0.5 ? 1 : 0, run.time, run.time + (next() < 0.3 ? 0 : 0.05));
      const report = run.advance(k);
      if (!report.failed) continue;
      expect(report.failed.length).toBeGreaterThan(20);
      refused++;
      break;
    }
    const now = run.now();
    expect(finite(now.pressures) && finite(now.velocities) && finite(now.flows) && finite(run.positions), `net ${seed}`).toBe(true);
  }
  expect(refused).toBeLessThanOrEqual(Math.ceil(count / 100));
});
