/** Intensifier. */
import type { Kind } from './kind.ts';
import { hardware } from './common.ts';

export const intensifier: Kind = {
  name: 'intensifier',
  noun: 'intensifier',
  about: 'Pressure intensifier, double-acting: A reaches `ratio` times the pressure at P.',
  ports: [
    { name: 'P', role: 'pressure', required: true, about: 'Low pressure in.' },
    { name: 'A', role: 'working', required: true, about: 'High pressure out.' },
    { name: 'T', role: 'return', required: true, about: 'Return of the driving side.' },
  ],
  chain: { how: 'through', from: 'P', to: 'A' },
  properties: [{ name: 'ratio', shape: { form: 'ratio' }, required: true, default: '—', example: 'ratio 4:1', about: 'Pressure at A to pressure at P.' }, ...hardware],
  groups: [],
};
