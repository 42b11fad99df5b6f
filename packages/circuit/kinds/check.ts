/** Check valve. */
import type { Kind } from './kind.ts';
import { BAR } from '../assembly/units.ts';
import { addCheck, addLeak, crackFits, passesOf, SEAT_LEAK, siOr } from './passing.ts';
import { hardware } from './common.ts';

export const check: Kind = {
  name: 'check',
  noun: 'check valve',
  about: 'Check valve: lets oil through from in to out only.',
  ports: [
    { name: 'in', role: 'any', required: true, about: 'Free-flow entrance.' },
    { name: 'out', role: 'any', required: true, about: 'Exit; closed backwards.' },
  ],
  chain: { how: 'through', from: 'in', to: 'out' },
  properties: [
    {
      name: 'crack',
      shape: { form: 'quantity', dimensions: ['pressure'] },
      required: false,
      default: '0.5 bar',
      defaultSource: 'common practice, from memory',
      example: 'crack 0.5 bar',
      about: 'Pressure drop at which it begins to open.',
    },
    {
      name: 'passes',
      shape: { form: 'flowAt' },
      required: false,
      default: 'no loss (said among assumptions)',
      example: 'passes 80 L/min at 3 bar',
      about: 'Flow at total pressure drop, cracking pressure included. Left out: only `crack` is counted, and the report says so.',
    },
    ...hardware,
  ],
  groups: [],
  /** Check law: path on what is left above the cracking pressure. */
  assemble(component, into) {
    const crack = siOr(component, into, 'crack', 0.5 * BAR, '0.5 bar');
    if (!crackFits(component, crack)) return into.cannot(component, `${component.id} cracks at more than the drop it \`passes\` at`);
    passesOf(component, into);
    const a = { node: into.nodeOrBlind(component, 'in'), port: 'in' };
    const b = { node: into.nodeOrBlind(component, 'out'), port: 'out' };
    addCheck(component, into, a, b, crack, 'in to out');
    addLeak(component, into, b, a, SEAT_LEAK);
  },
};
