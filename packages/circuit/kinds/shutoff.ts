/** Shut-off valve. */
import type { Kind } from './kind.ts';
import { hardware } from './common.ts';

export const shutoff: Kind = {
  name: 'shutoff',
  noun: 'shut-off valve',
  about: 'Shut-off valve, worked by hand: open or closed as declared in every state.',
  ports: [
    { name: 'A', role: 'any', required: true, about: 'One side.' },
    { name: 'B', role: 'any', required: true, about: 'Other side.' },
  ],
  chain: { how: 'through', from: 'A', to: 'B' },
  properties: [
    { name: 'open', shape: { form: 'flag' }, required: false, group: 'position', default: '—', example: 'open', about: 'Stands open.' },
    { name: 'closed', shape: { form: 'flag' }, required: false, group: 'position', default: '—', example: 'closed', about: 'Stands closed.' },
    { name: 'locked', shape: { form: 'flag' }, required: false, default: '—', example: 'locked', about: 'Secured in its position.' },
    {
      name: 'passes',
      shape: { form: 'flowAt' },
      required: false,
      default: 'no loss (said among assumptions)',
      example: 'passes 100 L/min at 1 bar',
      about: 'Flow at pressure drop of the open valve. Left out: no loss is counted, and the report says so.',
    },
    ...hardware,
  ],
  groups: [{ name: 'position', need: 'exactly one', of: ['open', 'closed'] }],
};
