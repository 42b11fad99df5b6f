/** Circuits from text for tests of the study; a text that does not resolve fails the test at once. */
import type { Circuit } from '@oilway/circuit';
import { analyseText } from '@oilway/language';

export function circuitOf(text: string, allowErrors = false): Circuit {
  const found = analyseText({ uri: 'test:/circuit.oilway', text });
  const errors = found.findings.filter((one) => one.severity === 'error' && !one.computed);
  if (!allowErrors && errors.length > 0) throw new Error(errors.map((one) => one.what).join('\n'));
  return found.circuit;
}

/** One cylinder on a four-way valve, one pump; tests add control and loads. */
export const PLAIN = `circuit Plain
fluid     HM46 (grade 46, temperature 45 degC)
reservoir R1 (volume 100 L)
drive     M1 (power 5.5 kW, speed 1450 rpm)
pump      P1 (displacement 16 cm3/rev, driven by M1, rated 210 bar)
relief    RV1 (set 150 bar, passes 40 L/min at 4 bar)
directional V1 (4/3, centre tandem, spring to centre, coil a SOL1, coil b SOL2, passes 60 L/min at 4 bar)
cylinder  C1 (bore 63 mm, rod 36 mm, stroke 300 mm, attitude level, rated 210 bar)
switch    LS1 (on C1, from 295 mm to 300 mm)
switch    LS2 (on C1, from 0 mm to 3 mm)
switch    PS1 (rises 120 bar, falls 100 bar)
switch    GUARD (outside)
suction R1 to P1
working P1 to RV1, V1.P
working V1.A to C1.cap, PS1
working V1.B to C1.rod
return  V1.T to R1
return  RV1 to R1
`;
