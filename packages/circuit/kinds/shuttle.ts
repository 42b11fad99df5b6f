/** Shuttle valve. */
import type { Kind } from './kind.ts';
import { hardware } from './common.ts';

export const shuttle: Kind = {
  name: 'shuttle',
  noun: 'shuttle valve',
  about: 'Shuttle valve: joins the higher of A and B to C.',
  ports: [
    { name: 'A', role: 'any', required: true, about: 'One inlet.' },
    { name: 'B', role: 'any', required: true, about: 'The other inlet.' },
    { name: 'C', role: 'any', required: true, about: 'Outlet: the higher pressure.' },
  ],
  chain: { how: 'none' },
  properties: [...hardware],
  groups: [],
};
