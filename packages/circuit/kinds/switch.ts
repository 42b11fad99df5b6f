/** Switch. */
import type { Kind } from './kind.ts';
import { hardware } from './common.ts';
import { has } from './read.ts';

export const switchKind: Kind = {
  name: 'switch',
  noun: 'switch',
  about: 'Switch: pressure, level, temperature, position, filter clogging, or an outside contact.',
  ports: [{ name: 'P', role: 'any', required: false, about: 'Pressure it feels; not there when it is `on` something or `outside`.' }],
  chain: { how: 'fixed', port: 'P' },
  properties: [
    {
      name: 'on',
      shape: { form: 'reference', kinds: [] },
      required: false,
      default: 'its port',
      example: 'on C2 | on R1 | on F2 | on V1',
      about: 'What it feels instead of a port: an actuator, a reservoir, a filter, a valve.',
    },
    {
      name: 'rises',
      shape: { form: 'quantity', dimensions: ['pressure', 'temperature', 'volume'] },
      required: false,
      group: 'what',
      default: '—',
      example: 'rises 60 bar',
      about: 'On at this value and above.',
    },
    {
      name: 'falls',
      shape: { form: 'quantity', dimensions: ['pressure', 'temperature', 'volume'] },
      required: false,
      group: 'what',
      default: '—',
      example: 'falls 52 bar',
      about: 'Off at this value and below.',
    },
    {
      name: 'at',
      shape: { form: 'place' },
      required: false,
      group: 'what',
      default: '—',
      example: 'at 265 mm | at a | at open',
      about: 'On at this position of the actuator or valve.',
    },
    {
      name: 'from',
      shape: { form: 'range', dimensions: ['length', 'angle'] },
      required: false,
      group: 'what',
      default: '—',
      example: 'from 255 mm to 320 mm',
      about: 'On inside this range of positions.',
    },
    {
      name: 'outside',
      shape: { form: 'flag' },
      required: false,
      group: 'what',
      default: '—',
      example: 'outside',
      about: 'Button, guard or signal from outside: the study takes it as the step needs it.',
    },
    {
      name: 'broken',
      shape: { form: 'flag' },
      required: false,
      default: 'on = current flows',
      example: 'broken',
      about: 'Contact that opens at the event; `on` always means current flows.',
    },
    ...hardware,
  ],
  groups: [{ name: 'what', need: 'at least one', of: ['rises', 'falls', 'at', 'from', 'outside'] }],
  portsOf(component) {
    return ['on', 'at', 'from', 'outside'].some((n) => has(component, n)) ? [] : switchKind.ports;
  },
  chainOf(component) {
    return ['on', 'at', 'from', 'outside'].some((n) => has(component, n)) ? { how: 'none' } : switchKind.chain;
  },
  assemble() {},
};
