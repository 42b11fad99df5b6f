/** Drive. */
import type { Kind } from './kind.ts';
import { hardware } from './common.ts';

export const drive: Kind = {
  name: 'drive',
  noun: 'drive',
  about: 'Prime mover: turns its pumps at constant speed.',
  ports: [],
  chain: { how: 'none' },
  properties: [
    {
      name: 'engine',
      shape: { form: 'flag' },
      required: false,
      default: 'electric motor',
      example: 'engine',
      about: 'Combustion engine instead of an electric motor.',
    },
    {
      name: 'power',
      shape: { form: 'quantity', dimensions: ['power'] },
      required: true,
      default: '—',
      example: 'power 5.5 kW',
      about: 'Rated shaft power.',
    },
    {
      name: 'speed',
      shape: { form: 'quantity', dimensions: ['rotation'] },
      required: true,
      default: '—',
      example: 'speed 1450 rpm',
      about: 'Speed under load.',
    },
    {
      name: 'peak',
      shape: { form: 'quantity', dimensions: ['ratio'] },
      required: false,
      default: '100 %',
      defaultSource: 'common practice, from memory',
      example: 'peak 130 %',
      about: 'Highest short-time power, in % of rated power.',
    },
    {
      name: 'starts',
      shape: { form: 'word', words: ['direct', 'star', 'soft'] },
      required: false,
      default: 'direct',
      defaultSource: 'common practice, from memory',
      example: 'starts star',
      about: 'How an electric motor starts: direct on line, star-delta, soft starter.',
    },
    ...hardware,
  ],
  groups: [],
  /** Constant speed: it reaches the network through its pumps. */
  assemble() {},
};
