/** Brake. */
import type { Kind } from './kind.ts';
import { toLitres, toMPa } from '../assembly/units.ts';
import { reference, si, word } from './read.ts';
import { hardware } from './common.ts';

export const brake: Kind = {
  name: 'brake',
  noun: 'brake',
  about: 'Spring-applied brake of a hydraulic motor, opened by pressure.',
  ports: [{ name: 'P', role: 'working', required: true, about: 'Release pressure.' }],
  chain: { how: 'fixed', port: 'P' },
  properties: [
    {
      name: 'on',
      shape: { form: 'reference', kinds: ['motor'] },
      required: true,
      default: '—',
      example: 'on HM1',
      about: 'The motor it holds.',
    },
    {
      name: 'opens',
      shape: { form: 'quantity', dimensions: ['pressure'] },
      required: true,
      default: '—',
      example: 'opens 18 bar',
      about: 'Pressure at which it is fully open; it holds less in proportion below.',
    },
    {
      name: 'torque',
      shape: { form: 'quantity', dimensions: ['torque'] },
      required: true,
      default: '—',
      example: 'torque 900 N.m',
      about: 'Torque held without pressure, at the motor shaft.',
    },
    {
      name: 'volume',
      shape: { form: 'quantity', dimensions: ['volume'] },
      required: false,
      default: '—',
      example: 'volume 25 cm3',
      about: 'Oil taken up to full release.',
    },
    ...hardware,
  ],
  groups: [],
  /** Holds torque (1 - p/opens) at the motor shaft; its volume is stored oil up to `opens`. */
  assemble(component, into) {
    const opens = si(component, 'opens');
    const torque = si(component, 'torque');
    const motorId = reference(component, 'on')?.id ?? word(component, 'on');
    const motor = motorId === undefined ? undefined : into.component(motorId);
    if (opens === undefined || torque === undefined)
      return into.cannot(component, `${component.id} has no \`${opens === undefined ? 'opens' : 'torque'}\``);
    if (motor === undefined) return into.cannot(component, `${component.id}: its motor ${motorId ?? ''} is not computed`);
    const node = into.nodeOrBlind(component, 'P');
    into.brake(component, { actuator: motor.id, node, opens, torque: torque * (si(motor, 'gear') ?? 1) });
    const volume = si(component, 'volume');
    if (volume !== undefined) into.store(node, toLitres(volume) / toMPa(opens));
  },
};
