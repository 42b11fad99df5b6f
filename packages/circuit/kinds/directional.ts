/** Directional control valve. */
import type { Kind } from './kind.ts';
import { hardware } from './common.ts';

export const directional: Kind = {
  name: 'directional',
  noun: 'directional control valve',
  about: '',
  ports: [
    { name: 'P', role: 'pressure', required: true, about: '' },
    { name: 'T', role: 'return', required: true, about: '' },
    { name: 'A', role: 'working', required: false, about: '' },
    { name: 'B', role: 'working', required: false, about: '' },
    { name: 'X', role: 'pilot', required: false, about: '' },
    { name: 'Y', role: 'drain', required: false, about: '' },
    { name: 'LS', role: 'pilot', required: false, about: '' },
  ],
  chain: { how: 'through', from: 'P', to: 'A' },
  properties: [
    { name: 'centre', shape: { form: 'position' }, required: false, default: '—', example: 'centre closed | open | tandem | float, or centre (P to T)', about: '' },
    { name: 'a', shape: { form: 'position' }, required: false, default: 'P to A, B to T', example: 'a (P to A, B to T)', about: '' },
    { name: 'b', shape: { form: 'position' }, required: false, default: 'P to B, A to T', example: 'b (P to B, A to T)', about: '' },
    { name: 'spring', shape: { form: 'toWord', words: ['a', 'b', 'centre'] }, required: false, group: 'return', default: '—', example: 'spring to centre', about: '' },
    { name: 'detent', shape: { form: 'flag' }, required: false, group: 'return', default: '—', example: 'detent', about: '' },
    { name: 'normally', shape: { form: 'word', words: ['open', 'closed'] }, required: false, group: 'return', default: '(2/2 and 3/2)', example: 'normally closed', about: '' },
    { name: 'coil', shape: { form: 'coil' }, required: false, many: true, default: '—', example: 'coil a SOL1, coil b SOL2 24 V', about: '' },
    { name: 'lever', shape: { form: 'flag' }, required: false, default: '—', example: 'lever', about: '' },
    { name: 'cam', shape: { form: 'cam' }, required: false, many: true, default: '—', example: 'cam a C2 from 250 mm to 320 mm', about: '' },
    { name: 'external', shape: { form: 'word', words: ['pilot'] }, required: false, default: 'direct or internal pilot', example: 'external pilot', about: '' },
    { name: 'internal', shape: { form: 'word', words: ['pilot'] }, required: false, default: 'direct', example: 'internal pilot', about: '' },
    { name: 'needs', shape: { form: 'quantity', dimensions: ['pressure'] }, required: false, default: '5 bar when piloted', example: 'needs 6 bar', about: '' },
    { name: 'proportional', shape: { form: 'flag' }, required: false, default: 'switching', example: 'proportional', about: '' },
    { name: 'compensator', shape: { form: 'quantity', dimensions: ['pressure'] }, required: false, default: 'none', example: 'compensator 7 bar', about: '' },
    { name: 'poppet', shape: { form: 'flag' }, required: false, default: 'spool (leaks)', example: 'poppet', about: '' },
    { name: 'passes', shape: { form: 'flowAt', perPath: true }, required: true, many: true, default: '—', example: 'passes 60 L/min at 5 bar, passes P to A 40 L/min at 5 bar', about: '' },
    { name: 'takes', shape: { form: 'quantity', dimensions: ['time'] }, required: false, default: '50 ms', example: 'takes 80 ms', about: '' },
    ...hardware,
  ],
  groups: [{ name: 'return', need: 'exactly one', of: ['spring', 'detent', 'normally'] }],
};
