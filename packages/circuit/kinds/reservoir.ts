/** Reservoir. */
import type { Kind } from './kind.ts';
import { hardware } from './common.ts';

export const reservoir: Kind = {
  name: 'reservoir',
  noun: 'reservoir',
  about: 'Reservoir: holds the fluid; its level pressure is atmospheric. Each line to it is a pipe of its own.',
  ports: [],
  chain: { how: 'any' },
  properties: [
    {
      name: 'volume',
      shape: { form: 'quantity', dimensions: ['volume'] },
      required: true,
      default: '—',
      example: 'volume 160 L',
      about: 'Fluid it holds at the start.',
    },
    {
      name: 'usable',
      shape: { form: 'quantity', dimensions: ['volume'] },
      required: false,
      default: '25 % of volume',
      defaultSource: 'common practice, from memory',
      example: 'usable 50 L',
      about: 'Swing of the level allowed between low and high mark.',
    },
    {
      name: 'surface',
      shape: { form: 'quantity', dimensions: ['area'] },
      required: false,
      default: 'from volume',
      defaultSource: '6 V^(2/3), a cube; common practice, from memory',
      example: 'surface 1.9 m2',
      about: 'Wall area that gives off heat.',
    },
    {
      name: 'ambient',
      shape: { form: 'range', dimensions: ['temperature'] },
      required: false,
      default: '20 degC',
      defaultSource: 'common practice, from memory',
      example: 'ambient 10 degC to 35 degC',
      about: 'Room temperature, lowest to highest.',
    },
    {
      name: 'breather',
      shape: { form: 'flag' },
      required: false,
      default: 'none',
      example: 'breather',
      about: 'It breathes through a filter.',
    },
    ...hardware,
  ],
  groups: [],
  /** Its pipes are fixed nodes at level pressure: nothing to add. */
  assemble() {},
};
