/** Cylinder. */
import type { Component } from '../model/circuit.ts';
import type { Kind } from './kind.ts';
import { hardware } from './common.ts';
import { has, word } from './read.ts';

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
    { name: 'bore', shape: { form: 'quantity', dimensions: ['length'] }, required: true, default: '—', example: 'bore 63 mm', about: 'Bore; of a plunger or telescopic cylinder the (largest) plunger diameter.' },
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
    { name: 'begins', shape: { form: 'place' }, required: false, default: 'retracted', example: 'begins extended', about: 'Position at the start.' },
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
    { name: 'through', shape: { form: 'flag' }, required: false, default: '—', example: 'through', about: 'Rod on both sides: both areas are the annulus.' },
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
};

/** The only port of a single-acting cylinder or plunger; undefined for a double-acting one. */
export function portOfSingle(component: Component): 'cap' | 'rod' | undefined {
  const single = word(component, 'single');
  if (single === 'cap' || single === 'rod') return single;
  return has(component, 'rod') ? undefined : 'cap';
}
