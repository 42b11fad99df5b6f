/** Throttle. */
import type { Kind } from './kind.ts';
import { hardware } from './common.ts';

export const throttle: Kind = {
  name: 'throttle',
  noun: 'throttle',
  about: '',
  ports: [
    { name: 'in', role: 'any', required: true, about: '' },
    { name: 'out', role: 'any', required: true, about: '' },
    { name: 'T', role: 'return', required: false, about: '' },
  ],
  chain: { how: 'through', from: 'in', to: 'out' },
  properties: [
    { name: 'set', shape: { form: 'quantity', dimensions: ['flow'] }, required: false, group: 'metering', default: '—', example: 'set 1.8 L/min', about: '' },
    { name: 'opening', shape: { form: 'quantity', dimensions: ['ratio'] }, required: false, default: '100 %', example: 'opening 40 %', about: '' },
    { name: 'orifice', shape: { form: 'quantity', dimensions: ['length'] }, required: false, group: 'metering', default: '—', example: 'orifice 0.8 mm', about: '' },
    { name: 'compensated', shape: { form: 'flag' }, required: false, default: 'follows the pressure drop', example: 'compensated', about: '' },
    { name: 'needs', shape: { form: 'quantity', dimensions: ['pressure'] }, required: false, default: '6 bar', example: 'needs 8 bar', about: '' },
    { name: 'reverse', shape: { form: 'word', words: ['check'] }, required: false, default: 'no reverse path', example: 'reverse check', about: '' },
    { name: 'coil', shape: { form: 'coil' }, required: false, many: true, default: '—', example: 'coil a SOL1, coil b SOL2 24 V', about: '' },
    { name: 'passes', shape: { form: 'flowAt' }, required: false, group: 'metering', default: '—', example: 'passes 20 L/min at 5 bar', about: '' },
    ...hardware,
  ],
  groups: [{ name: 'metering', need: 'exactly one', of: ['set', 'orifice', 'passes'] }],
};
