import { compile, solveSteady, Transient } from '@oilway/engine';
import { nastyNet, random } from './nets.ts';
const s = Number(process.argv[2]);
const dyn = process.argv[3] === 'dyn';
const until = Number(process.argv[4] ?? 5);
const n = nastyNet(s);
const net = compile(n.spec);
net.parameters.set(n.parameters);
const next = random(s * 7 + 1);
const req = { positions: n.positions, loads: n.loads, gas: n.gas, locked: n.locked };
const r = solveSteady(net, req);
const t: any = new Transient(net, req, r, { dynamics: dyn, maxSteps: 3000 });
const opens = n.spec.elements.flatMap((e) =>
  e.type === 'path' && e.opening !== undefined ? [e.opening] : e.type === 'pump' ? [e.running] : [],
);
const lines: string[] = [];
const stp = t.stepper;
const orig = stp.stage.bind(stp);
stp.stage = (time: number, gh: number) => {
  const k = stp.newtons;
  const ok = orig(time, gh);
  const d = stp.d,
    y = t.sys.y;
  let w = 0;
  for (let i = 0; i < d.length; i++) if (Math.abs(d[i]) / (1 + Math.abs(y[i])) > Math.abs(d[w]) / (1 + Math.abs(y[w]))) w = i;
  if (!ok)
    lines.push(
      `  FAIL gh ${gh.toExponential(2)} it ${stp.newtons - k} worst d ${w} (free ${net.free} bodies ${n.spec.actuators.length}) ${d[w].toExponential(2)} y ${y[w].toExponential(4)} r ${Math.max(...[...t.sys.r.slice(0, net.size)].map(Math.abs)).toExponential(2)}`,
    );
  return ok;
};
let why = '';
for (let k = 0; k < 5 && !why; k++) {
  if (opens.length) {
    const p = opens[Math.floor(next() * opens.length)]!;
    t.ramp(p, t.parameters[p]!, next() < 0.5 ? 1 : 0, t.time, t.time + (next() < 0.3 ? 0 : 0.05));
  }
  let last = t.time;
  const rep = t.advance(k + 1, [], (time: number) => {
    lines.push(
      `${time.toFixed(9)} h ${(time - last).toExponential(2)} err ${t.stepper.error.toExponential(1)} v ${[...t.stepper.y0.slice(net.firstVelocity, net.firstVelocity + n.spec.actuators.length)].map((v: number) => v.toExponential(2)).join(' ')} x ${[...t.stepper.x0].map((x: number) => x.toFixed(6))} ${t.contacts} p ${[...t.stepper.y0.slice(0, net.free)].map((x: number) => x.toFixed(3))}`,
    );
    last = time;
  });
  if (rep.failed) why = rep.failed;
  if (rep.happened.length) lines.push(JSON.stringify(rep.happened.slice(-6)));
}
console.log(lines.slice(0, 6).join('\n'));
console.log(lines.slice(-14).join('\n'), why, JSON.stringify(t.statistics));
console.log(JSON.stringify(n.spec.actuators), JSON.stringify(n.loads), JSON.stringify(n.spec.gas));
