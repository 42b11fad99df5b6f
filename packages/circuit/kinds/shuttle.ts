/** Shuttle valve. */
import type { Kind } from './kind.ts';
import { NO_LOSS, pathK } from '../assembly/laws.ts';
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
  /** The higher of A and B is joined to C without loss. */
  assemble(component, into) {
    into.add(
      component,
      {
        type: 'shuttle',
        a: into.nodeOrBlind(component, 'A'),
        b: into.nodeOrBlind(component, 'B'),
        c: into.nodeOrBlind(component, 'C'),
        k: pathK(NO_LOSS),
      },
      ['A', 'B', 'C'],
      'A or B to C',
    );
  },
};
