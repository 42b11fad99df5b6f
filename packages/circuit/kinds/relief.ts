/** Pressure-relief valve. */
import type { Kind } from './kind.ts';
import { pathK } from '../assembly/laws.ts';
import { BAR, LITRE_PER_MINUTE, toLitresPerSecond, toMPa } from '../assembly/units.ts';
import { addLeak, coilOf, scaled, settingParameter, siOr } from './passing.ts';
import { flowAt, si } from './read.ts';
import { hardware } from './common.ts';
import { has } from './read.ts';

export const relief: Kind = {
  name: 'relief',
  noun: 'pressure-relief valve',
  about: 'Pressure-relief valve: opens from P to T when P exceeds its setting; limits the pressure.',
  ports: [
    { name: 'P', role: 'pressure', required: true, about: 'Pressure that is limited.' },
    { name: 'T', role: 'return', required: true, about: 'To the reservoir; its pressure adds to the setting unless Y is joined.' },
    { name: 'X', role: 'vent', required: false, about: 'Vent or remote control of a piloted valve.' },
    { name: 'Y', role: 'drain', required: false, about: 'Drain of the pilot stage, led away separately.' },
  ],
  chain: { how: 'end', entry: 'P', exit: 'T' },
  properties: [
    {
      name: 'set',
      shape: { form: 'quantity', dimensions: ['pressure'] },
      required: true,
      default: '—',
      example: 'set 160 bar ± 3 bar',
      about: 'Cracking pressure above the back pressure at T (or Y).',
    },
    {
      name: 'override',
      shape: { form: 'quantity', dimensions: ['ratio'] },
      required: false,
      default: '10 % at the flow it passes',
      defaultSource: 'common practice, from memory',
      example: 'override 8 %',
      about: 'Rise above `set` at the flow of `passes`; it grows in proportion to the flow.',
    },
    {
      name: 'passes',
      shape: { form: 'flowAt' },
      required: true,
      default: '—',
      example: 'passes 100 L/min at 5 bar',
      about: 'Flow at pressure drop of the fully open valve: sets the override and the lowest pressure.',
    },
    {
      name: 'piloted',
      shape: { form: 'flag' },
      required: false,
      default: 'direct',
      example: 'piloted',
      about: 'Pilot-operated; has a vent port X.',
    },
    {
      name: 'vented',
      shape: { form: 'quantity', dimensions: ['pressure'] },
      required: false,
      default: '3 bar',
      defaultSource: 'common practice, from memory',
      example: 'vented 4 bar',
      about: 'Pressure kept when X is led to the reservoir; lowest setting of a coil.',
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
      name: 'certified',
      shape: { form: 'flag' },
      required: false,
      default: '—',
      example: 'certified',
      about: 'Safety valve with certificate (accumulators).',
    },
    ...hardware,
  ],
  groups: [],
  portsOf(component) {
    return relief.ports.filter((p) => p.name !== 'X' || has(component, 'piloted'));
  },
  /** Opens at set + back pressure; set + override is reached at the flow of `passes`; the open body is the floor. */
  assemble(component, into) {
    const set = si(component, 'set');
    const passes = flowAt(component, 'passes');
    if (set === undefined || passes === undefined)
      return into.cannot(component, `${component.id} has no \`${set === undefined ? 'set' : 'passes'}\``);
    const piloted = has(component, 'piloted');
    const vent = into.node(component, 'X');
    if (vent !== undefined && !piloted) return into.cannot(component, `${component.id} has its X joined but is not \`piloted\``);
    const override = siOr(component, into, 'override', 0.1, '10 % at the flow it passes');
    const coil = coilOf(component, into);
    const vented = si(component, 'vented') ?? 3 * BAR;
    if (si(component, 'vented') === undefined && (coil !== undefined || vent !== undefined)) {
      into.assume({ component: component.id, property: 'vented', value: '3 bar', source: 'default', note: 'common practice, no source' });
    }
    const p = into.nodeOrBlind(component, 'P');
    const t = into.nodeOrBlind(component, 'T');
    const parameter = settingParameter(component, into, coil, 'set', { lowest: vented, set }, toMPa);
    const element = into.add(
      component,
      {
        type: 'relief',
        p,
        t,
        ref: into.node(component, 'Y') ?? t,
        ...(vent === undefined ? {} : { x: vent }),
        set: parameter,
        vented: toMPa(vented),
        override,
        qN: toLitresPerSecond(passes.flow),
        k: pathK(scaled(passes, into)),
      },
      ['P', 'T'],
      'P to T',
    );
    if (vent !== undefined) {
      into.assume({
        component: component.id,
        property: 'X',
        value: '1 L/min at 50 bar',
        source: 'memory',
        note: 'flow the pilot stage takes from P: common practice, from memory',
      });
      into.add(component, { type: 'path', a: p, b: vent, k: pathK({ flow: LITRE_PER_MINUTE, drop: 50 * BAR }) }, ['P', 'X'], 'pilot stage');
    }
    addLeak(component, into, { node: p, port: 'P' }, { node: t, port: 'T' }, piloted ? 5 : 0);
    into.limitation({ component: component.id, words: `${component.id} set`, targets: [{ parameter }] });
    into.lifting({ component: component.id, element, above: 0.01 * toLitresPerSecond(passes.flow) });
    into.opening({ component: component.id, element });
  },
};
