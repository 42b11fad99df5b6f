/** Reservoir. */
import type { Kind } from './kind.ts';
import { hardware } from './common.ts';

export const reservoir: Kind = {
  name: 'reservoir',
  noun: 'reservoir',
  about: '',
  ports: [
  ],
  chain: { how: 'any' },
  properties: [
    { name: 'volume', shape: { form: 'quantity', dimensions: ['volume'] }, required: true, default: '—', example: 'volume 160 L', about: '' },
    { name: 'usable', shape: { form: 'quantity', dimensions: ['volume'] }, required: false, default: '25 % of volume', example: 'usable 50 L', about: '' },
    { name: 'surface', shape: { form: 'quantity', dimensions: ['area'] }, required: false, default: 'from volume', example: 'surface 1.9 m2', about: '' },
    { name: 'ambient', shape: { form: 'range', dimensions: ['temperature'] }, required: false, default: '20 degC', example: 'ambient 10 degC to 35 degC', about: '' },
    { name: 'breather', shape: { form: 'flag' }, required: false, default: 'none', example: 'breather', about: '' },
    ...hardware,
  ],
  groups: [],
};
