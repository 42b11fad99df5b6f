/** Shut-off valve. */
import type { Kind } from './kind.ts';
import { hardware } from './common.ts';

export const shutoff: Kind = {
  name: 'shutoff',
  noun: 'shut-off valve',
  about: '',
  ports: [
    { name: 'A', role: 'any', required: true, about: '' },
    { name: 'B', role: 'any', required: true, about: '' },
  ],
  chain: { how: 'through', from: 'A', to: 'B' },
  properties: [
    { name: 'open', shape: { form: 'flag' }, required: false, group: 'position', default: '—', example: 'open', about: '' },
    { name: 'closed', shape: { form: 'flag' }, required: false, group: 'position', default: '—', example: 'closed', about: '' },
    { name: 'locked', shape: { form: 'flag' }, required: false, default: '—', example: 'locked', about: '' },
    { name: 'passes', shape: { form: 'flowAt' }, required: false, default: 'no loss (said among assumptions)', example: 'passes 100 L/min at 1 bar', about: '' },
    ...hardware,
  ],
  groups: [{ name: 'position', need: 'exactly one', of: ['open', 'closed'] }],
};
