/** Drift counts from the end of the first second, however long the steps of the run. */
import { study } from '@oilway/circuit';
import { expect, it } from 'vitest';
import { circuitOf } from './support/circuits.ts';

it('4 L/min metered out of a charged accumulator move a bore of 50 mm by 170 mm in 5 s', () => {
  const result = study(
    circuitOf(`circuit Creep
fluid F1 (grade 46, temperature 20 degC, density 900 kg/m3, bulk 100 GPa, air 0 %)
reservoir R1 (volume 400 L)
relief RV1 (set 200 bar, passes 10000 L/min at 1 bar, override 1 %)
throttle FC1 (set 4 L/min, compensated)
accumulator ACC1 (bladder, volume 10 L, precharge 90 bar at 20 degC, gas nitrogen)
cylinder C1 (bore 50 mm, stroke 2000 mm, single cap, seal 0 bar, attitude level)
working ACC1 to FC1.in, RV1
working FC1.out to C1.cap
return RV1 to R1
load C1 (inward 19 kN)
require C1 drift in REST at most 2 m for 5 s
`),
  );
  // By hand: 4 L/min for 5 s are 0.3333 L; over 1963.5 mm2, 169.8 mm.
  expect(result.requirements[0]?.worst?.value).toBeCloseTo(0.1698, 4);
});
