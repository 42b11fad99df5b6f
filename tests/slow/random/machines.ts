/** Seeded generator of machines as texts: valid, not sensible. Pumps, reliefs, valves, holding valves, throttles, cylinders, loads, pipes, accumulators, cycles. */

/** mulberry32: small, repeatable. */
function roller(seed: number): () => number {
  let a = seed >>> 0;
  return () => {
    a = (a + 0x6d2b79f5) >>> 0;
    let t = a;
    t = Math.imul(t ^ (t >>> 15), t | 1);
    t ^= t + Math.imul(t ^ (t >>> 7), t | 61);
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296;
  };
}

/** The text of a machine with one cycle; the same seed gives the same text. */
export function randomMachine(seed: number): string {
  const next = roller(seed * 2654435761);
  const chance = (p: number): boolean => next() < p;
  const pick = <T>(...of: readonly T[]): T => of[Math.floor(next() * of.length)] as T;
  const between = (low: number, high: number, digits = 1): string => (low + (high - low) * next()).toFixed(digits);
  const pipe = (): string =>
    chance(0.5) ? '' : ` (${pick('hose', 'tube')}, bore ${pick(4, 6, 8, 12, 16)} mm, length ${between(0.2, 8)} m)`;

  const parts: string[] = [];
  const lines: string[] = [];
  const steps: string[] = [];
  const returns: string[] = [];
  const pressure: string[] = [];
  const pumps = chance(0.25) ? 2 : 1;
  for (let p = 1; p <= pumps; p += 1) {
    const adjusted = chance(0.25) ? `, compensator ${between(60, 200, 0)} bar` : '';
    parts.push(
      `pump P${p} (displacement ${between(1, 60)} cm3/rev, driven by M1, volumetric ${between(75, 99)} %, rated 210 bar${adjusted})`,
    );
    lines.push(`suction R1 to P${p}`);
    if (pumps > 1 || chance(0.4)) {
      parts.push(`check K${p} (crack ${between(0, 3)} bar, passes ${between(20, 200, 0)} L/min at 4 bar)`);
      lines.push(`working P${p} to K${p}`);
      pressure.push(`K${p}.out`);
    } else pressure.push(`P${p}`);
  }
  if (!chance(0.05)) {
    parts.push(`relief RV1 (set ${between(20, 250, 0)} bar, passes ${between(20, 200, 0)} L/min at ${between(2, 8)} bar)`);
    pressure.push('RV1');
    returns.push('RV1');
  }
  if (chance(0.2)) {
    parts.push(`accumulator AC1 (volume ${between(0.5, 20)} L, precharge ${between(20, 120, 0)} bar at 20 degC, bladder, gas nitrogen)`);
    pressure.push('AC1');
  }
  const cylinders = 1 + Math.floor(next() * 3);
  for (let c = 1; c <= cylinders; c += 1) {
    const bore = pick(25, 32, 40, 50, 63, 80, 100, 125);
    const rod = Math.round(bore * (0.3 + 0.5 * next()));
    const stroke = pick(50, 100, 200, 400, 800);
    const attitude = pick('level', 'rod up', 'rod down', '30 deg');
    const cushion = chance(0.3) ? `, cushion ${pick(10, 20)} mm` : '';
    parts.push(`cylinder C${c} (bore ${bore} mm, rod ${rod} mm, stroke ${stroke} mm, attitude ${attitude}${cushion})`);
    const returning = chance(0.8) ? 'spring to centre, coil a' : 'detent, coil a';
    const centre = pick('closed', 'open', 'tandem', 'float');
    parts.push(
      `directional V${c} (4/3, centre ${centre}, ${returning} SOL${c}1, coil b SOL${c}2, passes ${between(10, 120, 0)} L/min at ${between(2, 8)} bar, takes ${pick(0, 20, 50, 200)} ms)`,
    );
    parts.push(`switch LS${c}1 (on C${c}, from ${stroke - 5} mm to ${stroke} mm)`, `switch LS${c}2 (on C${c}, from 0 mm to 3 mm)`);
    pressure.push(`V${c}.P`);
    returns.push(`V${c}.T`);
    const way = Math.floor(next() * 5);
    if (way === 0) lines.push(`working V${c}.A to C${c}.cap${pipe()}`);
    else if (way === 1) {
      const metered = chance(0.5) ? `set ${between(0.2, 40)} L/min, compensated, reverse check` : `orifice ${between(0.5, 4)} mm`;
      parts.push(`throttle FA${c} (${metered})`);
      lines.push(`working V${c}.A to FA${c} to C${c}.cap`);
    } else if (way === 2) {
      parts.push(`pilotcheck PC${c} (ratio ${pick('3:1', '4:1', '10:1')}, passes ${between(10, 100, 0)} L/min at 4 bar)`);
      lines.push(`working V${c}.A to PC${c}.V`, `working PC${c}.C to C${c}.cap${pipe()}`, `pilot V${c}.B to PC${c}.X`);
    } else if (way === 3) {
      parts.push(
        `counterbalance CB${c} (set ${between(20, 250, 0)} bar, ratio ${pick('1:1', '3:1', '8:1')}, passes ${between(10, 100, 0)} L/min at 5 bar)`,
      );
      lines.push(`working V${c}.A to CB${c}.V`, `working CB${c}.C to C${c}.cap`, `pilot V${c}.B to CB${c}.X`);
    } else {
      parts.push(
        `reducing PR${c} (set ${between(10, 120, 0)} bar, relieving ${pick('yes', 'no')}, reverse check, passes 40 L/min at 5 bar)`,
      );
      lines.push(`working V${c}.A to PR${c}.P`, `working PR${c}.A to C${c}.cap`, `drain PR${c}.Y to R1`);
    }
    if (chance(0.4)) {
      parts.push(`throttle FB${c} (set ${between(0.2, 30)} L/min, compensated, reverse check)`);
      lines.push(`working C${c}.rod to FB${c} to V${c}.B`);
    } else lines.push(`working V${c}.B to C${c}.rod${pipe()}`);
    const force = (bore * bore * next() * 15) / 1000;
    const load = pick(
      `resist ${force.toFixed(2)} kN`,
      `mass ${(force * 50).toFixed(0)} kg, friction ${(force / 10).toFixed(2)} kN`,
      `inward ${force.toFixed(2)} kN`,
      `outward ${(force / 2).toFixed(2)} kN`,
      `inward (0 mm: 0 kN, ${stroke - 10} mm: ${(force / 4).toFixed(2)} kN, ${stroke} mm: ${(2 * force).toFixed(2)} kN), friction 0.2 kN`,
      `resist ${force.toFixed(2)} kN from ${(stroke * 0.3).toFixed(0)} mm to ${(stroke * 0.7).toFixed(0)} mm extending`,
    );
    if (!chance(0.1)) lines.push(`load C${c} (${load})`);
    const limit = chance(0.8) ? `, at most ${pick(2, 10, 30)} s` : '';
    const ramp = chance(0.15) ? `for ${between(0, 2)} s` : undefined;
    steps.push(`step Out${c} energise SOL${c}1 ${ramp ?? `until LS${c}1 on${limit}`}`);
    if (chance(0.3)) {
      parts.push(`switch PS${c} (rises ${between(10, 150, 0)} bar${chance(0.5) ? '' : ', falls 8 bar'})`);
      lines.push(`working V${c}.B to PS${c}`);
      if (chance(0.3)) lines.push(`interlock SOL${c}2 needs PS${c} off`);
    }
    steps.push(`step Back${c} energise SOL${c}2 until LS${c}2 on${limit}`);
  }
  if (chance(0.3)) steps.sort();
  lines.push(`working ${pressure[0]} to ${pressure.slice(1).join(', ')}`, `return ${returns.join(', ')} to R1`);
  return `circuit Random${seed}
fluid HM46 (grade ${pick(22, 32, 46, 68)}, temperature ${pick(10, 30, 45, 60)} degC)
reservoir R1 (volume 100 L)
drive M1 (power 11 kW, speed ${pick(960, 1450, 2900)} rpm)
${[...parts, ...lines].join('\n')}
cycle Go${pick('', '', ' repeat', ' repeat 3 times')} {
${steps.map((one) => `  ${one}`).join('\n')}
}
require P1 pressure at most 250 bar
`;
}
