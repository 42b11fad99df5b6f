/** Power over a run: rms, highest and mean of each drive; work given to the loads. */
import type { Plant } from './scene.ts';
import { drivePower, type Trace } from './trace.ts';

export interface Duty {
  readonly rms: number;
  readonly highest: number;
  readonly mean: number;
}

/** By trapezoids over the samples; shifting of valves counts for rms and mean, not for the highest. */
export function dutyOf(plant: Plant, traces: readonly Trace[]): Readonly<Record<string, Duty>> {
  const result: Record<string, Duty> = {};
  for (const drive of plant.at.drives) {
    let squares = 0;
    let energy = 0;
    let time = 0;
    let highest = 0;
    for (const { samples } of traces) {
      for (let i = 0; i < samples.length; i += 1) {
        const here = drivePower(plant, drive.id, samples[i]!.solution);
        if (!samples[i]!.shifting) highest = Math.max(highest, here);
        const next = samples[i + 1];
        if (!next) continue;
        const there = drivePower(plant, drive.id, next.solution);
        const span = next.time - samples[i]!.time;
        time += span;
        energy += (span * (here + there)) / 2;
        squares += (span * (here * here + here * there + there * there)) / 3;
      }
    }
    result[drive.id] =
      time > 0 ? { rms: Math.sqrt(squares / time), highest, mean: energy / time } : { rms: highest, highest, mean: highest };
  }
  return result;
}

/** Mean of shaft power and of work given to loads, W, of the given pumps and bodies. Work a load gives back is negative. */
export function meanPower(
  traces: readonly Trace[],
  pumps: readonly string[],
  bodies: readonly string[],
): { readonly shaft: number; readonly work: number } {
  let shaft = 0;
  let work = 0;
  let time = 0;
  for (const { samples } of traces) {
    for (let i = 0; i + 1 < samples.length; i += 1) {
      const [here, next] = [samples[i]!, samples[i + 1]!];
      const span = next.time - here.time;
      time += span;
      for (const pump of pumps) shaft += (span * ((here.solution.shaft[pump] ?? 0) + (next.solution.shaft[pump] ?? 0))) / 2;
      for (const body of bodies) {
        const way = (next.solution.positions[body] ?? 0) - (here.solution.positions[body] ?? 0);
        const force = ((here.solution.forces[body] ?? 0) + (next.solution.forces[body] ?? 0)) / 2;
        work += force * way;
      }
    }
  }
  return time > 0 ? { shaft: shaft / time, work: work / time } : { shaft: 0, work: 0 };
}
