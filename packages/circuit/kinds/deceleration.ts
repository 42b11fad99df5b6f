/** Deceleration valve. */
import type { Kind } from './kind.ts';
import { pathK, REVERSE_CRACK } from '../assembly/laws.ts';
import { addLeak, addReverse, crackFits, scaled } from './passing.ts';
import { cams, flowAt, has } from './read.ts';
import { hardware } from './common.ts';

export const deceleration: Kind = {
  name: 'deceleration',
  noun: 'deceleration valve',
  about: 'Deceleration valve: a cam on the actuator closes it along the stroke.',
  ports: [
    { name: 'in', role: 'working', required: true, about: 'Entrance.' },
    { name: 'out', role: 'working', required: true, about: 'Exit.' },
  ],
  chain: { how: 'through', from: 'in', to: 'out' },
  properties: [
    {
      name: 'closed',
      shape: { form: 'cam', small: 'by' },
      required: true,
      default: '—',
      example: 'closed by C2 from 250 mm to 265 mm',
      about: 'Actuator and way over which it goes from open to closed.',
    },
    {
      name: 'passes',
      shape: { form: 'flowAt' },
      required: true,
      default: '—',
      example: 'passes 60 L/min at 4 bar',
      about: 'Flow at pressure drop, fully open.',
    },
    {
      name: 'reverse',
      shape: { form: 'word', words: ['check'] },
      required: false,
      default: 'no reverse path',
      example: 'reverse check',
      about: 'Check valve built in: free flow from out to in.',
    },
    ...hardware,
  ],
  groups: [],
  /** Opening by the position of its actuator, linear between the two declared places, in the order in which they are named. */
  assemble(component, into) {
    const passes = flowAt(component, 'passes');
    const cam = cams(component, 'closed')[0];
    if (passes === undefined || cam === undefined)
      return into.cannot(component, `${component.id} has no \`${passes === undefined ? 'passes' : 'closed'}\``);
    const actuator = into.body(cam.actuator);
    if (actuator === undefined) return into.cannot(component, `${component.id}: its actuator ${cam.actuator} is not computed`);
    if (!crackFits(component, REVERSE_CRACK) && has(component, 'reverse'))
      return into.cannot(component, `${component.id} \`passes\` at less than the crack of its reverse check`);
    const a = { node: into.nodeOrBlind(component, 'in'), port: 'in' };
    const b = { node: into.nodeOrBlind(component, 'out'), port: 'out' };
    const from = cam.from.si;
    const to = cam.to.si;
    const element = into.add(
      component,
      {
        type: 'camPath',
        a: a.node,
        b: b.node,
        k: pathK(scaled(passes, into)),
        actuator,
        at: from <= to ? [from, to] : [to, from],
        opening: from <= to ? [1, 0] : [0, 1],
      },
      ['in', 'out'],
      'in to out',
    );
    addReverse(component, into, b, a);
    addLeak(component, into, a, b, 20);
    into.knot(cam.actuator, from, `${component.id} begins to close`);
    into.knot(cam.actuator, to, `${component.id} closed`);
    into.limitation({ component: component.id, words: `${component.id} passes`, targets: [{ element, size: 'k' }] });
    into.opening({ component: component.id, element });
  },
};
