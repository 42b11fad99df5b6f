/** Brake. */
import type { Kind } from './kind.ts';
import { hardware } from './common.ts';

export const brake: Kind = {
  name: 'brake',
  noun: 'brake',
  about: '',
  ports: [
    { name: 'P', role: 'working', required: true, about: '' },
  ],
  chain: { how: 'fixed', port: 'P' },
  properties: [
    { name: 'on', shape: { form: 'reference', kinds: ['motor'] }, required: true, default: '—', example: 'on HM1', about: '' },
    { name: 'opens', shape: { form: 'quantity', dimensions: ['pressure'] }, required: true, default: '—', example: 'opens 18 bar', about: '' },
    { name: 'torque', shape: { form: 'quantity', dimensions: ['torque'] }, required: true, default: '—', example: 'torque 900 N.m', about: '' },
    { name: 'volume', shape: { form: 'quantity', dimensions: ['volume'] }, required: false, default: '—', example: 'volume 25 cm3', about: '' },
    ...hardware,
  ],
  groups: [],
};
