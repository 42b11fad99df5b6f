import { solveSteady, Transient } from '@oilway/engine';
import * as R from './reference.ts';
const pos = (x: number) => ({ terms: [{ of: 'position' as const, index: 0, weight: 1 }], threshold: x, edge: 'rising' as const });
for (const tol of [3e-4, 1e-4, 5e-5, 2e-5, 1e-5, 3e-6, 1e-6, 1e-7]) {
  const { net } = R.twoPumps(); const req = { positions: [0], floor: 0 }; const s = solveSteady(net, req);
  const t: any = new Transient(net, req, { ...s, state: new Float64Array(s.state.length) }, { dynamics: true, tolerance: tol, floor: 0 });
  t.ramp(0, 0, 1, 0, 0.02); const a = t.advance(9, [pos(0.3)]).time; const log: string[] = []; let last = t.time;
  const b = t.advance(9, [pos(0.38)], (time: number) => { log.push(`${time.toFixed(5)} h ${(time-last).toExponential(1)} err ${t.stepper.error.toExponential(1)} v ${t.stepper.y0[net.firstVelocity].toFixed(5)} H ${t.stepper.y0[0].toFixed(3)}`); last = time; }).time;
  console.log(tol, (a / 3.89857272 - 1).toExponential(1), (b / 8.02954365 - 1).toExponential(1), JSON.stringify(t.statistics));
  if (tol === 1e-4) console.log(log.slice(-30).join('\n'));
}
