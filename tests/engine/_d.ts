import { compile, solveSteady, Transient } from '@oilway/engine';
import { nastyNet } from './nets.ts';
const s = Number(process.argv[2]);
const n = nastyNet(s);
const net = compile(n.spec);
net.parameters.set(n.parameters);
const req = { positions: n.positions, loads: n.loads, gas: n.gas, locked: n.locked };
const r = solveSteady(net, req);
console.log(
  r.how,
  r.contacts,
  r.velocities,
  n.gas,
  n.loads.map((l) => JSON.stringify(l)),
  n.positions,
);
console.log(JSON.stringify(n.spec.actuators), n.spec.nodes.length, n.spec.oil, n.spec.gas);
const t: any = new Transient(net, req, r, { maxSteps: 20000 });
const st = t.stepper;
const orig = st.stage.bind(st);
st.stage = (time: number, gh: number) => {
  const k = st.newtons;
  const ok = orig(time, gh);
  const R = t.sys.r;
  let w = 0;
  for (let i = 0; i < net.size; i++) if (Math.abs(R[i]) > Math.abs(R[w])) w = i;
  if (!ok)
    console.log(
      'stage',
      time.toFixed(6),
      gh.toExponential(1),
      ok,
      st.newtons - k,
      'worst row',
      w,
      w < net.free ? 'node ' + net.nodeOf[w] : w - net.firstVelocity < n.spec.actuators.length ? 'body ' + (w - net.firstVelocity) : 'own',
      R[w].toExponential(2),
      'v',
      [...t.sys.y.slice(net.firstVelocity)].map((v: number) => v.toExponential(2)).join(' '),
    );
  return ok;
};
console.log(t.advance(1));
