/** Deceleration valve. */
import type { Kind } from './kind.ts';
import { hardware } from './common.ts';

export const deceleration: Kind = {
  name: 'deceleration',
  noun: 'deceleration valve',
  about: '',
  ports: [
    { name: 'in', role: 'working', required: true, about: '' },
    { name: 'out', role: 'working', required: true, about: '' },
  ],
  chain: { how: 'through', from: 'in', to: 'out' },
  properties: [
    { name: 'closed', shape: { form: 'cam', small: 'by' }, required: true, default: '—', example: 'closed by C2 from 250 mm to 265 mm', about: '' },
    { name: 'passes', shape: { form: 'flowAt' }, required: true, default: '—', example: 'passes 60 L/min at 4 bar', about: '' },
    { name: 'reverse', shape: { form: 'word', words: ['check'] }, required: false, default: 'no reverse path', example: 'reverse check', about: '' },
    ...hardware,
  ],
  groups: [],
};
