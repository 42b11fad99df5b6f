/** Drive. */
import type { Kind } from './kind.ts';
import { hardware } from './common.ts';

export const drive: Kind = {
  name: 'drive',
  noun: 'drive',
  about: '',
  ports: [
  ],
  chain: { how: 'none' },
  properties: [
    { name: 'engine', shape: { form: 'flag' }, required: false, default: 'electric motor', example: 'engine', about: '' },
    { name: 'power', shape: { form: 'quantity', dimensions: ['power'] }, required: true, default: '—', example: 'power 5.5 kW', about: '' },
    { name: 'speed', shape: { form: 'quantity', dimensions: ['rotation'] }, required: true, default: '—', example: 'speed 1450 rpm', about: '' },
    { name: 'peak', shape: { form: 'quantity', dimensions: ['ratio'] }, required: false, default: '100 %', example: 'peak 130 %', about: '' },
    { name: 'starts', shape: { form: 'word', words: ['direct', 'star', 'soft'] }, required: false, default: 'direct', example: 'starts star', about: '' },
    ...hardware,
  ],
  groups: [],
};
