/** Cylinder. */
import type { Kind } from './kind.ts';
import { NO_LOSS, pathK } from '../assembly/laws.ts';
import { BAR, toArea, toKilo } from '../assembly/units.ts';
import { areasOf, DEFAULT_SEAL, portOfSingle } from './cylinder-areas.ts';
import { addLeak, siOr } from './passing.ts';
import { range, si } from './read.ts';
import { hardware } from './common.ts';

/** Speed at the stop for 100 bar across a cushion, m/s (common practice, from memory). */
const CUSHION_SPEED = 0.05;

export const cylinder: Kind = {
  name: 'cylinder',
  noun: 'cylinder',
  about: 'Cylinder: single or double rod, double- or single-acting, plunger, telescopic.',
  ports: [
    { name: 'cap', role: 'working', required: true, about: 'Cap side: oil here extends the rod.' },
    { name: 'rod', role: 'working', required: true, about: 'Rod side: oil here retracts the rod.' },
  ],
  chain: { how: 'none' },
  properties: [
    {
      name: 'bore',
      shape: { form: 'quantity', dimensions: ['length'] },
      required: true,
      default: '—',
      example: 'bore 63 mm',
      about: 'Bore; of a plunger or telescopic cylinder the (largest) plunger diameter.',
    },
    {
      name: 'rod',
      shape: { form: 'quantity', dimensions: ['length'] },
      required: false,
      default: 'none (plunger)',
      example: 'rod 36 mm',
      about: 'Rod diameter.',
    },
    {
      name: 'stroke',
      shape: { form: 'quantity', dimensions: ['length'] },
      required: true,
      default: '—',
      example: 'stroke 320 mm',
      about: 'Way from retracted to extended.',
    },
    {
      name: 'attitude',
      shape: { form: 'attitude' },
      required: false,
      default: 'asked for when a mass or people are stated',
      example: 'attitude rod down',
      about: 'Rod angle above level: weight of a mass acts inward with the rod up, outward with the rod down.',
    },
    {
      name: 'begins',
      shape: { form: 'place' },
      required: false,
      default: 'retracted',
      example: 'begins extended',
      about: 'Position at the start.',
    },
    {
      name: 'cushion',
      shape: { form: 'quantity', dimensions: ['length'] },
      required: false,
      default: 'none',
      defaultSource: 'law of the cushion: common practice, from memory',
      example: 'cushion 25 mm',
      about: 'Length of the end cushions, both ends.',
    },
    {
      name: 'single',
      shape: { form: 'word', words: ['cap', 'rod'] },
      required: false,
      default: 'double-acting',
      example: 'single cap',
      about: 'Single-acting: the only port.',
    },
    {
      name: 'spring',
      shape: { form: 'span', dimension: 'force' },
      required: false,
      default: 'none',
      example: 'spring 200 N to 600 N',
      about: 'Spring of a single-acting cylinder: force at the pressureless end, and at the other.',
    },
    {
      name: 'through',
      shape: { form: 'flag' },
      required: false,
      default: '—',
      example: 'through',
      about: 'Rod on both sides: both areas are the annulus.',
    },
    {
      name: 'telescopic',
      shape: { form: 'list', dimension: 'length' },
      required: false,
      default: '—',
      example: 'telescopic 80 mm and 60 mm',
      about: 'Diameters of the further stages.',
    },
    {
      name: 'mounted',
      shape: { form: 'word', words: ['flange', 'clevis', 'trunnion', 'foot'] },
      required: false,
      default: '—',
      example: 'mounted clevis',
      about: 'How it is mounted; for buckling.',
    },
    {
      name: 'connection',
      shape: { form: 'quantity', dimensions: ['length'] },
      required: false,
      default: '—',
      example: 'connection 19 mm',
      about: 'Bore of its ports; for the velocity in them.',
    },
    {
      name: 'seal',
      shape: { form: 'quantity', dimensions: ['pressure'] },
      required: false,
      default: '3 bar',
      defaultSource: 'common practice, from memory',
      example: 'seal 4 bar',
      about: 'Seal friction as a pressure on the bore area, both ways.',
    },
    ...hardware,
  ],
  groups: [],
  portsOf(component) {
    const only = portOfSingle(component);
    return only === undefined ? cylinder.ports : cylinder.ports.filter((p) => p.name === only);
  },
  chainOf(component) {
    const only = portOfSingle(component);
    return only === undefined ? { how: 'none' } : { how: 'fixed', port: only };
  },
  /** One chamber a port; cushions are an orifice between chamber and port; spring, seal friction, stages. */
  assemble(component, into) {
    const areas = areasOf(component);
    const stroke = si(component, 'stroke');
    if (areas === undefined || stroke === undefined)
      return into.cannot(component, `${component.id} has no usable \`bore\`, \`rod\` and \`stroke\``);
    const spring = range(component, 'spring');
    const only = portOfSingle(component);
    if (spring !== undefined && only === undefined) return into.cannot(component, `${component.id} has a spring but is double-acting`);
    const cushion = si(component, 'cushion');
    const addSide = (port: 'cap' | 'rod', area: number | undefined): void => {
      if (area === undefined) return;
      const node = into.nodeOrBlind(component, port);
      const sign = port === 'cap' ? 1 : -1;
      const steps = areas.stages;
      const chamber = {
        area: sign * toArea(area),
        ...(steps === undefined ? {} : { areaSteps: { at: steps.at, area: steps.area.map(toArea) } }),
      };
      if (cushion === undefined) {
        into.chamber(component, { node, ...chamber }, port, area * stroke);
        return;
      }
      const behind = into.inner(component, `cushion ${port}`);
      into.chamber(component, { node: behind, ...chamber }, undefined, area * stroke);
      const element = into.add(
        component,
        {
          type: 'cushion',
          a: behind,
          b: node,
          actuator: into.body(component.id) ?? 0,
          end: port === 'cap' ? 'retracted' : 'extended',
          length: Math.min(cushion, stroke / 2),
          kMin: pathK({ flow: CUSHION_SPEED * area, drop: 100 * BAR }),
          kFree: pathK(NO_LOSS),
        },
        [undefined, port],
        `cushion, ${port} side`,
      );
      into.limitation({ component: component.id, words: `${component.id} cushion`, targets: [{ element, size: 'kMin' }] });
      into.knot(
        component.id,
        port === 'cap' ? Math.min(cushion, stroke / 2) : stroke - Math.min(cushion, stroke / 2),
        `${component.id} cushion begins`,
      );
    };
    addSide('cap', areas.cap);
    addSide('rod', areas.rod);
    if (cushion !== undefined) {
      into.assume({
        component: component.id,
        property: 'cushion',
        value: '50 mm/s at the stop for 100 bar, widening with the square of the way left',
        source: 'memory',
        note: 'common practice, from memory',
      });
    }
    for (const at of areas.stages?.at.slice(1) ?? []) into.knot(component.id, at, `${component.id} next stage`);
    if (spring !== undefined) {
      // f1 at the pressureless end, f2 at the other, always pushing to the pressureless end.
      const [f1, f2] = [toKilo(spring.from.si), toKilo(spring.to.si)];
      into.spring(component, only === 'rod' ? { at: [0, stroke], force: [f2, f1] } : { at: [0, stroke], force: [-f1, -f2] });
    }
    into.sealFriction(component, siOr(component, into, 'seal', DEFAULT_SEAL, '3 bar') * areas.bore);
    if (areas.cap !== undefined && areas.rod !== undefined) {
      addLeak(
        component,
        into,
        { node: into.nodeOrBlind(component, 'cap'), port: 'cap' },
        { node: into.nodeOrBlind(component, 'rod'), port: 'rod' },
        0,
      );
    }
  },
};
