/** Properties that all hardware shares. */
import type { PropertySpec } from './kind.ts';

export const commonCode: readonly PropertySpec[] = [
  {
    name: 'code',
    shape: { form: 'text' },
    required: false,
    default: '—',
    example: 'code "1.3"',
    about: 'Designation on the drawing (ISO 1219-2); unique in the circuit.',
  },
];
export const hardware: readonly PropertySpec[] = [
  ...commonCode,
  {
    name: 'rated',
    shape: { form: 'portQuantity', dimension: 'pressure' },
    required: false,
    many: true,
    default: 'not said',
    example: 'rated 315 bar',
    about: 'Highest continuous pressure it may see; `rated T 160 bar` for one port.',
  },
  {
    name: 'elevation',
    shape: { form: 'quantity', dimensions: ['length'] },
    required: false,
    default: '0 m (oil level)',
    example: 'elevation 0.4 m',
    about: 'Height of its ports above the oil level.',
  },
  {
    name: 'leak',
    shape: { form: 'flowAt' },
    required: false,
    default: 'by kind',
    defaultSource: 'common practice, from memory',
    example: 'leak 20 cm3/min at 100 bar',
    about: 'Internal leakage, laminar, across its blocked edge.',
  },
];
