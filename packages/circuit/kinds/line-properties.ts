/** Properties of a line and of a load: as tables, like those of the kinds. */
import type { PropertySpec } from './kind.ts';

export const LINE_PROPERTIES: readonly PropertySpec[] = [
  { name: 'flanged', shape: { form: 'flag' }, required: false, default: 'not said', example: 'flanged', about: '' },
  { name: 'tube', shape: { form: 'flag' }, required: false, default: 'not said', example: 'tube', about: '' },
  { name: 'hose', shape: { form: 'flag' }, required: false, default: 'not said', example: 'hose', about: '' },
  { name: 'bore', shape: { form: 'quantity', dimensions: ['length'] }, required: false, default: '—', example: 'bore 16 mm', about: '' },
  { name: 'wall', shape: { form: 'quantity', dimensions: ['length'] }, required: false, default: '—', example: 'wall 2 mm', about: '' },
  { name: 'length', shape: { form: 'quantity', dimensions: ['length'] }, required: false, default: '0 m', example: 'length 2.5 m', about: '' },
  { name: 'rated', shape: { form: 'quantity', dimensions: ['pressure'] }, required: false, default: '—', example: 'rated 250 bar', about: '' },
  { name: 'bends', shape: { form: 'number' }, required: false, default: '0', example: 'bends 4', about: '' },
  { name: 'shielded', shape: { form: 'flag' }, required: false, default: '—', example: 'shielded', about: '' },
];

export const LOAD_PROPERTIES: readonly PropertySpec[] = [
  { name: 'mass', shape: { form: 'quantity', dimensions: ['mass'] }, required: false, default: '—', example: 'mass 400 kg', about: '' },
  { name: 'inertia', shape: { form: 'quantity', dimensions: ['inertia'] }, required: false, default: '—', example: 'inertia 3 kg.m2', about: '' },
  { name: 'friction', shape: { form: 'quantity', dimensions: ['force', 'torque'] }, required: false, default: '0', example: 'friction 250 N', about: '' },
  { name: 'resist', shape: { form: 'load' }, required: false, many: true, default: '—', example: 'resist 9 kN from 270 mm to 315 mm extending', about: '' },
  { name: 'inward', shape: { form: 'load' }, required: false, many: true, default: '—', example: 'inward 12 kN', about: '' },
  { name: 'outward', shape: { form: 'load' }, required: false, many: true, default: '—', example: 'outward 3 kN in Lower', about: '' },
  { name: 'forward', shape: { form: 'load' }, required: false, many: true, default: '—', example: 'forward 80 N.m', about: '' },
  { name: 'backward', shape: { form: 'load' }, required: false, many: true, default: '—', example: 'backward 80 N.m', about: '' },
  { name: 'people', shape: { form: 'word', words: ['near', 'under', 'never'] }, required: false, default: 'not said', example: 'people under', about: '' },
  { name: 'speed', shape: { form: 'quantity', dimensions: ['velocity'] }, required: false, default: '—', example: 'speed 20 mm/s', about: '' },
  { name: 'propped', shape: { form: 'flag' }, required: false, default: 'not said', example: 'propped', about: '' },
];
