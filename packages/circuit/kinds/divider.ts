/** Flow divider. */
import type { Kind } from './kind.ts';
import { hardware } from './common.ts';

export const divider: Kind = {
  name: 'divider',
  noun: 'flow divider',
  about: 'Flow divider: shares the flow at P between A and B.',
  ports: [
    { name: 'P', role: 'working', required: true, about: 'Undivided side.' },
    { name: 'A', role: 'working', required: true, about: 'First share.' },
    { name: 'B', role: 'working', required: true, about: 'Second share.' },
  ],
  chain: { how: 'none' },
  properties: [
    { name: 'gear', shape: { form: 'flag' }, required: false, group: 'form', default: '—', example: 'gear', about: 'Rotary: two sections on one shaft; divides and combines.' },
    { name: 'spool', shape: { form: 'flag' }, required: false, group: 'form', default: '—', example: 'spool', about: 'Spool type: throttles the side that gets too much.' },
    { name: 'combines', shape: { form: 'flag' }, required: false, default: 'divides only', example: 'combines', about: 'A spool type that also combines the flows coming back.' },
    { name: 'share', shape: { form: 'ratio' }, required: false, default: '1:1', example: 'share 1:1', about: 'Share of A to B.' },
    { name: 'error', shape: { form: 'quantity', dimensions: ['ratio'] }, required: false, default: '3 %', defaultSource: 'common practice, from memory', example: 'error 2 %', about: 'Difference of a share from its due, at full flow and 100 bar between the outlets (gear).' },
    {
      name: 'passes',
      shape: { form: 'flowAt' },
      required: false,
      default: 'no loss (said among assumptions)',
      example: 'passes 40 L/min at 8 bar',
      about: 'Flow at pressure drop. Left out: no friction is counted, and the report says so.',
    },
    ...hardware,
  ],
  groups: [{ name: 'form', need: 'exactly one', of: ['gear', 'spool'] }],
};
