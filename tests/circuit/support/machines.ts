/** Three machines in the notation for property tests: a drill head, a holding lift, a sequence of two cylinders. */

export const HEAD_AND_FEED = `
fluid HM46 (grade 46, index 100, temperature 45 degC)
reservoir R1 (volume 220 L)
drive M1 (power 5.5 kW, speed 1450 rpm)
pump P1 (displacement 40 cm3/rev, driven by M1, volumetric 94 %, rated 210 bar)
pump P2 (displacement 8 cm3/rev, driven by M1, volumetric 93 %, rated 250 bar)
check CV1 (crack 0.5 bar, passes 80 L/min at 3 bar)
unloading UV1 (set 40 bar, closes 34 bar, passes 80 L/min at 3 bar)
relief RV1 (set 160 bar, override 8 %, piloted, vented 4 bar, passes 90 L/min at 6 bar)
directional V0 (2/2, normally open, coil a SOL0, passes 5 L/min at 1 bar)
directional V2 (4/3, centre closed, spring to centre, coil a SOL2, coil b SOL3, passes 100 L/min at 5 bar)
throttle FC1 (set 1.26 L/min, compensated, reverse check)
deceleration DV1 (closed by C2 from 250 mm to 265 mm, passes 60 L/min at 4 bar)
cylinder C2 (bore 63 mm, rod 36 mm, stroke 320 mm, attitude level)
filter F1 (passes 160 L/min at 0.4 bar, bypass 1.7 bar)
suction R1 to P1, P2
working P1 to UV1, CV1
working pressure: P2, CV1 to RV1, V2.P
pilot pressure to UV1.X
pilot RV1.X to V0.P
drain V0.A to R1
working V2.A to C2.cap
working C2.rod to FC1, DV1 to V2.B
return V2.T to F1 to R1
return UV1, RV1 to R1
`;

export const LIFT = `
fluid HM32 (grade 32, temperature 35 degC)
reservoir R1 (volume 40 L)
drive M1 (power 3 kW, speed 1450 rpm)
pump P1 (displacement 8 cm3/rev, driven by M1, rated 210 bar)
relief RV1 (set 125 bar, passes 20 L/min at 4 bar)
directional V1 (4/3, centre open, spring to centre, coil a SOL1, coil b SOL2, passes 30 L/min at 4 bar)
pilotcheck PC1 (ratio 4:1, passes 30 L/min at 3 bar)
throttle FC1 (set 9 L/min, compensated, reverse check)
burst HB1 (closes 22 L/min, passes 15 L/min at 2 bar)
cylinder C1 (bore 80 mm, single cap, stroke 1200 mm, attitude rod up, rated 210 bar)
filter F1 (passes 40 L/min at 0.3 bar, bypass 1.7 bar)
suction R1 to P1
working P1 to RV1, V1.P
working V1.A to PC1.V
working FC1.out to PC1.C
working FC1.in to HB1.V
working HB1.C to C1.cap (hose, bore 12 mm, length 1.5 m)
pilot V1.B to PC1.X
return V1.T to F1 to R1
return RV1 to R1
`;

export const TWO_CYLINDERS = `
fluid HM46 (grade 46, temperature 45 degC)
reservoir R1 (volume 60 L)
drive M1 (power 3 kW, speed 1450 rpm)
pump P1 (displacement 8 cm3/rev, driven by M1, rated 210 bar)
relief RV1 (set 120 bar, passes 20 L/min at 4 bar)
directional V1 (4/3, centre tandem, spring to centre, coil a SOL1, coil b SOL2, passes 30 L/min at 3 bar)
reducing PR1 (set 50 bar, relieving yes, reverse check, passes 20 L/min at 4 bar)
counterbalance CB1 (set 60 bar, ratio 3:1, passes 30 L/min at 6 bar)
sequence SV1 (set 80 bar, reverse check, passes 20 L/min at 4 bar)
cylinder C1 (bore 63 mm, rod 36 mm, stroke 50 mm, attitude rod down)
cylinder C2 (bore 50 mm, rod 28 mm, stroke 200 mm, attitude level)
suction R1 to P1
working P1 to RV1, V1.P
working forward: V1.A to PR1.P, SV1
working PR1.A to C1.cap
working SV1 to C2.cap
working C1.rod to CB1.C
working back: V1.B to C2.rod, CB1.V
pilot forward to CB1.X
drain PR1.Y, SV1.Y to R1
return V1.T to R1 (tube, bore 16 mm, length 3 m, bends 2)
return RV1 to R1
`;
