/** Counterbalance valve. */
import type { Kind } from './kind.ts';
import { bandOf, pathK, REVERSE_CRACK } from '../assembly/laws.ts';
import { toMPa } from '../assembly/units.ts';
import { addCheck, addLeak, crackFits, passesOf, SEAT_LEAK } from './passing.ts';
import { si } from './read.ts';
import { hardware } from './common.ts';

export const counterbalance: Kind = {
  name: 'counterbalance',
  noun: 'counterbalance valve',
  about: 'Counterbalance valve: free from V to C; holds the load on C until its pressure, helped by the pilot, exceeds the setting.',
  ports: [
    { name: 'V', role: 'working', required: true, about: 'Valve side.' },
    { name: 'C', role: 'holding', required: true, about: 'Cylinder side: the holding chamber.' },
    { name: 'X', role: 'pilot', required: false, about: 'Pilot, from the other side of the actuator.' },
    { name: 'Y', role: 'drain', required: false, about: 'Vent of the spring chamber; joined, back pressure at V has no effect.' },
  ],
  chain: { how: 'none' },
  properties: [
    {
      name: 'set',
      shape: { form: 'quantity', dimensions: ['pressure'] },
      required: true,
      default: '—',
      example: 'set 210 bar',
      about: 'Pressure at C that begins to open it without pilot.',
    },
    {
      name: 'ratio',
      shape: { form: 'ratio' },
      required: true,
      default: '—',
      example: 'ratio 3:1',
      about: 'Pilot ratio: 1 bar at X opens like `ratio` bar at C.',
    },
    {
      name: 'passes',
      shape: { form: 'flowAt' },
      required: false,
      default: 'no loss (said among assumptions)',
      example: 'passes 60 L/min at 6 bar',
      about: 'Flow at pressure drop of the open valve. Left out: no loss is counted, and the report says so.',
    },
    ...hardware,
  ],
  groups: [],
  /** V to C free; C to V when p_C + R p_X - (1 + R) p_b reaches the setting, p_b the back pressure at V, or at Y where joined. */
  assemble(component, into) {
    const set = si(component, 'set');
    const ratio = si(component, 'ratio');
    if (set === undefined || ratio === undefined)
      return into.cannot(component, `${component.id} has no \`${set === undefined ? 'set' : 'ratio'}\``);
    if (!crackFits(component, REVERSE_CRACK))
      return into.cannot(component, `${component.id} \`passes\` at less than the crack of its free direction`);
    const passes = passesOf(component, into);
    const v = into.nodeOrBlind(component, 'V');
    const c = into.nodeOrBlind(component, 'C');
    const x = into.node(component, 'X');
    const back = into.node(component, 'Y') ?? v;
    const r = x === undefined ? 0 : ratio;
    addCheck(component, into, { node: v, port: 'V' }, { node: c, port: 'C' }, REVERSE_CRACK, 'V to C');
    const parameter = into.parameter(component, 'set', toMPa(set));
    const element = into.add(
      component,
      {
        type: 'piloted',
        a: c,
        b: v,
        k: pathK(passes),
        pilots: [{ node: c, weight: 1 }, ...(x === undefined ? [] : [{ node: x, weight: r }]), { node: back, weight: -(1 + r) }],
        set: parameter,
        band: into.parameter(component, 'band', toMPa(bandOf(set))),
        oneWay: true,
      },
      ['C', 'V'],
      'C to V',
    );
    addLeak(component, into, { node: c, port: 'C' }, { node: v, port: 'V' }, SEAT_LEAK);
    into.limitation({ component: component.id, words: `${component.id} set`, targets: [{ parameter }] });
    into.limitation({ component: component.id, words: `${component.id} passes`, targets: [{ element, size: 'k' }] });
    into.opening({ component: component.id, element });
  },
};
