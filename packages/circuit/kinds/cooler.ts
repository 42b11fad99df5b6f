/** Cooler. */
import type { Kind } from './kind.ts';
import { hardware } from './common.ts';

export const cooler: Kind = {
  name: 'cooler',
  noun: 'cooler',
  about: '',
  ports: [
    { name: 'in', role: 'any', required: true, about: '' },
    { name: 'out', role: 'any', required: true, about: '' },
  ],
  chain: { how: 'through', from: 'in', to: 'out' },
  properties: [
    { name: 'power', shape: { form: 'quantity', dimensions: ['power/temperature'] }, required: true, default: '—', example: 'power 0.25 kW/K', about: '' },
    { name: 'passes', shape: { form: 'flowAt' }, required: false, default: 'no loss (said among assumptions)', example: 'passes 40 L/min at 0.8 bar', about: '' },
    { name: 'coolant', shape: { form: 'quantity', dimensions: ['temperature'] }, required: false, default: 'ambient', example: 'coolant 20 degC', about: '' },
    ...hardware,
  ],
  groups: [],
};
