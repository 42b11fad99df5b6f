/** Accumulator. */
import type { Kind } from './kind.ts';
import { prechargeAt } from '../fluid/gas.ts';
import { precharge, si } from './read.ts';
import { hardware } from './common.ts';

export const accumulator: Kind = {
  name: 'accumulator',
  noun: 'accumulator',
  about: 'Hydro-pneumatic accumulator.',
  ports: [{ name: 'P', role: 'any', required: true, about: 'Oil side.' }],
  chain: { how: 'fixed', port: 'P' },
  properties: [
    {
      name: 'volume',
      shape: { form: 'quantity', dimensions: ['volume'] },
      required: true,
      default: '—',
      example: 'volume 10 L',
      about: 'Gas volume at precharge.',
    },
    {
      name: 'precharge',
      shape: { form: 'precharge' },
      required: true,
      default: '—',
      example: 'precharge 90 bar at 20 degC',
      about: 'Gas pressure without oil, and the gas temperature it was filled at.',
    },
    { name: 'bladder', shape: { form: 'flag' }, required: false, group: 'form', default: '—', example: 'bladder', about: 'Bladder type.' },
    { name: 'piston', shape: { form: 'flag' }, required: false, group: 'form', default: '—', example: 'piston', about: 'Piston type.' },
    {
      name: 'diaphragm',
      shape: { form: 'flag' },
      required: false,
      group: 'form',
      default: '—',
      example: 'diaphragm',
      about: 'Diaphragm type.',
    },
    {
      name: 'gas',
      shape: { form: 'word', words: ['nitrogen'] },
      required: true,
      default: '—',
      example: 'gas nitrogen',
      about: 'Gas it is filled with; never air or oxygen.',
    },
    ...hardware,
  ],
  groups: [{ name: 'form', need: 'exactly one', of: ['bladder', 'piston', 'diaphragm'] }],
  /** Gas charge, ideal, at the temperature of the oil; below precharge no oil. */
  assemble(component, into) {
    const volume = si(component, 'volume');
    const charge = precharge(component, 'precharge');
    if (volume === undefined || charge === undefined)
      return into.cannot(component, `${component.id} has no \`${volume === undefined ? 'volume' : 'precharge'}\``);
    into.assume({
      component: component.id,
      property: 'gas',
      value: 'p V^n ideal; real nitrogen from a charge above 100 bar',
      source: 'derived',
      note: 'Span et al., J. Phys. Chem. Ref. Data 29 (2000) 1361; n 1.4 quickly, 1 slowly: common practice',
    });
    into.gas(
      component,
      into.nodeOrBlind(component, 'P'),
      volume,
      prechargeAt(charge.pressure.si, charge.temperature.si, into.oil.temperature),
    );
  },
};
