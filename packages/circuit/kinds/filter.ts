/** Filter. */
import type { Kind } from './kind.ts';
import { pathK } from '../assembly/laws.ts';
import { toMPa } from '../assembly/units.ts';
import { flowAt } from './read.ts';
import { hardware } from './common.ts';

export const filter: Kind = {
  name: 'filter',
  noun: 'filter',
  about: 'Filter: holds dirt back; its bypass valve opens when it clogs.',
  ports: [
    { name: 'in', role: 'any', required: true, about: 'Dirty side.' },
    { name: 'out', role: 'any', required: true, about: 'Clean side.' },
  ],
  chain: { how: 'through', from: 'in', to: 'out' },
  properties: [
    {
      name: 'passes',
      shape: { form: 'flowAt' },
      required: true,
      default: '—',
      example: 'passes 120 L/min at 0.4 bar',
      about: 'Flow at pressure drop of the clean filter.',
    },
    {
      name: 'bypass',
      shape: { form: 'bypass' },
      required: true,
      default: '—',
      example: 'bypass 1.7 bar | bypass none',
      about: 'Opening pressure of the bypass valve, or `none`.',
    },
    {
      name: 'fineness',
      shape: { form: 'quantity', dimensions: ['length'] },
      required: false,
      default: '—',
      example: 'fineness 10 um',
      about: 'Particle size it holds back.',
    },
    {
      name: 'collapse',
      shape: { form: 'quantity', dimensions: ['pressure'] },
      required: false,
      default: '10 bar',
      defaultSource: 'common practice, from memory',
      example: 'collapse 210 bar',
      about: 'Pressure difference the element stands.',
    },
    ...hardware,
  ],
  groups: [],
  /** Clean element as a path; bypass in parallel, with the element's own K. */
  assemble(component, into) {
    const passes = flowAt(component, 'passes');
    const bypass = component.properties.find((p) => p.name === 'bypass')?.value;
    if (passes === undefined) return into.cannot(component, `${component.id} has no \`passes\``);
    const k = pathK({ flow: passes.flow, drop: passes.drop * into.oil.filterDrop });
    const a = into.nodeOrBlind(component, 'in');
    const b = into.nodeOrBlind(component, 'out');
    const element = into.add(component, { type: 'path', a, b, k }, ['in', 'out'], 'in to out');
    if (bypass?.type === 'bypass' && bypass.crack !== undefined) {
      into.add(component, { type: 'check', a, b, k, crack: toMPa(bypass.crack.si) }, ['in', 'out'], 'bypass');
    }
    into.limitation({ component: component.id, words: `${component.id} passes`, targets: [{ element, size: 'k' }] });
  },
};
