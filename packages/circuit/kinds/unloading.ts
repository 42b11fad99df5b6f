/** Unloading valve. */
import type { Kind } from './kind.ts';
import { hardware } from './common.ts';

export const unloading: Kind = {
  name: 'unloading',
  noun: 'unloading valve',
  about: 'Unloading valve: leads the pump from P to T without pressure while the pilot at X is above its setting.',
  ports: [
    { name: 'P', role: 'pressure', required: true, about: 'Pump outlet that is unloaded.' },
    { name: 'T', role: 'return', required: true, about: 'To the reservoir.' },
    { name: 'X', role: 'pilot', required: true, about: 'Pilot: pressure behind the check valve.' },
    { name: 'Y', role: 'drain', required: false, about: 'Drain of the pilot stage, led away separately.' },
  ],
  chain: { how: 'end', entry: 'P', exit: 'T' },
  properties: [
    { name: 'set', shape: { form: 'quantity', dimensions: ['pressure'] }, required: true, default: '—', example: 'set 45 bar', about: 'Pilot pressure at which it begins to open; fully open (lifted) 10 % above.' },
    {
      name: 'closes',
      shape: { form: 'quantity', dimensions: ['pressure'] },
      required: false,
      default: '90 % of set',
      defaultSource: 'common practice, from memory',
      example: 'closes 38 bar',
      about: 'Pilot pressure at which a lifted valve has closed again; below `set`.',
    },
    { name: 'passes', shape: { form: 'flowAt' }, required: true, default: '—', example: 'passes 80 L/min at 3 bar', about: 'Flow at pressure drop, fully open.' },
    ...hardware,
  ],
  groups: [],
};
