/** The circuit's fluid at one temperature, and how declared figures change away from the declared temperature. SI. */
import { si } from '../kinds/read.ts';
import type { Circuit } from '../model/circuit.ts';
import type { Assumption } from '../study/study.ts';
import { densityAt } from './density.ts';
import { viscosityOf } from './viscosity.ts';

export interface Oil {
  /** K */
  readonly temperature: number;
  /** kg/m3 at `temperature`. */
  readonly density: number;
  /** m2/s at `temperature`. */
  readonly viscosity: number;
  /** Pa, without air. */
  readonly bulk: number;
  /** Share of free air at one atmosphere. */
  readonly air: number;
  /** Drop of a valve path or cooler at a given flow: factor against the declared one. */
  readonly pathDrop: number;
  /** Drop of a filter. */
  readonly filterDrop: number;
  /** Density against the declared one (orifices, compensated flow controls). */
  readonly densityRatio: number;
  /** Leakage against the declared one. */
  readonly leakage: number;
}

export const DEFAULT_INDEX = 95;
export const DEFAULT_DENSITY = 870;
export const DEFAULT_BULK = 1.4e9;
export const DEFAULT_AIR = 0.005;
/** Without a fluid in the file: grade 46 at 40 degC, said among the assumptions. */
export const DEFAULT_GRADE = 46;
export const DEFAULT_TEMPERATURE = 313.15;

/** The oil of the circuit at `temperature` K (absent: the declared one), with what was assumed. */
export function oilOf(circuit: Circuit, temperature?: number): { readonly oil: Oil; readonly assumptions: readonly Assumption[] } {
  const fluid = circuit.components.find((c) => c.kind === 'fluid');
  const assumptions: Assumption[] = [];
  const read = (name: string, otherwise: number, shown: string, source: Assumption['source'] = 'default'): number => {
    const v = fluid === undefined ? undefined : si(fluid, name);
    if (v !== undefined && Number.isFinite(v) && (v > 0 || (v === 0 && (name === 'air' || name === 'index')))) return v;
    assumptions.push({ component: fluid?.id ?? 'fluid', property: name, value: shown, source, note: 'common practice, no source' });
    return otherwise;
  };
  const grade = read('grade', DEFAULT_GRADE, '46');
  const declared = read('temperature', DEFAULT_TEMPERATURE, '40 degC');
  const index = read('index', DEFAULT_INDEX, '95');
  const density = read('density', DEFAULT_DENSITY, '870 kg/m3');
  const bulk = read('bulk', DEFAULT_BULK, '14000 bar');
  const air = read('air', DEFAULT_AIR, '0.5 %');
  const now = temperature ?? declared;
  const nuDeclared = viscosityOf(grade, index, declared) * 1e-6;
  const nu = now === declared ? nuDeclared : viscosityOf(grade, index, now) * 1e-6;
  const rho = densityAt(density, declared, now);
  const ratio = nu / nuDeclared;
  const densityRatio = rho / density;
  return {
    oil: {
      temperature: now,
      density: rho,
      viscosity: nu,
      bulk,
      air,
      pathDrop: densityRatio * (ratio > 1 ? ratio ** 0.25 : 1),
      filterDrop: 0.3 + 0.7 * ratio,
      densityRatio,
      leakage: 1 / ratio,
    },
    assumptions,
  };
}
