/** No finding is a guess: what rests on an unknown component says nothing. */
import { describe, expect, it } from 'vitest';
import { check } from './support.ts';

const circuit = (passes: string) => `circuit Bench
fluid F1 (grade 46, temperature 40 degC)
reservoir R1 (volume 100 L)
drive M1 (power 3 kW, speed 1450 rpm)
pump P1 (displacement 10 cm3/rev, driven by M1, rated 210 bar)
relief RV1 (set 100 bar, passes 30 L/min at 4 bar)
directional V1 (4/3, centre closed, spring to centre, coil a SOL1, coil b SOL2${passes})
cylinder C1 (bore 50 mm, rod 28 mm, stroke 300 mm, rated 210 bar)
suction R1 to P1
working P1 to RV1, V1.P
working V1.A to C1.cap
working V1.B to C1.rod
return V1.T, RV1 to R1
`;

describe('a pump that idles against a valve', () => {
  it('is told when the valve is known', () => {
    expect(check(circuit(', passes 40 L/min at 4 bar'), 'figures').findings.map((one) => one.code)).toContain('A09');
  });
  it('is not guessed when the valve lacks its flow', () => {
    expect(check(circuit(''), 'figures').findings.map((one) => one.code)).not.toContain('A09');
  });
});
