/** Accumulator. */
import type { Kind } from './kind.ts';
import { hardware } from './common.ts';

export const accumulator: Kind = {
  name: 'accumulator',
  noun: 'accumulator',
  about: '',
  ports: [
    { name: 'P', role: 'any', required: true, about: '' },
  ],
  chain: { how: 'fixed', port: 'P' },
  properties: [
    { name: 'volume', shape: { form: 'quantity', dimensions: ['volume'] }, required: true, default: '—', example: 'volume 10 L', about: '' },
    { name: 'precharge', shape: { form: 'precharge' }, required: true, default: '—', example: 'precharge 90 bar at 20 degC', about: '' },
    { name: 'bladder', shape: { form: 'flag' }, required: false, group: 'form', default: '—', example: 'bladder', about: '' },
    { name: 'piston', shape: { form: 'flag' }, required: false, group: 'form', default: '—', example: 'piston', about: '' },
    { name: 'diaphragm', shape: { form: 'flag' }, required: false, group: 'form', default: '—', example: 'diaphragm', about: '' },
    { name: 'gas', shape: { form: 'word', words: ['nitrogen'] }, required: true, default: '—', example: 'gas nitrogen', about: '' },
    ...hardware,
  ],
  groups: [{ name: 'form', need: 'exactly one', of: ['bladder', 'piston', 'diaphragm'] }],
};
