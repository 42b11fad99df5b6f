/** Directional control valve. */
import type { Kind } from './kind.ts';
import { addDirectional } from './directional-law.ts';
import { PORTS_BY_SHAPE } from './directional-positions.ts';
import { hardware } from './common.ts';
import { word } from './read.ts';

export const directional: Kind = {
  name: 'directional',
  noun: 'directional control valve',
  about: 'Directional control valve: what each position joins, what brings the spool back, what shifts it.',
  ports: [
    { name: 'P', role: 'pressure', required: true, about: 'Pressure.' },
    { name: 'T', role: 'return', required: true, about: 'To the reservoir.' },
    { name: 'A', role: 'working', required: false, about: 'Actuator, one side.' },
    { name: 'B', role: 'working', required: false, about: 'Actuator, other side.' },
    { name: 'X', role: 'pilot', required: false, about: 'External pilot supply.' },
    { name: 'Y', role: 'drain', required: false, about: 'Drain of the pilot stage.' },
    { name: 'LS', role: 'pilot', required: false, about: 'Load-sensing signal out.' },
  ],
  chain: { how: 'through', from: 'P', to: 'A' },
  properties: [
    {
      name: 'centre',
      shape: { form: 'position' },
      required: false,
      default: '—',
      example: 'centre closed | open | tandem | float, or centre (P to T)',
      about: 'What the middle position joins: closed, open, tandem (P to T), float (A and B to T), or own paths.',
    },
    {
      name: 'a',
      shape: { form: 'position' },
      required: false,
      default: 'P to A, B to T',
      example: 'a (P to A, B to T)',
      about: 'What position a joins; its coil is a.',
    },
    {
      name: 'b',
      shape: { form: 'position' },
      required: false,
      default: 'P to B, A to T',
      example: 'b (P to B, A to T)',
      about: 'What position b joins; its coil is b.',
    },
    {
      name: 'spring',
      shape: { form: 'toWord', words: ['a', 'b', 'centre'] },
      required: false,
      group: 'return',
      default: '—',
      example: 'spring to centre',
      about: 'Position to which a spring brings it when no coil is live.',
    },
    {
      name: 'detent',
      shape: { form: 'flag' },
      required: false,
      group: 'return',
      default: '—',
      example: 'detent',
      about: 'Stays in the position it had when the coil goes dead.',
    },
    {
      name: 'normally',
      shape: { form: 'word', words: ['open', 'closed'] },
      required: false,
      group: 'return',
      default: '(2/2 and 3/2)',
      example: 'normally closed',
      about: 'Sprung position of a 2/2 or 3/2 valve; its one coil moves it to the other.',
    },
    {
      name: 'coil',
      shape: { form: 'coil' },
      required: false,
      many: true,
      default: '—',
      example: 'coil a SOL1, coil b SOL2 24 V',
      about: 'Solenoid: `coil a NAME`, `coil b NAME`; one signed command: `coil NAME`.',
    },
    { name: 'lever', shape: { form: 'flag' }, required: false, default: '—', example: 'lever', about: 'Moved by hand: `shift V1 to a`.' },
    {
      name: 'cam',
      shape: { form: 'cam' },
      required: false,
      many: true,
      default: '—',
      example: 'cam a C2 from 250 mm to 320 mm',
      about: 'Moved by an actuator that stands in this range.',
    },
    {
      name: 'external',
      shape: { form: 'word', words: ['pilot'] },
      required: false,
      default: 'direct or internal pilot',
      example: 'external pilot',
      about: 'Piloted by the oil at X.',
    },
    {
      name: 'internal',
      shape: { form: 'word', words: ['pilot'] },
      required: false,
      default: 'direct',
      example: 'internal pilot',
      about: 'Piloted by the oil at P.',
    },
    {
      name: 'needs',
      shape: { form: 'quantity', dimensions: ['pressure'] },
      required: false,
      default: '5 bar when piloted',
      defaultSource: 'common practice, from memory',
      example: 'needs 6 bar',
      about: 'Least pilot pressure to shift.',
    },
    {
      name: 'proportional',
      shape: { form: 'flag' },
      required: false,
      default: 'switching',
      example: 'proportional',
      about: 'Opening follows the command in %; `passes` holds at 100 %.',
    },
    {
      name: 'compensator',
      shape: { form: 'quantity', dimensions: ['pressure'] },
      required: false,
      default: 'none',
      example: 'compensator 7 bar',
      about: 'Pressure drop kept over the metering edge, so flow follows the command and not the load.',
    },
    {
      name: 'poppet',
      shape: { form: 'flag' },
      required: false,
      default: 'spool (leaks)',
      example: 'poppet',
      about: 'Seat valve: no leakage, no half-open position.',
    },
    {
      name: 'passes',
      shape: { form: 'flowAt', perPath: true },
      required: true,
      many: true,
      default: '—',
      example: 'passes 60 L/min at 5 bar, passes P to A 40 L/min at 5 bar',
      about: 'Flow at pressure drop of each path; `passes P to A ..` for one path.',
    },
    {
      name: 'takes',
      shape: { form: 'quantity', dimensions: ['time'] },
      required: false,
      default: '50 ms',
      defaultSource: 'common practice, from memory',
      example: 'takes 80 ms',
      about: 'Time it takes to shift.',
    },
    ...hardware,
  ],
  groups: [{ name: 'return', need: 'exactly one', of: ['spring', 'detent', 'normally'] }],
  portsOf(component) {
    const main = PORTS_BY_SHAPE[component.shape?.ports ?? 4] ?? ['P', 'T', 'A', 'B'];
    return directional.ports
      .filter((p) => main.includes(p.name) || ['X', 'Y', 'LS'].includes(p.name))
      .map((p) => (p.name === 'X' && word(component, 'external') === 'pilot' ? { ...p, required: true } : p));
  },
  /** One edge for each pair of ports, opened by the position it stands in. */
  assemble(component, into) {
    const why = addDirectional(component, into);
    if (why !== undefined) into.cannot(component, why);
  },
};
