import { compile, solveSteady, Transient } from '@oilway/engine';
import { nastyNet, random } from './nets.ts';
const N = Number(process.argv[2] ?? 300);
const s0 = Number(process.argv[3] ?? 1);
const dyn = process.argv[4] === 'dyn';
const fail: string[] = [];
let nan = 0;
let steps = 0,
  rej = 0,
  newt = 0,
  slow = 0,
  worst = 0,
  ws = 0;
const t0 = performance.now();
for (let s = s0; s < s0 + N; s++) {
  const n = nastyNet(s);
  const next = random(s * 7 + 1);
  const net = compile(n.spec);
  net.parameters.set(n.parameters);
  const req = { positions: n.positions, loads: n.loads, gas: n.gas, locked: n.locked };
  const r = solveSteady(net, req);
  const t1 = performance.now();
  const t = new Transient(net, req, r, { dynamics: dyn, maxSteps: 20000 });
  // toggle every 1 s a random parameter used as opening
  const opens = n.spec.elements.flatMap((e) =>
    e.type === 'path' && e.opening !== undefined ? [e.opening] : e.type === 'pump' ? [e.running] : [],
  );
  let why = '';
  for (let k = 0; k < 5 && !why; k++) {
    if (opens.length) {
      const p = opens[Math.floor(next() * opens.length)]!;
      t.ramp(p, t.parameters[p]!, next() < 0.5 ? 1 : 0, t.time, t.time + (next() < 0.3 ? 0 : 0.05));
    }
    const rep = t.advance(k + 1);
    if (rep.failed) why = rep.failed + ' at ' + t.time.toFixed(4);
  }
  const st = t.statistics;
  steps += st.steps;
  rej += st.rejected;
  newt += st.newton;
  const dt = performance.now() - t1;
  if (dt > 200) slow++;
  if (dt > worst) {
    worst = dt;
    ws = s;
  }
  if (why) fail.push(`${s}: ${why} ${JSON.stringify(st)}`);
  const now = t.now();
  if ([...now.pressures, ...now.velocities].some((x) => !Number.isFinite(x))) nan++;
}
console.log(
  'failed',
  fail.length,
  fail.slice(0, 30),
  'nan',
  nan,
  { steps, rej, newt },
  'slow',
  slow,
  'worst',
  worst.toFixed(0),
  ws,
  (performance.now() - t0).toFixed(0),
  'ms',
);
