/** Pilot-operated check valve. */
import type { Kind } from './kind.ts';
import { pathK } from '../assembly/laws.ts';
import { BAR, toMPa } from '../assembly/units.ts';
import { addCheck, addLeak, crackFits, passesOf, SEAT_LEAK, siOr } from './passing.ts';
import { has, si } from './read.ts';
import { hardware } from './common.ts';

/** A pilot sum that is never reached, MPa. */
const NEVER = 1e6;

export const pilotcheck: Kind = {
  name: 'pilotcheck',
  noun: 'pilot-operated check valve',
  about: 'Pilot-operated check valve: free from V to C, held shut by the load on C until the pilot opens it.',
  ports: [
    { name: 'V', role: 'working', required: true, about: 'Valve side.' },
    { name: 'C', role: 'holding', required: true, about: 'Cylinder side: the holding chamber.' },
    { name: 'X', role: 'pilot', required: true, about: 'Pilot that opens C to V.' },
    {
      name: 'Y',
      role: 'drain',
      required: false,
      about: 'Drain of the pilot piston; joined, back pressure at V does not act against the pilot.',
    },
  ],
  chain: { how: 'none' },
  properties: [
    { name: 'ratio', shape: { form: 'ratio' }, required: true, default: '—', example: 'ratio 3:1', about: 'Area of pilot piston to seat.' },
    {
      name: 'crack',
      shape: { form: 'quantity', dimensions: ['pressure'] },
      required: false,
      default: '1 bar',
      defaultSource: 'common practice, from memory',
      example: 'crack 1 bar',
      about: 'Pressure drop at which it opens from V to C.',
    },
    {
      name: 'decompressing',
      shape: { form: 'flag' },
      required: false,
      default: 'none',
      example: 'decompressing',
      about: 'A small poppet opens first and lets trapped pressure down.',
    },
    {
      name: 'passes',
      shape: { form: 'flowAt' },
      required: false,
      default: 'no loss (said among assumptions)',
      example: 'passes 60 L/min at 4 bar',
      about: 'Flow at pressure drop of the open valve. Left out: no loss is counted, and the report says so.',
    },
    ...hardware,
  ],
  groups: [],
  /** V to C: check law. C to V: opened by the pilot against the trapped pressure. */
  assemble(component, into) {
    const ratio = si(component, 'ratio');
    if (ratio === undefined) return into.cannot(component, `${component.id} has no \`ratio\``);
    const crack = siOr(component, into, 'crack', BAR, '1 bar');
    if (!crackFits(component, crack)) return into.cannot(component, `${component.id} cracks at more than the drop it \`passes\` at`);
    const passes = passesOf(component, into);
    const v = into.nodeOrBlind(component, 'V');
    const c = into.nodeOrBlind(component, 'C');
    addCheck(component, into, { node: v, port: 'V' }, { node: c, port: 'C' }, crack, 'V to C');
    addLeak(component, into, { node: c, port: 'C' }, { node: v, port: 'V' }, SEAT_LEAK);
    const x = into.node(component, 'X');
    if (x === undefined) return;
    const back = into.node(component, 'Y') ?? v;
    const set = into.parameter(component, 'crack', toMPa(crack));
    const band = into.parameter(component, 'band', toMPa(5 * BAR));
    // Open and shut can both be in balance; from standstill it stays shut until the pilot force is enough.
    const held = into.parameter(component, 'held', 0);
    const never = into.parameter(component, 'never', NEVER);
    into.onSetting((setting, put) => put(held, setting.bits[component.id] === true ? 1 : 0));
    const pilots = (r: number) => [
      { node: x, weight: r },
      { node: back, weight: -r },
      { node: c, weight: -1 },
      { node: v, weight: 1 },
    ];
    const opened = (r: number, k: number, words: string, holds: boolean) =>
      into.add(
        component,
        {
          type: 'piloted',
          a: c,
          b: v,
          k,
          pilots: pilots(r),
          set,
          band,
          ...(holds ? { bit: held, setWhenOn: never } : {}),
          oneWay: true,
        },
        ['C', 'V'],
        words,
      );
    const element = opened(ratio, pathK(passes), 'C to V', true);
    if (has(component, 'decompressing')) {
      into.assume({
        component: component.id,
        property: 'decompressing',
        value: 'poppet of 5 % of `passes`, four times the ratio',
        source: 'memory',
        note: 'common practice, from memory',
      });
      opened(4 * ratio, pathK({ flow: 0.05 * passes.flow, drop: passes.drop }), 'C to V, decompressing', false);
    }
    into.limitation({ component: component.id, words: `${component.id} passes`, targets: [{ element, size: 'k' }] });
    into.opening({ component: component.id, element });
    into.memory({ component: component.id, kind: 'held', element, pilots: pilots(ratio), crack });
  },
};
