/** Pressure-reducing valve. */
import type { Kind } from './kind.ts';
import { hardware } from './common.ts';

export const reducing: Kind = {
  name: 'reducing',
  noun: 'pressure-reducing valve',
  about: 'Pressure-reducing valve: keeps A at its setting while P is higher.',
  ports: [
    { name: 'P', role: 'pressure', required: true, about: 'Inlet.' },
    { name: 'A', role: 'working', required: true, about: 'Reduced pressure.' },
    { name: 'Y', role: 'drain', required: true, about: 'Drain of the spring chamber, to the reservoir.' },
  ],
  chain: { how: 'through', from: 'P', to: 'A' },
  properties: [
    { name: 'set', shape: { form: 'quantity', dimensions: ['pressure'] }, required: true, default: '—', example: 'set 70 bar', about: 'Pressure at A without flow; with flow A sags by up to 5 %.' },
    { name: 'relieving', shape: { form: 'word', words: ['yes', 'no'] }, required: true, default: '—', example: 'relieving yes', about: '`yes`: pressure above the setting at A is let out to Y; `no`: it is trapped.' },
    {
      name: 'reverse',
      shape: { form: 'word', words: ['check'] },
      required: false,
      default: 'no reverse path',
      example: 'reverse check',
      about: 'Check valve built in: free flow from A to P.',
    },
    {
      name: 'coil',
      shape: { form: 'coil' },
      required: false,
      many: true,
      default: '—',
      example: 'coil a SOL1, coil b SOL2 24 V',
      about: 'Solenoid on the setting: command in % of it, or directly in its dimension. Dead coil = lowest setting.',
    },
    {
      name: 'passes',
      shape: { form: 'flowAt' },
      required: false,
      default: 'no loss (said among assumptions)',
      example: 'passes 40 L/min at 5 bar',
      about: 'Flow at pressure drop of the open valve. Left out: no loss is counted, and the report says so.',
    },
    ...hardware,
  ],
  groups: [],
};
