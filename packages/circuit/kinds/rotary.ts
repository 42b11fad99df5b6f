/** Semi-rotary actuator. */
import type { Kind } from './kind.ts';
import { hardware } from './common.ts';

export const rotary: Kind = {
  name: 'rotary',
  noun: 'semi-rotary actuator',
  about: '',
  ports: [
    { name: 'A', role: 'working', required: true, about: '' },
    { name: 'B', role: 'working', required: true, about: '' },
  ],
  chain: { how: 'none' },
  properties: [
    { name: 'displacement', shape: { form: 'quantity', dimensions: ['displacement'] }, required: true, default: '—', example: 'displacement 120 cm3/rad', about: '' },
    { name: 'angle', shape: { form: 'quantity', dimensions: ['angle'] }, required: true, default: '—', example: 'angle 270 deg', about: '' },
    ...hardware,
  ],
  groups: [],
};
