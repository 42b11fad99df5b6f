/** Cylinder. */
import type { Kind } from './kind.ts';
import { hardware } from './common.ts';

export const cylinder: Kind = {
  name: 'cylinder',
  noun: 'cylinder',
  about: '',
  ports: [
    { name: 'cap', role: 'working', required: true, about: '' },
    { name: 'rod', role: 'working', required: true, about: '' },
  ],
  chain: { how: 'none' },
  properties: [
    { name: 'bore', shape: { form: 'quantity', dimensions: ['length'] }, required: true, default: '—', example: 'bore 63 mm', about: '' },
    { name: 'rod', shape: { form: 'quantity', dimensions: ['length'] }, required: false, default: 'none (plunger)', example: 'rod 36 mm', about: '' },
    { name: 'stroke', shape: { form: 'quantity', dimensions: ['length'] }, required: true, default: '—', example: 'stroke 320 mm', about: '' },
    { name: 'attitude', shape: { form: 'attitude' }, required: false, default: 'asked for when a mass or people are stated', example: 'attitude rod down', about: '' },
    { name: 'begins', shape: { form: 'place' }, required: false, default: 'retracted', example: 'begins extended', about: '' },
    { name: 'cushion', shape: { form: 'quantity', dimensions: ['length'] }, required: false, default: 'none', example: 'cushion 25 mm', about: '' },
    { name: 'single', shape: { form: 'word', words: ['cap', 'rod'] }, required: false, default: 'double-acting', example: 'single cap', about: '' },
    { name: 'spring', shape: { form: 'span', dimension: 'force' }, required: false, default: 'none', example: 'spring 200 N to 600 N', about: '' },
    { name: 'through', shape: { form: 'flag' }, required: false, default: '—', example: 'through', about: '' },
    { name: 'telescopic', shape: { form: 'list', dimension: 'length' }, required: false, default: '—', example: 'telescopic 80 mm and 60 mm', about: '' },
    { name: 'mounted', shape: { form: 'word', words: ['flange', 'clevis', 'trunnion', 'foot'] }, required: false, default: '—', example: 'mounted clevis', about: '' },
    { name: 'connection', shape: { form: 'quantity', dimensions: ['length'] }, required: false, default: '—', example: 'connection 19 mm', about: '' },
    { name: 'seal', shape: { form: 'quantity', dimensions: ['pressure'] }, required: false, default: '3 bar', example: 'seal 4 bar', about: '' },
    ...hardware,
  ],
  groups: [],
};
