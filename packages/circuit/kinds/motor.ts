/** Hydraulic motor. */
import type { Kind } from './kind.ts';
import { hardware } from './common.ts';

export const motor: Kind = {
  name: 'motor',
  noun: 'hydraulic motor',
  about: 'Hydraulic motor: turns forward when oil goes in at A.',
  ports: [
    { name: 'A', role: 'working', required: true, about: 'Oil in here turns forward.' },
    { name: 'B', role: 'working', required: true, about: 'Oil in here turns backward.' },
    { name: 'L', role: 'drain', required: false, about: 'Casing drain; not joined: leakage goes to the lower port.' },
  ],
  chain: { how: 'none' },
  properties: [
    {
      name: 'displacement',
      shape: { form: 'quantity', dimensions: ['displacement'] },
      required: true,
      default: '—',
      example: 'displacement 160 cm3/rev',
      about: 'Volume a revolution of the motor shaft.',
    },
    {
      name: 'volumetric',
      shape: { form: 'quantity', dimensions: ['ratio'] },
      required: false,
      default: '94 % at rated pressure',
      defaultSource: 'common practice, from memory',
      example: 'volumetric 95 %',
      about: 'Volumetric efficiency at `rated` pressure and `fastest` speed.',
    },
    {
      name: 'mechanical',
      shape: { form: 'quantity', dimensions: ['ratio'] },
      required: false,
      default: '90 %',
      defaultSource: 'common practice, from memory',
      example: 'mechanical 92 %',
      about: 'Hydro-mechanical efficiency.',
    },
    { name: 'gear', shape: { form: 'ratio' }, required: false, default: '1:1', example: 'gear 20:1', about: 'Reduction gear at the shaft, without loss; speed and load are at its output.' },
    {
      name: 'fastest',
      shape: { form: 'quantity', dimensions: ['rotation'] },
      required: false,
      default: '—',
      example: 'fastest 600 rpm',
      about: 'Highest speed of the motor shaft.',
    },
    {
      name: 'casing',
      shape: { form: 'quantity', dimensions: ['pressure'] },
      required: false,
      default: '2 bar',
      defaultSource: 'common practice, from memory',
      example: 'casing 2 bar',
      about: 'Highest pressure allowed at L; a limit for the rules.',
    },
    ...hardware,
  ],
  groups: [],
};
