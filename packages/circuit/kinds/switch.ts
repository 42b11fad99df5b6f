/** Switch. */
import type { Kind } from './kind.ts';
import { hardware } from './common.ts';

export const switchKind: Kind = {
  name: 'switch',
  noun: 'switch',
  about: '',
  ports: [
    { name: 'P', role: 'any', required: false, about: '' },
  ],
  chain: { how: 'fixed', port: 'P' },
  properties: [
    { name: 'on', shape: { form: 'reference', kinds: [] }, required: false, default: 'its port', example: 'on C2 | on R1 | on F2 | on V1', about: '' },
    { name: 'rises', shape: { form: 'quantity', dimensions: ['pressure', 'temperature', 'volume'] }, required: false, group: 'what', default: '—', example: 'rises 60 bar', about: '' },
    { name: 'falls', shape: { form: 'quantity', dimensions: ['pressure', 'temperature', 'volume'] }, required: false, group: 'what', default: '—', example: 'falls 52 bar', about: '' },
    { name: 'at', shape: { form: 'place' }, required: false, group: 'what', default: '—', example: 'at 265 mm | at a | at open', about: '' },
    { name: 'from', shape: { form: 'range', dimensions: ['length', 'angle'] }, required: false, group: 'what', default: '—', example: 'from 255 mm to 320 mm', about: '' },
    { name: 'outside', shape: { form: 'flag' }, required: false, group: 'what', default: '—', example: 'outside', about: '' },
    { name: 'broken', shape: { form: 'flag' }, required: false, default: 'on = current flows', example: 'broken', about: '' },
    ...hardware,
  ],
  groups: [{ name: 'what', need: 'at least one', of: ['rises', 'falls', 'at', 'from', 'outside'] }],
};
