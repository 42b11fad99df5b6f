/** Properties of a line and of a load: as tables, like those of the kinds. */
import type { PropertySpec } from './kind.ts';

export const LINE_PROPERTIES: readonly PropertySpec[] = [
  { name: 'flanged', shape: { form: 'flag' }, required: false, default: 'not said', example: 'flanged', about: 'Flanged straight on, no pipe between.' },
  { name: 'tube', shape: { form: 'flag' }, required: false, default: 'not said', example: 'tube', about: 'Steel tube.' },
  { name: 'hose', shape: { form: 'flag' }, required: false, default: 'not said', example: 'hose', about: 'Hose.' },
  { name: 'bore', shape: { form: 'quantity', dimensions: ['length'] }, required: false, default: '—', example: 'bore 16 mm', about: 'Inner diameter. With `length` it has a pressure loss; alone it is used for velocity and rating.' },
  { name: 'wall', shape: { form: 'quantity', dimensions: ['length'] }, required: false, default: '—', example: 'wall 2 mm', about: 'Wall thickness.' },
  {
    name: 'length',
    shape: { form: 'quantity', dimensions: ['length'] },
    required: false,
    default: '0 m',
    example: 'length 2.5 m',
    about: 'Length of the piece.',
  },
  {
    name: 'rated',
    shape: { form: 'quantity', dimensions: ['pressure'] },
    required: false,
    default: '—',
    example: 'rated 250 bar',
    about: 'Highest pressure the pipe is made for.',
  },
  { name: 'bends', shape: { form: 'number' }, required: false, default: '0', example: 'bends 4', about: 'Number of bends.' },
  { name: 'shielded', shape: { form: 'flag' }, required: false, default: '—', example: 'shielded', about: 'Guarded against whipping and spray.' },
];

export const LOAD_PROPERTIES: readonly PropertySpec[] = [
  { name: 'mass', shape: { form: 'quantity', dimensions: ['mass'] }, required: false, default: '—', example: 'mass 400 kg', about: 'Moved mass: inertia, and weight by the attitude.' },
  {
    name: 'inertia',
    shape: { form: 'quantity', dimensions: ['inertia'] },
    required: false,
    default: '—',
    example: 'inertia 3 kg.m2',
    about: 'Moment of inertia at the output shaft.',
  },
  {
    name: 'friction',
    shape: { form: 'quantity', dimensions: ['force', 'torque'] },
    required: false,
    default: '0',
    example: 'friction 250 N',
    about: 'Friction of guides and load, against any motion; never counted on to hold.',
  },
  {
    name: 'resist',
    shape: { form: 'load' },
    required: false,
    many: true,
    default: '—',
    example: 'resist 9 kN from 270 mm to 315 mm extending',
    about: 'Force against motion in the direction named; nothing at rest, never drives.',
  },
  { name: 'inward', shape: { form: 'load' }, required: false, many: true, default: '—', example: 'inward 12 kN', about: 'Force pushing the rod in, whether it moves or not.' },
  { name: 'outward', shape: { form: 'load' }, required: false, many: true, default: '—', example: 'outward 3 kN in Lower', about: 'Force pulling the rod out, whether it moves or not.' },
  { name: 'forward', shape: { form: 'load' }, required: false, many: true, default: '—', example: 'forward 80 N.m', about: 'Torque turning forward (as oil into A does), at the output.' },
  { name: 'backward', shape: { form: 'load' }, required: false, many: true, default: '—', example: 'backward 80 N.m', about: 'Torque turning backward, at the output.' },
  {
    name: 'people',
    shape: { form: 'word', words: ['near', 'under', 'never'] },
    required: false,
    default: 'not said',
    example: 'people under',
    about: 'Persons near or under the moved part, or never.',
  },
  {
    name: 'speed',
    shape: { form: 'quantity', dimensions: ['velocity'] },
    required: false,
    default: '—',
    example: 'speed 20 mm/s',
    about: 'Speed wanted of it; for sizing only.',
  },
  { name: 'propped', shape: { form: 'flag' }, required: false, default: 'not said', example: 'propped', about: 'A mechanical prop or lock holds the load when persons reach in.' },
];

/** `velocity suction 1.0 m/s`: the line function stands where a port stands elsewhere (`Property.port`). */
export const LIMITS_PROPERTIES: readonly PropertySpec[] = [
  { name: 'velocity', shape: { form: 'portQuantity', dimension: 'velocity' }, required: false, many: true, default: 'by the rule', example: 'velocity suction 1.0 m/s', about: 'Highest mean velocity in lines of this function.' },
  { name: 'temperature', shape: { form: 'quantity', dimensions: ['temperature'] }, required: false, default: 'by the rule', example: 'temperature 60 degC', about: 'Highest oil temperature.' },
  { name: 'viscosity', shape: { form: 'range', dimensions: ['viscosity'] }, required: false, default: 'by the rule', example: 'viscosity 12 mm2/s to 800 mm2/s', about: 'Lowest and highest viscosity allowed.' },
  { name: 'cleanliness', shape: { form: 'text' }, required: false, default: 'by the rule', example: 'cleanliness "18/16/13"', about: 'Dirtiest class allowed (ISO 4406).' },
  { name: 'margin', shape: { form: 'quantity', dimensions: ['ratio'] }, required: false, default: '0 %', example: 'margin 10 %', about: 'By how much a requirement must be met.' },
  { name: 'idle', shape: { form: 'quantity', dimensions: ['pressure'] }, required: false, default: '20 bar', example: 'idle 20 bar', about: 'Highest pump outlet pressure that counts as idling.' },
  { name: 'surge', shape: { form: 'quantity', dimensions: ['pressure'] }, required: false, default: 'by the rule', example: 'surge 30 bar', about: 'Highest pressure rise when a valve closes.' },
];
