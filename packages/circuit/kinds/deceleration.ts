/** Deceleration valve. */
import type { Kind } from './kind.ts';
import { hardware } from './common.ts';

export const deceleration: Kind = {
  name: 'deceleration',
  noun: 'deceleration valve',
  about: 'Deceleration valve: a cam on the actuator closes it along the stroke.',
  ports: [
    { name: 'in', role: 'working', required: true, about: 'Entrance.' },
    { name: 'out', role: 'working', required: true, about: 'Exit.' },
  ],
  chain: { how: 'through', from: 'in', to: 'out' },
  properties: [
    {
      name: 'closed',
      shape: { form: 'cam', small: 'by' },
      required: true,
      default: '—',
      example: 'closed by C2 from 250 mm to 265 mm',
      about: 'Actuator and way over which it goes from open to closed.',
    },
    { name: 'passes', shape: { form: 'flowAt' }, required: true, default: '—', example: 'passes 60 L/min at 4 bar', about: 'Flow at pressure drop, fully open.' },
    {
      name: 'reverse',
      shape: { form: 'word', words: ['check'] },
      required: false,
      default: 'no reverse path',
      example: 'reverse check',
      about: 'Check valve built in: free flow from out to in.',
    },
    ...hardware,
  ],
  groups: [],
};
