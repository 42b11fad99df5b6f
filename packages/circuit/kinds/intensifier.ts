/** Intensifier. */
import type { Kind } from './kind.ts';
import { si } from './read.ts';
import { hardware } from './common.ts';

export const intensifier: Kind = {
  name: 'intensifier',
  noun: 'intensifier',
  about: 'Pressure intensifier, double-acting: A reaches `ratio` times the pressure at P.',
  ports: [
    { name: 'P', role: 'pressure', required: true, about: 'Low pressure in.' },
    { name: 'A', role: 'working', required: true, about: 'High pressure out.' },
    { name: 'T', role: 'return', required: true, about: 'Return of the driving side.' },
  ],
  chain: { how: 'through', from: 'P', to: 'A' },
  properties: [
    {
      name: 'ratio',
      shape: { form: 'ratio' },
      required: true,
      default: '—',
      example: 'ratio 4:1',
      about: 'Pressure at A to pressure at P.',
    },
    ...hardware,
  ],
  groups: [],
  /** Continuous, double-acting, no friction: A up to ratio times P, its flow the ratio-th part. */
  assemble(component, into) {
    const ratio = si(component, 'ratio');
    if (ratio === undefined) return into.cannot(component, `${component.id} has no \`ratio\``);
    into.assume({
      component: component.id,
      property: 'friction',
      value: 'none',
      source: 'not counted',
      note: 'an intensifier is computed without friction',
    });
    into.add(
      component,
      {
        type: 'intensifier',
        p: into.nodeOrBlind(component, 'P'),
        a: into.nodeOrBlind(component, 'A'),
        t: into.nodeOrBlind(component, 'T'),
        ratio,
      },
      ['P', 'A', 'T'],
      'P to A',
    );
  },
};
