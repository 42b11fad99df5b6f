/** Semi-rotary actuator. */
import type { Kind } from './kind.ts';
import { toArea } from '../assembly/units.ts';
import { addLeak } from './passing.ts';
import { si } from './read.ts';
import { hardware } from './common.ts';

export const rotary: Kind = {
  name: 'rotary',
  noun: 'semi-rotary actuator',
  about: 'Semi-rotary actuator: turns forward when oil goes in at A, between its stops.',
  ports: [
    { name: 'A', role: 'working', required: true, about: 'Oil in here turns forward.' },
    { name: 'B', role: 'working', required: true, about: 'Oil in here turns backward.' },
  ],
  chain: { how: 'none' },
  properties: [
    {
      name: 'displacement',
      shape: { form: 'quantity', dimensions: ['displacement'] },
      required: true,
      default: '—',
      example: 'displacement 120 cm3/rad',
      about: 'Volume an angle.',
    },
    {
      name: 'angle',
      shape: { form: 'quantity', dimensions: ['angle'] },
      required: true,
      default: '—',
      example: 'angle 270 deg',
      about: 'Angle between the stops.',
    },
    ...hardware,
  ],
  groups: [],
  /** Torque = pressure difference x volume an angle, less a tenth for friction; stops at 0 and `angle`. */
  assemble(component, into) {
    const displacement = si(component, 'displacement');
    if (displacement === undefined || !(displacement > 0)) return into.cannot(component, `${component.id} has no \`displacement\``);
    const angle = si(component, 'angle');
    if (angle === undefined) return into.cannot(component, `${component.id} has no \`angle\``);
    const area = toArea(displacement);
    const a = into.nodeOrBlind(component, 'A');
    const b = into.nodeOrBlind(component, 'B');
    into.chamber(component, { node: a, area }, 'A', displacement * angle);
    into.chamber(component, { node: b, area: -area }, 'B', displacement * angle);
    into.pressureFriction(component, 0.1 * area);
    into.assume({
      component: component.id,
      property: 'friction',
      value: '10 % of the torque',
      source: 'memory',
      note: 'common practice, from memory',
    });
    addLeak(component, into, { node: a, port: 'A' }, { node: b, port: 'B' }, 5);
  },
};
