/** Pilot-operated check valve. */
import type { Kind } from './kind.ts';
import { hardware } from './common.ts';

export const pilotcheck: Kind = {
  name: 'pilotcheck',
  noun: 'pilot-operated check valve',
  about: 'Pilot-operated check valve: free from V to C, held shut by the load on C until the pilot opens it.',
  ports: [
    { name: 'V', role: 'working', required: true, about: 'Valve side.' },
    { name: 'C', role: 'holding', required: true, about: 'Cylinder side: the holding chamber.' },
    { name: 'X', role: 'pilot', required: true, about: 'Pilot that opens C to V.' },
    { name: 'Y', role: 'drain', required: false, about: 'Drain of the pilot piston; joined, back pressure at V does not act against the pilot.' },
  ],
  chain: { how: 'none' },
  properties: [
    { name: 'ratio', shape: { form: 'ratio' }, required: true, default: '—', example: 'ratio 3:1', about: 'Area of pilot piston to seat.' },
    {
      name: 'crack',
      shape: { form: 'quantity', dimensions: ['pressure'] },
      required: false,
      default: '1 bar',
      defaultSource: 'common practice, from memory',
      example: 'crack 1 bar',
      about: 'Pressure drop at which it opens from V to C.',
    },
    { name: 'decompressing', shape: { form: 'flag' }, required: false, default: 'none', example: 'decompressing', about: 'A small poppet opens first and lets trapped pressure down.' },
    {
      name: 'passes',
      shape: { form: 'flowAt' },
      required: false,
      default: 'no loss (said among assumptions)',
      example: 'passes 60 L/min at 4 bar',
      about: 'Flow at pressure drop of the open valve. Left out: no loss is counted, and the report says so.',
    },
    ...hardware,
  ],
  groups: [],
};
