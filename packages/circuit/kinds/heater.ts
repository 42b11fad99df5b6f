/** Heater. */
import type { Kind } from './kind.ts';
import { hardware } from './common.ts';

export const heater: Kind = {
  name: 'heater',
  noun: 'heater',
  about: 'Heater in a reservoir, for the cold start.',
  ports: [],
  chain: { how: 'none' },
  properties: [
    {
      name: 'on',
      shape: { form: 'reference', kinds: ['reservoir'] },
      required: true,
      default: '—',
      example: 'on R1',
      about: 'The reservoir it warms.',
    },
    {
      name: 'power',
      shape: { form: 'quantity', dimensions: ['power'] },
      required: true,
      default: '—',
      example: 'power 1 kW',
      about: 'Electric power.',
    },
    ...hardware,
  ],
  groups: [],
  assemble() {},
};
