/** Throttle. */
import type { Kind } from './kind.ts';
import { REVERSE_CRACK } from '../assembly/laws.ts';
import { addLeak, addReverse, crackFits } from './passing.ts';
import { has } from './read.ts';
import { addMetering, passesForReverse } from './throttle-metering.ts';
import { hardware } from './common.ts';

export const throttle: Kind = {
  name: 'throttle',
  noun: 'throttle',
  about: 'Throttle or flow control valve: meters the flow from in to out.',
  ports: [
    { name: 'in', role: 'any', required: true, about: 'Entrance; metered in this direction.' },
    { name: 'out', role: 'any', required: true, about: 'Exit.' },
    { name: 'T', role: 'return', required: false, about: 'Bypass form: the excess goes here.' },
  ],
  chain: { how: 'through', from: 'in', to: 'out' },
  properties: [
    {
      name: 'set',
      shape: { form: 'quantity', dimensions: ['flow'] },
      required: false,
      group: 'metering',
      default: '—',
      example: 'set 1.8 L/min',
      about: 'Flow it lets through: kept with `compensated`, else at a drop of `needs`.',
    },
    {
      name: 'opening',
      shape: { form: 'quantity', dimensions: ['ratio'] },
      required: false,
      default: '100 %',
      example: 'opening 40 %',
      about: 'Share of the full opening, with `passes`.',
    },
    {
      name: 'orifice',
      shape: { form: 'quantity', dimensions: ['length'] },
      required: false,
      group: 'metering',
      default: '—',
      example: 'orifice 0.8 mm',
      about: 'Bore of a sharp-edged orifice (Cd 0.62).',
    },
    {
      name: 'compensated',
      shape: { form: 'flag' },
      required: false,
      default: 'follows the pressure drop',
      example: 'compensated',
      about: 'Pressure-compensated: keeps its flow whatever the load, above the least drop `needs`.',
    },
    {
      name: 'needs',
      shape: { form: 'quantity', dimensions: ['pressure'] },
      required: false,
      default: '6 bar',
      defaultSource: 'common practice, from memory',
      example: 'needs 8 bar',
      about: 'Least pressure drop at which a compensated valve keeps its flow.',
    },
    {
      name: 'reverse',
      shape: { form: 'word', words: ['check'] },
      required: false,
      default: 'no reverse path',
      example: 'reverse check',
      about: 'Check valve built in: free flow from out to in.',
    },
    {
      name: 'coil',
      shape: { form: 'coil' },
      required: false,
      many: true,
      default: '—',
      example: 'coil a SOL1, coil b SOL2 24 V',
      about:
        'Solenoid on the setting: command in % of it, or directly in its dimension. Dead coil = lowest setting. For a throttle dead is shut.',
    },
    {
      name: 'passes',
      shape: { form: 'flowAt' },
      required: false,
      group: 'metering',
      default: '—',
      example: 'passes 20 L/min at 5 bar',
      about: 'Flow at pressure drop, fully open.',
    },
    ...hardware,
  ],
  groups: [{ name: 'metering', need: 'exactly one', of: ['set', 'orifice', 'passes'] }],
  /** Orifice, opening, set (plain or compensated), bypass form; reverse check; a coil on the setting. */
  assemble(component, into) {
    const a = { node: into.nodeOrBlind(component, 'in'), port: 'in' };
    const b = { node: into.nodeOrBlind(component, 'out'), port: 'out' };
    if (has(component, 'reverse') && !crackFits(component, REVERSE_CRACK))
      return into.cannot(component, `${component.id} \`passes\` at less than the crack of its reverse check`);
    const metering = addMetering(component, into, a, b);
    if (typeof metering === 'string') return into.cannot(component, metering);
    if (has(component, 'reverse')) {
      passesForReverse(component, into);
      addReverse(component, into, b, a);
    }
    addLeak(component, into, a, b, 0);
    into.limitation(metering);
  },
};
