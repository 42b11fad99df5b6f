/** Gauge. */
import type { Kind } from './kind.ts';
import { hardware } from './common.ts';

export const gauge: Kind = {
  name: 'gauge',
  noun: 'gauge',
  about: 'Pressure gauge or test point.',
  ports: [{ name: 'P', role: 'any', required: true, about: 'Pressure it shows.' }],
  chain: { how: 'fixed', port: 'P' },
  properties: [
    {
      name: 'range',
      shape: { form: 'range', dimensions: ['pressure'] },
      required: false,
      default: '—',
      example: 'range 0 bar to 250 bar',
      about: 'Scale.',
    },
    {
      name: 'test',
      shape: { form: 'word', words: ['point'] },
      required: false,
      default: '—',
      example: 'test point',
      about: 'Test point for a gauge instead of one.',
    },
    ...hardware,
  ],
  groups: [],
  assemble() {},
};
