import { compile, solveSteady } from '@oilway/engine';
import { machine } from './machine.ts';
import { nastyNet } from '../engine/nets.ts';
const made = machine(1); const net = compile(made.spec); const c: any = made.commands[0];
const positions = made.positions.map((x, i) => (Number.isFinite(made.spec.actuators[i]!.high) ? 0.03 : x));
const its: string[] = [];
for (const s of ['', 'feedOut', 'feedIn', 'liftUp', 'liftDown', 'clamp', 'release', 'turn']) { net.parameters.set(made.values); if (s) net.parameters[c[s]] = 1; const r = solveSteady(net, { positions, loads: made.loads, gas: ['empty'] }); its.push(r.iterations + r.how[0]!); }
let sum = 0; const how: Record<string, number> = {}; const N = Number(process.argv[2] ?? 600);
const t = process.cpuUsage().user;
for (let s = 1; s <= N; s++) { const n = nastyNet(s); const k = compile(n.spec); k.parameters.set(n.parameters); const r = solveSteady(k, { positions: n.positions, loads: n.loads, gas: n.gas, locked: n.locked }); sum += r.iterations; how[r.how] = (how[r.how] ?? 0) + 1; }
console.log(its.join(' '), '|', sum, JSON.stringify(how), ((process.cpuUsage().user - t) / 1000).toFixed(0), 'ms');
