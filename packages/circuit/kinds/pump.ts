/** Pump. */
import type { Kind } from './kind.ts';
import { hardware } from './common.ts';

export const pump: Kind = {
  name: 'pump',
  noun: 'pump',
  about: '',
  ports: [
    { name: 'S', role: 'suction', required: true, about: '' },
    { name: 'P', role: 'pressure', required: true, about: '' },
    { name: 'L', role: 'drain', required: false, about: '' },
    { name: 'X', role: 'pilot', required: false, about: '' },
    { name: 'LS', role: 'pilot', required: false, about: '' },
  ],
  chain: { how: 'through', from: 'S', to: 'P' },
  properties: [
    { name: 'displacement', shape: { form: 'quantity', dimensions: ['displacement'] }, required: true, default: '—', example: 'displacement 40 cm3/rev', about: '' },
    { name: 'driven', shape: { form: 'reference', small: 'by', kinds: ['drive'] }, required: true, default: '—', example: 'driven by M1', about: '' },
    { name: 'volumetric', shape: { form: 'quantity', dimensions: ['ratio'] }, required: false, default: '92 % at rated pressure', example: 'volumetric 94 %', about: '' },
    { name: 'mechanical', shape: { form: 'quantity', dimensions: ['ratio'] }, required: false, default: '92 %', example: 'mechanical 91 %', about: '' },
    { name: 'compensator', shape: { form: 'quantity', dimensions: ['pressure'] }, required: false, default: 'fixed displacement', example: 'compensator 180 bar', about: '' },
    { name: 'sensing', shape: { form: 'quantity', dimensions: ['pressure'] }, required: false, default: 'none', example: 'sensing 20 bar', about: '' },
    { name: 'smallest', shape: { form: 'quantity', dimensions: ['displacement'] }, required: false, default: '0 cm3/rev', example: 'smallest 4 cm3/rev', about: '' },
    { name: 'inlet', shape: { form: 'quantity', dimensions: ['pressure'] }, required: false, default: '-0.2 bar', example: 'inlet -0.15 bar', about: '' },
    { name: 'casing', shape: { form: 'quantity', dimensions: ['pressure'] }, required: false, default: '1 bar', example: 'casing 2 bar', about: '' },
    { name: 'reliefs', shape: { form: 'quantity', dimensions: ['pressure'] }, required: false, default: 'none inside', example: 'reliefs 210 bar', about: '' },
    ...hardware,
  ],
  groups: [],
};
