/** Fluid. */
import type { Kind } from './kind.ts';
import { commonCode } from './common.ts';

export const fluid: Kind = {
  name: 'fluid',
  noun: 'fluid',
  about: 'Hydraulic fluid of the whole circuit: viscosity, density, stiffness.',
  ports: [],
  chain: { how: 'none' },
  properties: [
    { name: 'grade', shape: { form: 'number' }, required: true, default: '—', example: 'grade 46', about: 'ISO 3448 viscosity grade: kinematic viscosity in mm2/s at 40 degC.' },
    { name: 'index', shape: { form: 'number' }, required: false, default: '95', defaultSource: 'common practice, from memory', example: 'index 100', about: 'Viscosity index (ISO 2909): how little the viscosity falls with temperature.' },
    {
      name: 'density',
      shape: { form: 'quantity', dimensions: ['density'] },
      required: false,
      default: '870 kg/m3',
      defaultSource: 'common practice, from memory',
      example: 'density 865 kg/m3',
      about: 'Density at `temperature`; it falls by 0.07 % a kelvin above it.',
    },
    {
      name: 'temperature',
      shape: { form: 'quantity', dimensions: ['temperature'] },
      required: true,
      default: '—',
      example: 'temperature 45 degC',
      about: 'Oil temperature at which the circuit is computed and `passes` figures hold.',
    },
    {
      name: 'cold',
      shape: { form: 'quantity', dimensions: ['temperature'] },
      required: false,
      default: '—',
      example: 'cold 10 degC',
      about: 'Lowest oil temperature at start; the cold study is made at it.',
    },
    {
      name: 'hot',
      shape: { form: 'quantity', dimensions: ['temperature'] },
      required: false,
      default: '—',
      example: 'hot 60 degC',
      about: 'Highest oil temperature in service; the hot study is made at it.',
    },
    {
      name: 'bulk',
      shape: { form: 'quantity', dimensions: ['pressure'] },
      required: false,
      default: '14000 bar',
      defaultSource: 'common practice, from memory',
      example: 'bulk 1.4 GPa',
      about: 'Bulk modulus of the oil without free air.',
    },
    { name: 'air', shape: { form: 'quantity', dimensions: ['ratio'] }, required: false, default: '0.5 %', defaultSource: 'common practice, from memory', example: 'air 1 %', about: 'Free (undissolved) air, share of volume at atmospheric pressure; it softens the oil at low pressure.' },
    { name: 'cleanliness', shape: { form: 'text' }, required: false, default: '—', example: 'cleanliness "19/17/14"', about: 'Cleanliness class to ISO 4406.' },
    ...commonCode,
  ],
  groups: [],
  assemble() {},
};
