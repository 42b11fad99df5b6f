/** Hydraulic motor. */
import type { Kind } from './kind.ts';
import { hardware } from './common.ts';

export const motor: Kind = {
  name: 'motor',
  noun: 'hydraulic motor',
  about: '',
  ports: [
    { name: 'A', role: 'working', required: true, about: '' },
    { name: 'B', role: 'working', required: true, about: '' },
    { name: 'L', role: 'drain', required: false, about: '' },
  ],
  chain: { how: 'none' },
  properties: [
    { name: 'displacement', shape: { form: 'quantity', dimensions: ['displacement'] }, required: true, default: '—', example: 'displacement 160 cm3/rev', about: '' },
    { name: 'volumetric', shape: { form: 'quantity', dimensions: ['ratio'] }, required: false, default: '94 % at rated pressure', example: 'volumetric 95 %', about: '' },
    { name: 'mechanical', shape: { form: 'quantity', dimensions: ['ratio'] }, required: false, default: '90 %', example: 'mechanical 92 %', about: '' },
    { name: 'gear', shape: { form: 'ratio' }, required: false, default: '1:1', example: 'gear 20:1', about: '' },
    { name: 'fastest', shape: { form: 'quantity', dimensions: ['rotation'] }, required: false, default: '—', example: 'fastest 600 rpm', about: '' },
    { name: 'casing', shape: { form: 'quantity', dimensions: ['pressure'] }, required: false, default: '2 bar', example: 'casing 2 bar', about: '' },
    ...hardware,
  ],
  groups: [],
};
