/** Hydraulic motor. */
import type { Kind } from './kind.ts';
import { NO_LOSS, pathK } from '../assembly/laws.ts';
import { toArea, toLitresPerSecond, toMPa } from '../assembly/units.ts';
import { siOr } from './passing.ts';
import { DEFAULT_RATED } from './pump.ts';
import { ratedAt, si } from './read.ts';
import { hardware } from './common.ts';

export const motor: Kind = {
  name: 'motor',
  noun: 'hydraulic motor',
  about: 'Hydraulic motor: turns forward when oil goes in at A.',
  ports: [
    { name: 'A', role: 'working', required: true, about: 'Oil in here turns forward.' },
    { name: 'B', role: 'working', required: true, about: 'Oil in here turns backward.' },
    { name: 'L', role: 'drain', required: false, about: 'Casing drain; not joined: leakage goes to the lower port.' },
  ],
  chain: { how: 'none' },
  properties: [
    {
      name: 'displacement',
      shape: { form: 'quantity', dimensions: ['displacement'] },
      required: true,
      default: '—',
      example: 'displacement 160 cm3/rev',
      about: 'Volume a revolution of the motor shaft.',
    },
    {
      name: 'volumetric',
      shape: { form: 'quantity', dimensions: ['ratio'] },
      required: false,
      default: '94 % at rated pressure',
      defaultSource: 'common practice, from memory',
      example: 'volumetric 95 %',
      about: 'Volumetric efficiency at `rated` pressure and `fastest` speed.',
    },
    {
      name: 'mechanical',
      shape: { form: 'quantity', dimensions: ['ratio'] },
      required: false,
      default: '90 %',
      defaultSource: 'common practice, from memory',
      example: 'mechanical 92 %',
      about: 'Hydro-mechanical efficiency.',
    },
    {
      name: 'gear',
      shape: { form: 'ratio' },
      required: false,
      default: '1:1',
      example: 'gear 20:1',
      about: 'Reduction gear at the shaft, without loss; speed and load are at its output.',
    },
    {
      name: 'fastest',
      shape: { form: 'quantity', dimensions: ['rotation'] },
      required: false,
      default: '—',
      example: 'fastest 600 rpm',
      about: 'Highest speed of the motor shaft.',
    },
    {
      name: 'casing',
      shape: { form: 'quantity', dimensions: ['pressure'] },
      required: false,
      default: '2 bar',
      defaultSource: 'common practice, from memory',
      example: 'casing 2 bar',
      about: 'Highest pressure allowed at L; a limit for the rules.',
    },
    ...hardware,
  ],
  groups: [],
  /** Turns by the oil into A; leakage and friction by its efficiencies; everything at the output of its gear. */
  assemble(component, into) {
    const displacement = si(component, 'displacement');
    if (displacement === undefined || !(displacement > 0)) return into.cannot(component, `${component.id} has no \`displacement\``);
    const volumetric = siOr(component, into, 'volumetric', 0.94, '94 % at rated pressure');
    const mechanical = siOr(component, into, 'mechanical', 0.9, '90 %');
    const rated = ratedAt(component, 'A') ?? DEFAULT_RATED;
    if (!(rated > 0)) return into.cannot(component, `${component.id}: \`rated\` is no pressure at which \`volumetric\` could hold`);
    if (ratedAt(component, 'A') === undefined) {
      into.assume({
        component: component.id,
        property: 'rated',
        value: '210 bar',
        source: 'default',
        note: 'pressure at which `volumetric` holds: common practice, no source',
      });
    }
    const gear = si(component, 'gear') ?? 1;
    const fastest = si(component, 'fastest');
    const flow = fastest === undefined ? into.pumpFlow : displacement * fastest;
    if (fastest === undefined) {
      into.assume({
        component: component.id,
        property: 'fastest',
        value: 'flow of all pumps',
        source: 'derived',
        note: 'flow at which `volumetric` holds',
      });
    }
    const area = toArea(displacement) * gear;
    const a = into.nodeOrBlind(component, 'A');
    const b = into.nodeOrBlind(component, 'B');
    into.chamber(component, { node: a, area }, 'A', 2 * Math.PI * displacement);
    into.chamber(component, { node: b, area: -area }, 'B', 2 * Math.PI * displacement);
    into.pressureFriction(component, (1 - mechanical) * area);
    const g = (((1 / volumetric - 1) * toLitresPerSecond(flow)) / toMPa(rated)) * into.oil.leakage;
    const l = into.node(component, 'L');
    into.add(component, { type: 'laminar', a, b, g: l === undefined ? g : g / 2 }, ['A', 'B'], 'leakage');
    if (l !== undefined) {
      const higher = into.inner(component, 'higher port');
      into.add(component, { type: 'shuttle', a, b, c: higher, k: pathK(NO_LOSS) }, ['A', 'B', undefined], 'leakage');
      into.add(component, { type: 'laminar', a: higher, b: l, g: g / 2 }, [undefined, 'L'], 'leakage');
    }
  },
};
