/** Shuttle valve. */
import type { Kind } from './kind.ts';
import { hardware } from './common.ts';

export const shuttle: Kind = {
  name: 'shuttle',
  noun: 'shuttle valve',
  about: '',
  ports: [
    { name: 'A', role: 'any', required: true, about: '' },
    { name: 'B', role: 'any', required: true, about: '' },
    { name: 'C', role: 'any', required: true, about: '' },
  ],
  chain: { how: 'none' },
  properties: [
    ...hardware,
  ],
  groups: [],
};
