/** Sensor. */
import type { Kind } from './kind.ts';
import { hardware } from './common.ts';
import { has } from './read.ts';

export const sensor: Kind = {
  name: 'sensor',
  noun: 'sensor',
  about: 'Sensor: reads pressure, position or temperature.',
  ports: [{ name: 'P', role: 'any', required: false, about: 'Pressure it feels; not there when it is `on` something.' }],
  chain: { how: 'fixed', port: 'P' },
  properties: [
    {
      name: 'on',
      shape: { form: 'reference', kinds: [] },
      required: false,
      default: 'its port',
      example: 'on C2',
      about: 'What it reads instead of a port.',
    },
    {
      name: 'range',
      shape: { form: 'range', dimensions: [] },
      required: true,
      default: '—',
      example: 'range 0 bar to 250 bar',
      about: 'Measuring range; readings are held at its ends.',
    },
    ...hardware,
  ],
  groups: [],
  portsOf(component) {
    return has(component, 'on') ? [] : sensor.ports;
  },
  chainOf(component) {
    return has(component, 'on') ? { how: 'none' } : sensor.chain;
  },
  assemble() {},
};
