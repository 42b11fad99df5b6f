/** Sequence valve. */
import type { Kind } from './kind.ts';
import { bandOf, pathK, REVERSE_CRACK } from '../assembly/laws.ts';
import { toMPa } from '../assembly/units.ts';
import { addLeak, addReverse, crackFits, passesOf } from './passing.ts';
import { has, si } from './read.ts';
import { hardware } from './common.ts';
import { word } from './read.ts';

export const sequence: Kind = {
  name: 'sequence',
  noun: 'sequence valve',
  about: 'Sequence valve: opens from P to A when the pilot pressure exceeds its setting.',
  ports: [
    { name: 'P', role: 'pressure', required: true, about: 'Inlet.' },
    { name: 'A', role: 'working', required: true, about: 'To the actuator that comes second.' },
    { name: 'X', role: 'pilot', required: false, about: 'External pilot.' },
    { name: 'Y', role: 'drain', required: true, about: 'Drain of the spring chamber, to the reservoir.' },
  ],
  chain: { how: 'through', from: 'P', to: 'A' },
  properties: [
    {
      name: 'set',
      shape: { form: 'quantity', dimensions: ['pressure'] },
      required: true,
      default: '—',
      example: 'set 90 bar',
      about: 'Pressure at which it begins to open; fully open 10 % above.',
    },
    {
      name: 'reverse',
      shape: { form: 'word', words: ['check'] },
      required: false,
      default: 'no reverse path',
      example: 'reverse check',
      about: 'Check valve built in: free flow from A to P.',
    },
    {
      name: 'external',
      shape: { form: 'word', words: ['pilot'] },
      required: false,
      default: 'internal pilot',
      example: 'external pilot',
      about: 'Opened by the pressure at X instead of P.',
    },
    {
      name: 'internal',
      shape: { form: 'word', words: ['drain'] },
      required: false,
      default: 'external drain',
      example: 'internal drain',
      about: 'Spring chamber drained into A instead of Y.',
    },
    {
      name: 'passes',
      shape: { form: 'flowAt' },
      required: false,
      default: 'no loss (said among assumptions)',
      example: 'passes 40 L/min at 4 bar',
      about: 'Flow at pressure drop of the open valve. Left out: no loss is counted, and the report says so.',
    },
    ...hardware,
  ],
  groups: [],
  portsOf(component) {
    return sequence.ports
      .filter((p) => p.name !== 'Y' || word(component, 'internal') !== 'drain')
      .map((p) => (p.name === 'X' && word(component, 'external') === 'pilot' ? { ...p, required: true } : p));
  },
  /** P to A by the pilot (P itself, or X) above Y, or above A with `internal drain`. Reverse: closed, or the check law. */
  assemble(component, into) {
    const set = si(component, 'set');
    if (set === undefined) return into.cannot(component, `${component.id} has no \`set\``);
    const external = word(component, 'external') === 'pilot';
    const internalDrain = word(component, 'internal') === 'drain';
    const p = into.nodeOrBlind(component, 'P');
    const a = into.nodeOrBlind(component, 'A');
    const y = internalDrain ? a : into.node(component, 'Y');
    if (y === undefined) return into.cannot(component, `${component.id} has its drain Y not joined`);
    const x = external ? into.node(component, 'X') : p;
    if (x === undefined) return into.cannot(component, `${component.id} has an external pilot but X is not joined`);
    if (has(component, 'reverse') && !crackFits(component, REVERSE_CRACK))
      return into.cannot(component, `${component.id} \`passes\` at less than the crack of its reverse check`);
    const parameter = into.parameter(component, 'set', toMPa(set));
    const element = into.add(
      component,
      {
        type: 'piloted',
        a: p,
        b: a,
        k: pathK(passesOf(component, into)),
        pilots: [
          { node: x, weight: 1 },
          { node: y, weight: -1 },
        ],
        set: parameter,
        band: into.parameter(component, 'band', toMPa(bandOf(set))),
        oneWay: true,
      },
      ['P', 'A'],
      'P to A',
    );
    addReverse(component, into, { node: a, port: 'A' }, { node: p, port: 'P' });
    addLeak(component, into, { node: p, port: 'P' }, { node: a, port: 'A' }, 20);
    into.limitation({ component: component.id, words: `${component.id} set`, targets: [{ parameter }] });
    into.limitation({ component: component.id, words: `${component.id} passes`, targets: [{ element, size: 'k' }] });
    into.opening({ component: component.id, element });
  },
};
