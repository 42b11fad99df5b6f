/** Cooler. */
import type { Kind } from './kind.ts';
import { pathK } from '../assembly/laws.ts';
import { passesOf } from './passing.ts';
import { hardware } from './common.ts';

export const cooler: Kind = {
  name: 'cooler',
  noun: 'cooler',
  about: 'Cooler: gives heat of the oil off to air or water.',
  ports: [
    { name: 'in', role: 'any', required: true, about: 'Entrance.' },
    { name: 'out', role: 'any', required: true, about: 'Exit.' },
  ],
  chain: { how: 'through', from: 'in', to: 'out' },
  properties: [
    {
      name: 'power',
      shape: { form: 'quantity', dimensions: ['power/temperature'] },
      required: true,
      default: '—',
      example: 'power 0.25 kW/K',
      about: 'Heat given off for each kelvin between oil and coolant.',
    },
    {
      name: 'passes',
      shape: { form: 'flowAt' },
      required: false,
      default: 'no loss (said among assumptions)',
      example: 'passes 40 L/min at 0.8 bar',
      about: 'Flow at pressure drop of the open valve. Left out: no loss is counted, and the report says so.',
    },
    {
      name: 'coolant',
      shape: { form: 'quantity', dimensions: ['temperature'] },
      required: false,
      default: 'ambient',
      example: 'coolant 20 degC',
      about: 'Temperature of the coolant.',
    },
    ...hardware,
  ],
  groups: [],
  /** A path; its heat is counted in the balance, not here. */
  assemble(component, into) {
    const element = into.add(
      component,
      {
        type: 'path',
        a: into.nodeOrBlind(component, 'in'),
        b: into.nodeOrBlind(component, 'out'),
        k: pathK(passesOf(component, into)),
      },
      ['in', 'out'],
      'in to out',
    );
    into.limitation({ component: component.id, words: `${component.id} passes`, targets: [{ element, size: 'k' }] });
  },
};
