/** Counterbalance valve. */
import type { Kind } from './kind.ts';
import { hardware } from './common.ts';

export const counterbalance: Kind = {
  name: 'counterbalance',
  noun: 'counterbalance valve',
  about: 'Counterbalance valve: free from V to C; holds the load on C until its pressure, helped by the pilot, exceeds the setting.',
  ports: [
    { name: 'V', role: 'working', required: true, about: 'Valve side.' },
    { name: 'C', role: 'holding', required: true, about: 'Cylinder side: the holding chamber.' },
    { name: 'X', role: 'pilot', required: false, about: 'Pilot, from the other side of the actuator.' },
    { name: 'Y', role: 'drain', required: false, about: 'Vent of the spring chamber; joined, back pressure at V has no effect.' },
  ],
  chain: { how: 'none' },
  properties: [
    { name: 'set', shape: { form: 'quantity', dimensions: ['pressure'] }, required: true, default: '—', example: 'set 210 bar', about: 'Pressure at C that begins to open it without pilot.' },
    { name: 'ratio', shape: { form: 'ratio' }, required: true, default: '—', example: 'ratio 3:1', about: 'Pilot ratio: 1 bar at X opens like `ratio` bar at C.' },
    {
      name: 'passes',
      shape: { form: 'flowAt' },
      required: false,
      default: 'no loss (said among assumptions)',
      example: 'passes 60 L/min at 6 bar',
      about: 'Flow at pressure drop of the open valve. Left out: no loss is counted, and the report says so.',
    },
    ...hardware,
  ],
  groups: [],
};
