import { compile, solveSteady, Transient } from '@oilway/engine';
import { machine, runCycle } from './machine.ts';
const t0 = performance.now();
let n = 0;
for (let i = 0; i < 60; i++) {
  const made = machine(1);
  const net = compile(made.spec);
  net.parameters.set(made.values);
  const req = { positions: made.positions, loads: made.loads, gas: ['empty' as const] };
  const run = new Transient(net, req, solveSteady(net, req));
  runCycle(made, run);
  n += run.statistics.newton;
}
console.log(
  ((performance.now() - t0) / 60).toFixed(2),
  'ms',
  (((performance.now() - t0) * 1000) / n).toFixed(2),
  'us per newton',
  process.cpuUsage().user / 60000,
);
{
  const made = machine(1);
  const net = compile(made.spec);
  net.parameters.set(made.values);
  const req = { positions: made.positions, loads: made.loads, gas: ['empty' as const] };
  const run: any = new Transient(net, req, solveSteady(net, req));
  let c = 0;
  const o = run.sys.evaluate.bind(run.sys);
  run.sys.evaluate = () => {
    c++;
    o();
  };
  runCycle(made, run);
  console.log('evaluations', c, 'newton', run.stepper.newtons, 'choices', run.sys.lu.choices);
  // raw speed
  let t = performance.now();
  for (let i = 0; i < 100000; i++) o();
  console.log('evaluate', ((performance.now() - t) / 100).toFixed(2), 'us');
  run.stepper.base.fill(0);
  run.stepper.evaluate(0.01);
  t = performance.now();
  for (let i = 0; i < 100000; i++) run.stepper.evaluate(0.01);
  console.log('stage evaluate', ((performance.now() - t) / 100).toFixed(2), 'us');
  t = performance.now();
  for (let i = 0; i < 100000; i++) run.sys.lu.factor(run.sys.j);
  console.log('factor', ((performance.now() - t) / 100).toFixed(2), 'us', run.sys.lu.choices);
  t = performance.now();
  for (let i = 0; i < 100000; i++) run.sys.lu.solve(run.sys.r, run.stepper.d);
  console.log('solve', ((performance.now() - t) / 100).toFixed(2), 'us');
}
