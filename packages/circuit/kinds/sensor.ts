/** Sensor. */
import type { Kind } from './kind.ts';
import { hardware } from './common.ts';

export const sensor: Kind = {
  name: 'sensor',
  noun: 'sensor',
  about: '',
  ports: [
    { name: 'P', role: 'any', required: false, about: '' },
  ],
  chain: { how: 'fixed', port: 'P' },
  properties: [
    { name: 'on', shape: { form: 'reference', kinds: [] }, required: false, default: 'its port', example: 'on C2', about: '' },
    { name: 'range', shape: { form: 'range', dimensions: [] }, required: true, default: '—', example: 'range 0 bar to 250 bar', about: '' },
    ...hardware,
  ],
  groups: [],
};
