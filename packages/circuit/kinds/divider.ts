/** Flow divider. */
import type { Kind } from './kind.ts';
import { BAR, toLitresPerSecond, toMPa } from '../assembly/units.ts';
import { siOr } from './passing.ts';
import { flowAt, has, si } from './read.ts';
import { hardware } from './common.ts';

export const divider: Kind = {
  name: 'divider',
  noun: 'flow divider',
  about: 'Flow divider: shares the flow at P between A and B.',
  ports: [
    { name: 'P', role: 'working', required: true, about: 'Undivided side.' },
    { name: 'A', role: 'working', required: true, about: 'First share.' },
    { name: 'B', role: 'working', required: true, about: 'Second share.' },
  ],
  chain: { how: 'none' },
  properties: [
    {
      name: 'gear',
      shape: { form: 'flag' },
      required: false,
      group: 'form',
      default: '—',
      example: 'gear',
      about: 'Rotary: two sections on one shaft; divides and combines.',
    },
    {
      name: 'spool',
      shape: { form: 'flag' },
      required: false,
      group: 'form',
      default: '—',
      example: 'spool',
      about: 'Spool type: throttles the side that gets too much.',
    },
    {
      name: 'combines',
      shape: { form: 'flag' },
      required: false,
      default: 'divides only',
      example: 'combines',
      about: 'A spool type that also combines the flows coming back.',
    },
    { name: 'share', shape: { form: 'ratio' }, required: false, default: '1:1', example: 'share 1:1', about: 'Share of A to B.' },
    {
      name: 'error',
      shape: { form: 'quantity', dimensions: ['ratio'] },
      required: false,
      default: '3 %',
      defaultSource: 'common practice, from memory',
      example: 'error 2 %',
      about: 'Difference of a share from its due, at full flow and 100 bar between the outlets (gear).',
    },
    {
      name: 'passes',
      shape: { form: 'flowAt' },
      required: false,
      default: 'no loss (said among assumptions)',
      example: 'passes 40 L/min at 8 bar',
      about: 'Flow at pressure drop. Left out: no friction is counted, and the report says so.',
    },
    ...hardware,
  ],
  groups: [{ name: 'form', need: 'exactly one', of: ['gear', 'spool'] }],
  /** Gear: two sections on one shaft. Spool: throttles the outlet that gets too much. */
  assemble(component, into) {
    const passes = flowAt(component, 'passes');
    const share = si(component, 'share') ?? 1;
    const shares: readonly [number, number] = [share / (1 + share), 1 / (1 + share)];
    const error = siOr(component, into, 'error', 0.03, '3 %');
    if (passes === undefined) {
      into.assume({
        component: component.id,
        property: 'passes',
        value: 'no friction, flow of all pumps',
        source: 'not counted',
        note: `no loss declared for ${component.id}`,
      });
    }
    const qN = toLitresPerSecond(passes?.flow ?? into.pumpFlow);
    const drop = passes === undefined ? 0 : toMPa(passes.drop * into.oil.pathDrop);
    if (!(qN > 0)) return into.cannot(component, `${component.id} has no \`passes\` and the circuit no pump`);
    const nodes = { p: into.nodeOrBlind(component, 'P'), a: into.nodeOrBlind(component, 'A'), b: into.nodeOrBlind(component, 'B') };
    if (has(component, 'gear')) {
      const g = (i: 0 | 1) => ((error * qN * shares[i]) / toMPa(50 * BAR)) * into.oil.leakage;
      into.add(
        component,
        { type: 'gearDivider', ...nodes, share: shares, g: [g(0), g(1)], friction: drop, qN },
        ['P', 'A', 'B'],
        'P to A and B',
      );
    } else {
      into.add(
        component,
        { type: 'spoolDivider', ...nodes, share: shares, error, drop, qN, combines: has(component, 'combines') },
        ['P', 'A', 'B'],
        'P to A and B',
      );
    }
  },
};
