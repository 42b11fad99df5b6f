/** Intensifier. */
import type { Kind } from './kind.ts';
import { hardware } from './common.ts';

export const intensifier: Kind = {
  name: 'intensifier',
  noun: 'intensifier',
  about: '',
  ports: [
    { name: 'P', role: 'pressure', required: true, about: '' },
    { name: 'A', role: 'working', required: true, about: '' },
    { name: 'T', role: 'return', required: true, about: '' },
  ],
  chain: { how: 'through', from: 'P', to: 'A' },
  properties: [
    { name: 'ratio', shape: { form: 'ratio' }, required: true, default: '—', example: 'ratio 4:1', about: '' },
    ...hardware,
  ],
  groups: [],
};
