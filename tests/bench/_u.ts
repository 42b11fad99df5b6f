import { compile, solveSteady } from '@oilway/engine';
import { Solver } from '../../packages/engine/newton.ts';
import { machine } from './machine.ts';
const P: any = Solver.prototype; for (const m of ['newton', 'pseudoTransient', 'backwardEuler']) { const o = P[m]; P[m] = function (...a: any[]) { const k = this.iterations; const r = o.apply(this, a); console.log('   ', m, 'blend', this.sys.blend, r, this.iterations - k, 'res', this.residual.toExponential(1), 'held', [...this.sys.held].join('')); return r; }; }
const made = machine(1); const net = compile(made.spec); const c: any = made.commands[0];
const positions = made.positions.map((x, i) => (Number.isFinite(made.spec.actuators[i]!.high) ? 0.03 : x));
for (const s of ['', 'feedOut', 'feedIn', 'liftUp', 'liftDown', 'clamp', 'release', 'turn']) { net.parameters.set(made.values); if (s) net.parameters[c[s]] = 1; console.log(s); (globalThis as any).TR = s === process.argv[2]; const r = solveSteady(net, { positions, loads: made.loads, gas: ['empty'] }); console.log(r.how, r.iterations); }
