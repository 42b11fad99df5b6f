/** Reading the pressures of a study. */
import type { Point } from '@oilway/circuit';

/** Pressure of a net, Pa gauge; undefined where it is not solved, not determined, or rests on something unknown (those are left out). */
export function pressureAt(point: Point, net: string): number | undefined {
  if (!point.solved || point.undetermined[net] !== undefined) return undefined;
  const pressure = point.pressures[net];
  return pressure !== undefined && Number.isFinite(pressure) ? pressure : undefined;
}
