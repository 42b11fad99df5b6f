/** Pump. */
import type { Kind } from './kind.ts';
import { hardware } from './common.ts';
import { has } from './read.ts';

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
};
