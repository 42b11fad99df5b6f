/** Pressure-reducing valve. */
import type { Kind } from './kind.ts';
import { bandOf, pathK, REVERSE_CRACK } from '../assembly/laws.ts';
import { BAR, toMPa } from '../assembly/units.ts';
import { addLeak, addReverse, coilOf, crackFits, passesOf, settingParameter } from './passing.ts';
import { has, si, word } from './read.ts';
import { hardware } from './common.ts';

export const reducing: Kind = {
  name: 'reducing',
  noun: 'pressure-reducing valve',
  about: 'Pressure-reducing valve: keeps A at its setting while P is higher.',
  ports: [
    { name: 'P', role: 'pressure', required: true, about: 'Inlet.' },
    { name: 'A', role: 'working', required: true, about: 'Reduced pressure.' },
    { name: 'Y', role: 'drain', required: true, about: 'Drain of the spring chamber, to the reservoir.' },
  ],
  chain: { how: 'through', from: 'P', to: 'A' },
  properties: [
    {
      name: 'set',
      shape: { form: 'quantity', dimensions: ['pressure'] },
      required: true,
      default: '—',
      example: 'set 70 bar',
      about: 'Pressure at A without flow; with flow A sags by up to 5 %.',
    },
    {
      name: 'relieving',
      shape: { form: 'word', words: ['yes', 'no'] },
      required: true,
      default: '—',
      example: 'relieving yes',
      about: '`yes`: pressure above the setting at A is let out to Y; `no`: it is trapped.',
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
      name: 'coil',
      shape: { form: 'coil' },
      required: false,
      many: true,
      default: '—',
      example: 'coil a SOL1, coil b SOL2 24 V',
      about: 'Solenoid on the setting: command in % of it, or directly in its dimension. Dead coil = lowest setting.',
    },
    {
      name: 'passes',
      shape: { form: 'flowAt' },
      required: false,
      default: 'no loss (said among assumptions)',
      example: 'passes 40 L/min at 5 bar',
      about: 'Flow at pressure drop of the open valve. Left out: no loss is counted, and the report says so.',
    },
    ...hardware,
  ],
  groups: [],
  /** Closes from P to A as A rises to set + Y; relieving: opens A to Y above; reverse only by its check. */
  assemble(component, into) {
    const set = si(component, 'set');
    if (set === undefined) return into.cannot(component, `${component.id} has no \`set\``);
    const y = into.node(component, 'Y');
    if (y === undefined) return into.cannot(component, `${component.id} has its drain Y not joined`);
    if (has(component, 'reverse') && !crackFits(component, REVERSE_CRACK))
      return into.cannot(component, `${component.id} \`passes\` at less than the crack of its reverse check`);
    const p = into.nodeOrBlind(component, 'P');
    const a = into.nodeOrBlind(component, 'A');
    const passes = passesOf(component, into);
    const coil = coilOf(component, into);
    const lowest = 3 * BAR;
    if (coil !== undefined)
      into.assume({
        component: component.id,
        property: 'coil',
        value: '3 bar with a dead coil',
        source: 'memory',
        note: 'lowest setting: common practice, from memory',
      });
    const range = { lowest: Math.min(lowest, set), set };
    // y = clamp((set + p_Y - p_A)/band): the engine's pilot sum is p_Y - p_A, its setting -set.
    const closing = settingParameter(component, into, coil, 'set', range, (v) => -toMPa(v));
    const band = settingParameter(component, into, coil, 'band', range, (v) => toMPa(Math.max(0.05 * v, BAR)));
    const element = into.add(
      component,
      {
        type: 'piloted',
        a: p,
        b: a,
        k: pathK(passes),
        pilots: [
          { node: y, weight: 1 },
          { node: a, weight: -1 },
        ],
        set: closing,
        band,
        oneWay: true,
      },
      ['P', 'A'],
      'P to A',
    );
    if (word(component, 'relieving') === 'yes') {
      into.add(
        component,
        {
          type: 'piloted',
          a,
          b: y,
          k: pathK({ flow: passes.flow / 4, drop: passes.drop }),
          pilots: [
            { node: a, weight: 1 },
            { node: y, weight: -1 },
          ],
          set: settingParameter(component, into, coil, 'relieves', range, (v) => toMPa(v + Math.max(0.05 * v, 2 * BAR))),
          band: settingParameter(component, into, coil, 'relieving band', range, (v) => toMPa(bandOf(v))),
          oneWay: true,
        },
        ['A', 'Y'],
        'A to Y',
      );
    }
    addReverse(component, into, { node: a, port: 'A' }, { node: p, port: 'P' });
    addLeak(component, into, { node: p, port: 'P' }, { node: a, port: 'A' }, 20);
    addLeak(component, into, { node: a, port: 'A' }, { node: y, port: 'Y' }, 20);
    into.limitation({ component: component.id, words: `${component.id} set`, targets: [{ parameter: closing }] });
    into.limitation({ component: component.id, words: `${component.id} passes`, targets: [{ element, size: 'k' }] });
    into.opening({ component: component.id, element });
  },
};
