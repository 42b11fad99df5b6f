/** Hose-burst valve. */
import type { Kind } from './kind.ts';
import { hardware } from './common.ts';

export const burst: Kind = {
  name: 'burst',
  noun: 'hose-burst valve',
  about: 'Hose-burst valve: shuts from C to V when the flow exceeds its closing flow; free from V to C.',
  ports: [
    { name: 'V', role: 'working', required: true, about: 'Valve (hose) side.' },
    { name: 'C', role: 'holding', required: true, about: 'Cylinder side.' },
  ],
  chain: { how: 'none' },
  properties: [
    {
      name: 'closes',
      shape: { form: 'quantity', dimensions: ['flow'] },
      required: true,
      default: '—',
      example: 'closes 55 L/min',
      about: 'Flow from C to V at which it shuts; it stays shut until V reaches the pressure of C.',
    },
    {
      name: 'passes',
      shape: { form: 'flowAt' },
      required: false,
      default: 'no loss (said among assumptions)',
      example: 'passes 40 L/min at 2 bar',
      about: 'Flow at pressure drop of the open valve. Left out: no loss is counted, and the report says so.',
    },
    ...hardware,
  ],
  groups: [],
};
