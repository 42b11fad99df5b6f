import { compile, solveSteady, Transient } from '@oilway/engine';
import { machine, runCycle } from './machine.ts';
const made = machine(1);
const net = compile(made.spec);
net.parameters.set(made.values);
console.log('n', net.size, 'entries', net.entries, 'elements', net.laws.length);
const req = { positions: made.positions, loads: made.loads, gas: ['empty' as const] };
const run: any = new Transient(net, req, solveSteady(net, req));
const stp = run.stepper;
const orig = stp.stage.bind(stp);
const hist: Record<string, number> = {};
stp.stage = (time: number, gh: number) => {
  const k = stp.newtons;
  const ok = orig(time, gh);
  const key = `${ok}${String(stp.newtons - k).padStart(3)}`;
  hist[key] = (hist[key] ?? 0) + 1;
  return ok;
};
let loc = 0,
  nl = 0,
  tr = 0;
const ol = run.locate.bind(run);
run.locate = (h: number) => {
  const k = stp.newtons;
  nl++;
  const r = ol(h);
  loc += stp.newtons - k;
  return r;
};
const ot = run.trial.bind(run);
run.trial = (h: number) => {
  tr++;
  return ot(h);
};
const lines: string[] = [];
const adv = run.advance.bind(run);
let last = 0;
run.advance = (u: number, w: any) => {
  const r = adv(u, w, (t: number) => {
    lines.push(
      `${t.toFixed(6)} h ${(t - last).toExponential(1)} err ${stp.error.toExponential(1)} newt ${stp.newtons} rej ${run.counts.rejected} v ${[...stp.y0.slice(net.firstVelocity, net.firstVelocity + 4)].map((v: number) => v.toExponential(1)).join(' ')} x ${[...stp.x0].map((v: number) => v.toFixed(4)).join(' ')}`,
    );
    last = t;
  });
  lines.push(JSON.stringify(r));
  return r;
};
console.log(runCycle(made, run), run.time, JSON.stringify(run.statistics), run.sys.lu.choices);
console.log(hist, 'in locate', loc, 'locates', nl, 'trials', tr);
if (process.argv[2]) console.log(lines.join('\n'));
