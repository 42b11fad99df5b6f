/** The circuit that "New Circuit" opens: small, complete, without findings. */
export const NEW_CIRCUIT = `// A table moved by one cylinder. Change a bore, a setting or the load and watch the figures follow.
circuit Table "Table, out and back"

let system = 120 bar

fluid     HM46 (grade 46, temperature 45 degC)
reservoir R1 (volume 100 L)
drive     M1 (power 4 kW, speed 1450 rpm)
pump      P1 (displacement 11 cm3/rev, driven by M1, rated 210 bar)
relief    RV1 (set system, passes 40 L/min at 6 bar)
directional V1 (4/3, centre tandem, spring to centre, coil a SOL1, coil b SOL2, passes 40 L/min at 5 bar)
cylinder  C1 (bore 63 mm, rod 36 mm, stroke 300 mm, attitude level, rated 210 bar)
filter    F1 (passes 80 L/min at 0.4 bar, bypass 1.7 bar)

suction R1 to P1
working pressure: P1 to RV1, V1.P (rated 210 bar)
working V1.A to C1.cap
working V1.B to C1.rod
return  V1.T, RV1 to F1 to R1

load C1 (friction 500 N, resist 20 kN extending)

cycle Work {
  step Out  energise SOL1 until C1 extended, at most 10 s
  step Back energise SOL2 until C1 retracted, at most 10 s
}
require C1 force in Out at least 20 kN
require M1 loading at most 100 %
`;
