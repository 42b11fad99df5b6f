/** Pump. */
import type { Kind } from './kind.ts';
import { NO_LOSS, pathK } from '../assembly/laws.ts';
import { BAR, LITRE_PER_MINUTE, toLitresPerSecond, toMPa } from '../assembly/units.ts';
import { siOr } from './passing.ts';
import { ratedAt, reference, si, word } from './read.ts';
import { hardware } from './common.ts';
import { has } from './read.ts';

/** Where nothing is declared (common practice, no source). */
export const DEFAULT_MECHANICAL = 0.92;
/** Pressure at which `volumetric` holds, Pa, where no rating is declared. */
export const DEFAULT_RATED = 210 * BAR;

export const pump: Kind = {
  name: 'pump',
  noun: 'pump',
  about: 'Pump: fixed displacement, or with pressure compensator and load sensing.',
  ports: [
    { name: 'S', role: 'suction', required: true, about: 'Suction port, from the reservoir.' },
    { name: 'P', role: 'pressure', required: true, about: 'Outlet.' },
    { name: 'L', role: 'drain', required: false, about: 'Casing drain; leave it out where leakage goes back to suction.' },
    { name: 'X', role: 'pilot', required: false, about: 'Remote setting of the compensator.' },
    { name: 'LS', role: 'pilot', required: false, about: 'Load-sensing signal: highest load pressure.' },
  ],
  chain: { how: 'through', from: 'S', to: 'P' },
  properties: [
    {
      name: 'displacement',
      shape: { form: 'quantity', dimensions: ['displacement'] },
      required: true,
      default: '—',
      example: 'displacement 40 cm3/rev',
      about: 'Volume a revolution at full stroke.',
    },
    {
      name: 'driven',
      shape: { form: 'reference', small: 'by', kinds: ['drive'] },
      required: true,
      default: '—',
      example: 'driven by M1',
      about: 'The drive that turns it.',
    },
    {
      name: 'volumetric',
      shape: { form: 'quantity', dimensions: ['ratio'] },
      required: false,
      default: '92 % at rated pressure',
      defaultSource: 'common practice, from memory',
      example: 'volumetric 94 %',
      about: 'Volumetric efficiency at `rated` pressure; leakage grows in proportion to pressure.',
    },
    {
      name: 'mechanical',
      shape: { form: 'quantity', dimensions: ['ratio'] },
      required: false,
      default: '92 %',
      defaultSource: 'common practice, from memory',
      example: 'mechanical 91 %',
      about: 'Hydro-mechanical efficiency: shaft power = oil power / mechanical.',
    },
    {
      name: 'compensator',
      shape: { form: 'quantity', dimensions: ['pressure'] },
      required: false,
      default: 'fixed displacement',
      example: 'compensator 180 bar',
      about: 'Pressure at which the pump has stroked back to no outflow; full stroke is held to 3 % (at least 3 bar) below it.',
    },
    {
      name: 'sensing',
      shape: { form: 'quantity', dimensions: ['pressure'] },
      required: false,
      default: 'none',
      example: 'sensing 20 bar',
      about: 'Pressure kept above the signal at LS; LS must be joined.',
    },
    {
      name: 'smallest',
      shape: { form: 'quantity', dimensions: ['displacement'] },
      required: false,
      default: '0 cm3/rev',
      example: 'smallest 4 cm3/rev',
      about: 'Least displacement the compensator strokes back to.',
    },
    {
      name: 'inlet',
      shape: { form: 'quantity', dimensions: ['pressure'] },
      required: false,
      default: '-0.2 bar',
      defaultSource: 'common practice, from memory',
      example: 'inlet -0.15 bar',
      about: 'Lowest gauge pressure allowed at S; a limit for the rules.',
    },
    {
      name: 'casing',
      shape: { form: 'quantity', dimensions: ['pressure'] },
      required: false,
      default: '1 bar',
      defaultSource: 'common practice, from memory',
      example: 'casing 2 bar',
      about: 'Highest pressure allowed at L; a limit for the rules.',
    },
    {
      name: 'reliefs',
      shape: { form: 'quantity', dimensions: ['pressure'] },
      required: false,
      default: 'none inside',
      example: 'reliefs 210 bar',
      about: 'Relief valve built into the pump, outlet to suction.',
    },
    ...hardware,
  ],
  groups: [],
  portsOf(component) {
    return pump.ports.map((p) => (p.name === 'LS' && has(component, 'sensing') ? { ...p, required: true } : p));
  },
  /** Theoretical flow by stroke, less a leakage in proportion to pressure; compensator, load sensing, remote setting, built-in relief. */
  assemble(component, into) {
    const displacement = si(component, 'displacement');
    if (displacement === undefined) return into.cannot(component, `${component.id} has no \`displacement\``);
    const driveId = reference(component, 'driven')?.id ?? word(component, 'driven');
    const drive = driveId === undefined ? undefined : into.component(driveId);
    const speed = drive === undefined ? undefined : si(drive, 'speed');
    if (drive === undefined || speed === undefined)
      return into.cannot(component, `${component.id}: its drive ${driveId ?? ''} is not computed`);
    const sensing = si(component, 'sensing');
    const ls = into.node(component, 'LS');
    if ((sensing === undefined) !== (ls === undefined)) {
      return into.cannot(
        component,
        sensing === undefined ? `${component.id} has LS joined but no \`sensing\`` : `${component.id} is load-sensing but LS is not joined`,
      );
    }
    const volumetric = siOr(component, into, 'volumetric', 0.92, '92 % at rated pressure');
    siOr(component, into, 'mechanical', DEFAULT_MECHANICAL, '92 %');
    const rated = ratedAt(component, 'P') ?? DEFAULT_RATED;
    if (!(rated > 0)) return into.cannot(component, `${component.id}: \`rated\` is no pressure at which \`volumetric\` could hold`);
    if (ratedAt(component, 'P') === undefined) {
      into.assume({
        component: component.id,
        property: 'rated',
        value: '210 bar',
        source: 'default',
        note: 'pressure at which `volumetric` holds: common practice, no source',
      });
    }
    const qth = displacement * speed;
    const s = into.nodeOrBlind(component, 'S');
    const p = into.nodeOrBlind(component, 'P');
    const l = into.node(component, 'L');
    const running = into.parameter(component, 'running', 1);
    into.onSetting((setting, put) => put(running, setting.drives[drive.id] === false ? 0 : 1));
    const compensator = si(component, 'compensator');
    const remote = into.node(component, 'X');
    const set = compensator === undefined ? undefined : into.parameter(component, 'compensator', toMPa(compensator));
    const smallest = si(component, 'smallest') ?? 0;
    const element = into.add(
      component,
      {
        type: 'pump',
        s,
        p,
        ...(l === undefined ? {} : { l }),
        qth: toLitresPerSecond(qth),
        leak: (((1 - volumetric) * toLitresPerSecond(qth)) / toMPa(rated)) * into.oil.leakage,
        running,
        ...(compensator === undefined || set === undefined
          ? {}
          : {
              compensator: {
                set,
                band: into.parameter(component, 'compensator band', toMPa(Math.max(0.03 * compensator, 3 * BAR))),
                smallest: Math.min(1, Math.max(0, smallest / displacement)),
                ...(remote === undefined ? {} : { x: remote, xAdds: toMPa(sensing ?? 20 * BAR) }),
              },
            }),
        ...(sensing === undefined || ls === undefined ? {} : { sensing: { ls, margin: toMPa(sensing) } }),
      },
      l === undefined ? ['S', 'P'] : ['S', 'P', 'L'],
      'outlet',
    );
    if (remote !== undefined)
      into.add(
        component,
        { type: 'path', a: p, b: remote, k: pathK({ flow: LITRE_PER_MINUTE, drop: 20 * BAR }) },
        ['P', 'X'],
        'remote pilot',
      );
    const inside = si(component, 'reliefs');
    if (inside !== undefined) {
      into.add(
        component,
        {
          type: 'relief',
          p,
          t: s,
          ref: s,
          set: into.parameter(component, 'reliefs', toMPa(inside)),
          vented: 0,
          override: 0.1,
          qN: toLitresPerSecond(qth),
          k: pathK(NO_LOSS),
        },
        ['P', 'S'],
        'built-in relief',
      );
    }
    into.pump({ component: component.id, drive: drive.id, element });
    into.limitation({ component: component.id, words: `pump flow ${component.id}`, targets: [{ element, size: 'qth' }] });
    if (set !== undefined)
      into.limitation({ component: component.id, words: `${component.id} compensator`, targets: [{ parameter: set }] });
    into.opening({ component: component.id, element });
  },
};
