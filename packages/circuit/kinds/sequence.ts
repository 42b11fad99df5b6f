/** Sequence valve. */
import type { Kind } from './kind.ts';
import { hardware } from './common.ts';
import { word } from './read.ts';

export const sequence: Kind = {
  name: 'sequence',
  noun: 'sequence valve',
  about: 'Sequence valve: opens from P to A when the pilot pressure exceeds its setting.',
  ports: [
    { name: 'P', role: 'pressure', required: true, about: 'Inlet.' },
    { name: 'A', role: 'working', required: true, about: 'To the actuator that comes second.' },
    { name: 'X', role: 'pilot', required: false, about: 'External pilot.' },
    { name: 'Y', role: 'drain', required: true, about: 'Drain of the spring chamber, to the reservoir.' },
  ],
  chain: { how: 'through', from: 'P', to: 'A' },
  properties: [
    { name: 'set', shape: { form: 'quantity', dimensions: ['pressure'] }, required: true, default: '—', example: 'set 90 bar', about: 'Pressure at which it begins to open; fully open 10 % above.' },
    {
      name: 'reverse',
      shape: { form: 'word', words: ['check'] },
      required: false,
      default: 'no reverse path',
      example: 'reverse check',
      about: 'Check valve built in: free flow from A to P.',
    },
    {
      name: 'external',
      shape: { form: 'word', words: ['pilot'] },
      required: false,
      default: 'internal pilot',
      example: 'external pilot',
      about: 'Opened by the pressure at X instead of P.',
    },
    {
      name: 'internal',
      shape: { form: 'word', words: ['drain'] },
      required: false,
      default: 'external drain',
      example: 'internal drain',
      about: 'Spring chamber drained into A instead of Y.',
    },
    {
      name: 'passes',
      shape: { form: 'flowAt' },
      required: false,
      default: 'no loss (said among assumptions)',
      example: 'passes 40 L/min at 4 bar',
      about: 'Flow at pressure drop of the open valve. Left out: no loss is counted, and the report says so.',
    },
    ...hardware,
  ],
  groups: [],
  portsOf(component) {
    return sequence.ports
      .filter((p) => p.name !== 'Y' || word(component, 'internal') !== 'drain')
      .map((p) => (p.name === 'X' && word(component, 'external') === 'pilot' ? { ...p, required: true } : p));
  },
};
