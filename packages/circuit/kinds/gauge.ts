/** Gauge. */
import type { Kind } from './kind.ts';
import { hardware } from './common.ts';

export const gauge: Kind = {
  name: 'gauge',
  noun: 'gauge',
  about: '',
  ports: [
    { name: 'P', role: 'any', required: true, about: '' },
  ],
  chain: { how: 'fixed', port: 'P' },
  properties: [
    { name: 'range', shape: { form: 'range', dimensions: ['pressure'] }, required: false, default: '—', example: 'range 0 bar to 250 bar', about: '' },
    { name: 'test', shape: { form: 'word', words: ['point'] }, required: false, default: '—', example: 'test point', about: '' },
    ...hardware,
  ],
  groups: [],
};
