/** Compressibility of nitrogen, worked back from the oil that charged accumulators are shown to hold. */
import type { Bench } from './bench.ts';
import { COMPRESSIBILITY, type NitrogenId, TEMPERATURES } from './published-nitrogen.ts';

/** bar */
const ATMOSPHERE = 1.01325;
/** Precharges, bar absolute, that go into the circuit charged to the highest pressure; the first two are the nearly ideal ones. */
const THIN = ATMOSPHERE;
const DOUBLE = 2 * ATMOSPHERE;
const PRECHARGES = [THIN, DOUBLE, 25, 50, 75, 100, 150] as const;
/** Pressures, bar absolute, to which the accumulators are charged: above 150 bar gauge the oil held follows the real gas. */
const CHARGES = [200, 250, 300, 350] as const;
const HIGHEST = 400;

const gauge = (absolute: number) => absolute - ATMOSPHERE;
const name = (precharge: number) => `ACC${(PRECHARGES as readonly number[]).indexOf(precharge) + 1}`;

/** Accumulators of 10 L on a pump that its relief holds at `pressure`, bar absolute; filled with gas and charged at one temperature. */
function charged(precharges: readonly number[], pressure: number, celsius: number): string {
  const each = precharges.map(
    (one) => `accumulator ${name(one)} (bladder, volume 10 L, precharge ${gauge(one)} bar at ${celsius} degC, gas nitrogen)`,
  );
  return `circuit Bench
fluid F1 (grade 46, temperature ${celsius} degC)
reservoir R1 (volume 400 L)
drive M1 (power 50 kW, speed 1000 rpm)
pump P1 (displacement 10 cm3/rev, driven by M1, volumetric 100 %, rated 700 bar)
relief RV1 (set ${gauge(pressure)} bar, passes 10000 L/min at 1 bar, override 1 %)
${each.join('\n')}
suction R1 to P1
working P1 to RV1, ${precharges.map(name).join(', ')}
return RV1 to R1
`;
}

/** Share of its volume that the gas is left with: density at precharge over density charged. */
function gasLeft(bench: Bench, precharge: number): number {
  const variant = bench.study.states.find((one) => one.id === 'REST')?.variants.find((one) => one.accumulators === 'charged');
  return 1 - (variant?.point.oil[name(precharge)] ?? Number.NaN) / 0.01;
}

/**
 * Z of the thinnest gas. Its excess over one is in proportion to the pressure there (virial equation), so a gas of twice the pressure has twice
 * the excess: with r the ratio of both Z, Z = 1 / (2 - r).
 */
function thin(highest: Bench): number {
  const ratio = (2 * gasLeft(highest, THIN)) / gasLeft(highest, DOUBLE);
  return 1 / (2 - ratio);
}

/** Z at the pressure a circuit is charged to: the thin gas is left with (thin / pressure) (Z / Z thin) of its volume. */
const chargedZ = (bench: Bench, pressure: number, ofThin: number): number => (gasLeft(bench, THIN) * pressure * ofThin) / THIN;

export const NITROGEN_CHARGES: readonly {
  readonly id: NitrogenId;
  readonly circuits: readonly string[];
  readonly read: (benches: readonly Bench[]) => number;
}[] = TEMPERATURES.flatMap((celsius) => {
  const highest = charged(PRECHARGES, HIGHEST, celsius);
  return (Object.keys(COMPRESSIBILITY) as unknown as (keyof typeof COMPRESSIBILITY)[]).map((key) => {
    const pressure = Number(key);
    const id: NitrogenId = `n2z-${key}-${celsius}`;
    if (pressure === 1) return { id, circuits: [highest], read: ([at]: readonly Bench[]) => 1 + (thin(at as Bench) - 1) / ATMOSPHERE };
    if (pressure === HIGHEST)
      return { id, circuits: [highest], read: ([at]: readonly Bench[]) => chargedZ(at as Bench, HIGHEST, thin(at as Bench)) };
    if (CHARGES.some((one) => one === pressure)) {
      return {
        id,
        circuits: [highest, charged([THIN], pressure, celsius)],
        read: ([at, own]: readonly Bench[]) => chargedZ(own as Bench, pressure, thin(at as Bench)),
      };
    }
    return {
      id,
      circuits: [highest],
      read: ([at]: readonly Bench[]) =>
        (pressure * chargedZ(at as Bench, HIGHEST, thin(at as Bench))) / (HIGHEST * gasLeft(at as Bench, pressure)),
    };
  });
});
