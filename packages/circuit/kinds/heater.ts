/** Heater. */
import type { Kind } from './kind.ts';
import { hardware } from './common.ts';

export const heater: Kind = {
  name: 'heater',
  noun: 'heater',
  about: '',
  ports: [
  ],
  chain: { how: 'none' },
  properties: [
    { name: 'on', shape: { form: 'reference', kinds: ['reservoir'] }, required: true, default: '—', example: 'on R1', about: '' },
    { name: 'power', shape: { form: 'quantity', dimensions: ['power'] }, required: true, default: '—', example: 'power 1 kW', about: '' },
    ...hardware,
  ],
  groups: [],
};
