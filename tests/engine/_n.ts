import { compile, solveSteady } from '@oilway/engine';
import { nastyNet } from './nets.ts';
const N = Number(process.argv[2] ?? 2000);
const s0 = Number(process.argv[3] ?? 1);
const how: Record<string, number> = {};
const bad: number[] = [];
let nan = 0;
let slow = 0;
let worst = 0;
const t0 = performance.now();
for (let s = s0; s < s0 + N; s++) {
  const n = nastyNet(s);
  const net = compile(n.spec);
  net.parameters.set(n.parameters);
  const t = performance.now();
  const r = solveSteady(net, { positions: n.positions, loads: n.loads, gas: n.gas, locked: n.locked });
  const dt = performance.now() - t;
  if (dt > 50) slow++;
  worst = Math.max(worst, dt);
  how[r.how] = (how[r.how] ?? 0) + 1;
  if (!r.converged) bad.push(s);
  if ([...r.pressures, ...r.velocities, ...r.flows].some((x) => !Number.isFinite(x))) nan++;
}
console.log(
  how,
  'bad',
  bad.length,
  bad.slice(0, 40).join(' '),
  'nan',
  nan,
  'slow',
  slow,
  'worst',
  worst.toFixed(0),
  (performance.now() - t0).toFixed(0),
  'ms',
);
