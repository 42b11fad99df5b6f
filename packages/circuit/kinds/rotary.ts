/** Semi-rotary actuator. */
import type { Kind } from './kind.ts';
import { hardware } from './common.ts';

export const rotary: Kind = {
  name: 'rotary',
  noun: 'semi-rotary actuator',
  about: 'Semi-rotary actuator: turns forward when oil goes in at A, between its stops.',
  ports: [
    { name: 'A', role: 'working', required: true, about: 'Oil in here turns forward.' },
    { name: 'B', role: 'working', required: true, about: 'Oil in here turns backward.' },
  ],
  chain: { how: 'none' },
  properties: [
    {
      name: 'displacement',
      shape: { form: 'quantity', dimensions: ['displacement'] },
      required: true,
      default: '—',
      example: 'displacement 120 cm3/rad',
      about: 'Volume an angle.',
    },
    {
      name: 'angle',
      shape: { form: 'quantity', dimensions: ['angle'] },
      required: true,
      default: '—',
      example: 'angle 270 deg',
      about: 'Angle between the stops.',
    },
    ...hardware,
  ],
  groups: [],
};
