/** Long circuits for measurements: axes side by side on one supply. */

/** A circuit of so many lines: axes side by side on one supply. */
export function longCircuit(lines: number): string {
  const head = [
    'circuit Long',
    'fluid HM46 (grade 46, temperature 45 degC)',
    'reservoir R1 (volume 400 L)',
    'drive M1 (power 30 kW, speed 1450 rpm)',
    'pump P1 (displacement 80 cm3/rev, driven by M1, rated 250 bar)',
    'relief RV1 (set 160 bar, passes 200 L/min at 6 bar)',
    'suction R1 to P1',
    'working supply: P1 to RV1',
    'return RV1 to R1',
  ];
  const axis = (n: number): string[] => [
    `directional V${n} (4/3, centre closed, spring to centre, coil a SOL${n}A, coil b SOL${n}B, passes 40 L/min at 5 bar) "Axis ${n}"`,
    `throttle FC${n} (set 6 L/min, compensated, reverse check)`,
    `cylinder C${n} (bore 63 mm, rod 36 mm, stroke 200 mm, attitude level, rated 250 bar)`,
    `switch LS${n} (on C${n}, from 195 mm to 200 mm)`,
    `working supply to V${n}.P`,
    `working V${n}.A to C${n}.cap`,
    `working C${n}.rod to FC${n} to V${n}.B`,
    `return V${n}.T to R1`,
    `load C${n} (friction 200 N, resist 4 kN extending)`,
    '',
  ];
  const body: string[] = [];
  for (let n = 1; head.length + body.length < lines; n += 1) body.push(...axis(n));
  return `${[...head, ...body].slice(0, lines).join('\n')}\n`;
}
