/** A test bench in the notation: sources that hold a port at a pressure, pumps that deliver a flow, without any loss of their own. */

export const HEAD = `fluid HM46 (grade 46, index 100, temperature 45 degC)
reservoir R1 (volume 100 L)
drive M1 (power 100 kW, speed 1000 rpm)
`;

/** A pump that delivers exactly this flow, L/min, whatever the pressure; its outlet is `to`. */
export const delivers = (
  name: string,
  flow: number,
  to: string,
): string => `pump ${name} (displacement ${flow} cm3/rev, driven by M1, volumetric 100 %)
suction R1 to ${name}
working ${name} to ${to}
`;

/** Holds a port at this pressure, bar, while `over` L/min go over the relief; `delivered` L/min come from the source. */
export const holds = (
  name: string,
  bar: number,
  delivered: number,
  over: number,
  to: string,
): string => `pump P_${name} (displacement ${delivered} cm3/rev, driven by M1, volumetric 100 %)
suction R1 to P_${name}
relief RV_${name} (set ${bar - 0.5} bar, override 0.1 %, passes ${over} L/min at 1 bar)
return RV_${name} to R1
working at_${name}: P_${name} to RV_${name}
${/\.(X|LS)$/.test(to) ? 'pilot' : 'working'} at_${name} to ${to}
`;

export const toBar = (pa: number | undefined): number => (pa ?? Number.NaN) / 1e5;
export const toLpm = (m3s: number | undefined): number => (m3s ?? Number.NaN) * 60000;
