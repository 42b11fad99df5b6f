import { compile, solveSteady, Transient } from '@oilway/engine';
import { machine, runCycle } from './machine.ts';
const best = (f: () => void, n = 500, m = 200) => { let b = 1e9; for (let k = 0; k < m; k++) { const t = performance.now(); for (let i = 0; i < n; i++) f(); b = Math.min(b, (performance.now() - t) * 1000 / n); } return b.toFixed(2); };
const make = () => { const made = machine(1); const net = compile(made.spec); net.parameters.set(made.values); const req = { positions: made.positions, loads: made.loads, gas: ['empty' as const] }; return { made, net, req }; };
{ const { made, net, req } = make(); const run: any = new Transient(net, req, solveSteady(net, req)); runCycle(made, run);
console.log('evaluate', best(() => run.sys.evaluate()), 'stage', best(() => run.stepper.evaluate(0.01)), 'factor', best(() => run.sys.lu.factor(run.sys.j)), 'solve', best(() => run.sys.lu.solve(run.sys.r, run.stepper.d)));
const s = run.sys; const B = net.batches; console.log('batches', best(() => { for (const b of B) b.stamp(s.p, s.parameters, 1, 1e-7, s.r, s.j); }), 'limits', best(() => s.limits()), 'bodies', best(() => { for (let a = 0; a < 4; a++) s.body(a); }), 'storage', best(() => run.storage.stamp(s.y, run.stepper.base, 100, s.r, s.j)), 'general', net.general.length); }
let b = 1e9, w = 0; for (let i = 0; i < 60; i++) { const { made, net, req } = make(); const t = performance.now(); const run = new Transient(net, req, solveSteady(net, req)); runCycle(made, run); const d = performance.now() - t; if (d < b) b = d; w = run.statistics.newton; }
console.log('cycle best', b.toFixed(2), 'newton', w);
{ const { made, net, req } = make(); console.log('compile', best(() => compile(made.spec), 5, 50), 'steady cold', best(() => solveSteady(net, req), 5, 100)); const r = solveSteady(net, req); console.log('iterations', r.iterations, r.how, 'warm', best(() => solveSteady(net, { ...req, start: r }), 20, 100)); }
