/** Fluid. */
import type { Kind } from './kind.ts';
import { commonCode } from './common.ts';

export const fluid: Kind = {
  name: 'fluid',
  noun: 'fluid',
  about: '',
  ports: [
  ],
  chain: { how: 'none' },
  properties: [
    { name: 'grade', shape: { form: 'number' }, required: true, default: '—', example: 'grade 46', about: '' },
    { name: 'index', shape: { form: 'number' }, required: false, default: '95', example: 'index 100', about: '' },
    { name: 'density', shape: { form: 'quantity', dimensions: ['density'] }, required: false, default: '870 kg/m3', example: 'density 865 kg/m3', about: '' },
    { name: 'temperature', shape: { form: 'quantity', dimensions: ['temperature'] }, required: true, default: '—', example: 'temperature 45 degC', about: '' },
    { name: 'cold', shape: { form: 'quantity', dimensions: ['temperature'] }, required: false, default: '—', example: 'cold 10 degC', about: '' },
    { name: 'hot', shape: { form: 'quantity', dimensions: ['temperature'] }, required: false, default: '—', example: 'hot 60 degC', about: '' },
    { name: 'bulk', shape: { form: 'quantity', dimensions: ['pressure'] }, required: false, default: '14000 bar', example: 'bulk 1.4 GPa', about: '' },
    { name: 'air', shape: { form: 'quantity', dimensions: ['ratio'] }, required: false, default: '0.5 %', example: 'air 1 %', about: '' },
    { name: 'cleanliness', shape: { form: 'text' }, required: false, default: '—', example: 'cleanliness "19/17/14"', about: '' },
    ...commonCode,
  ],
  groups: [],
};
