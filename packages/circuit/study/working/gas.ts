/** Oil that an accumulator gives between two pressures: as an ideal gas and as real nitrogen. */
import { ATMOSPHERE } from '../../fluid/density.ts';
import { oilAt, prechargeAt } from '../../fluid/gas.ts';
import { realOilAt, realPrechargeAt } from '../../fluid/nitrogen.ts';
import type { Component } from '../../model/circuit.ts';
import { property, si, valueNamed } from '../read.ts';
import type { Figure, Working } from '../study.ts';

/** Above this pressure, Pa gauge, nitrogen is no ideal gas any more to a designer's accuracy (common practice, no source). */
export const REAL_ABOVE = 150e5;

export interface StoredOil {
  readonly ideal: Figure;
  readonly real: Figure;
}

/** Oil between two gauge pressures, filled slowly at the oil's temperature, K; undefined without volume and precharge. */
export function storedBetween(accumulator: Component, low: number, high: number, temperature: number): StoredOil | undefined {
  const volume = si(accumulator, 'volume');
  const precharge = valueNamed(accumulator, 'precharge');
  if (volume === undefined || precharge?.type !== 'precharge' || !(high > low)) return undefined;
  const { pressure, temperature: filledAt } = precharge;
  const ideal = prechargeAt(pressure.si, filledAt.si, temperature);
  const real = realPrechargeAt(pressure.si + ATMOSPHERE, filledAt.si, temperature);
  const idealOil = oilAt(volume, ideal, high + ATMOSPHERE, 1) - oilAt(volume, ideal, low + ATMOSPHERE, 1);
  const realOil = realOilAt(volume, real, high + ATMOSPHERE, temperature) - realOilAt(volume, real, low + ATMOSPHERE, temperature);
  const inputs = (p0: number, how: string): Working['inputs'] => [
    {
      symbol: 'V0',
      value: volume,
      dimension: 'volume',
      source: `${accumulator.id} volume`,
      origin: (property(accumulator, 'volume') ?? accumulator).origin,
    },
    {
      symbol: 'p0',
      value: p0 - ATMOSPHERE,
      dimension: 'pressure',
      source: `${accumulator.id} precharge at the oil's temperature, ${how}`,
      origin: precharge.origin,
    },
    { symbol: 'p1', value: low, dimension: 'pressure', source: 'lowest of the run' },
    { symbol: 'p2', value: high, dimension: 'pressure', source: 'highest of the run' },
  ];
  return {
    ideal: {
      value: idealOil,
      dimension: 'volume',
      working: {
        formula: 'V = V0 x (p0/p1 - p0/p2), absolute pressures',
        inputs: inputs(ideal, 'ideal gas'),
        result: idealOil,
        dimension: 'volume',
        source: "Boyle's law, filled and given slowly",
      },
    },
    real: {
      value: realOil,
      dimension: 'volume',
      working: {
        formula: 'V = V0 x rho(p0) x (1/rho(p1) - 1/rho(p2)), absolute pressures',
        inputs: inputs(real, 'real nitrogen'),
        result: realOil,
        dimension: 'volume',
        source: 'nitrogen after Span et al., J. Phys. Chem. Ref. Data 29 (2000) 1361',
      },
    },
  };
}
