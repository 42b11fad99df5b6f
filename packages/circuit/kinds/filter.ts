/** Filter. */
import type { Kind } from './kind.ts';
import { hardware } from './common.ts';

export const filter: Kind = {
  name: 'filter',
  noun: 'filter',
  about: 'Filter.',
  ports: [
    { name: 'in', role: 'any', required: true, about: 'Dirty side.' },
    { name: 'out', role: 'any', required: true, about: 'Clean side.' },
  ],
  chain: { how: 'through', from: 'in', to: 'out' },
  properties: [
    { name: 'passes', shape: { form: 'flowAt' }, required: true, default: '—', example: 'passes 120 L/min at 0.4 bar', about: 'Flow at pressure drop of the clean filter.' },
    { name: 'bypass', shape: { form: 'bypass' }, required: true, default: '—', example: 'bypass 1.7 bar | bypass none', about: 'Opening pressure of the bypass valve, or `none`.' },
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
};
