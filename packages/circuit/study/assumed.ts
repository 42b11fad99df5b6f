/** Assumptions the study itself makes, beside those of the machine. */
import { oilGroups, surfaceOf, WALL } from './heat.ts';
import { range, si } from './read.ts';
import type { Plant } from './scene.ts';
import type { Assumption, Study } from './study.ts';
import { REAL_ABOVE, storedBetween } from './working/gas.ts';
import { say } from './words.ts';

export function noticed(plant: Plant, heat: Study['heat'], cycles: Study['cycles']): readonly Assumption[] {
  const found: Assumption[] = [...plant.assumptions, ...idealGas(plant, cycles)];
  const { circuit } = plant;
  if (Object.keys(heat).length > 0) {
    for (const group of oilGroups(plant)) {
      for (const reservoir of group.reservoirs) {
        found.push({
          component: reservoir.id,
          property: 'heat through the wall',
          value: `${WALL} W/m2K`,
          source: 'memory',
          note: 'common practice 10 to 15 W/m2K in still air, no source',
        });
        const surface = surfaceOf(reservoir);
        if (surface.assumed)
          found.push({
            component: reservoir.id,
            property: 'surface',
            value: say(circuit, surface.area, 'area'),
            source: 'derived',
            note: '6 V^(2/3): a cube of its volume',
          });
        if (!range(reservoir, 'ambient') && si(reservoir, 'ambient') === undefined) {
          found.push({
            component: reservoir.id,
            property: 'ambient',
            value: say(circuit, 293.15, 'temperature'),
            source: 'default',
            note: 'room temperature',
          });
        }
        found.push({
          component: reservoir.id,
          property: 'heat given off by lines and cylinders',
          value: 'none',
          source: 'not counted',
          note: 'on the safe side',
        });
      }
      for (const cooler of group.coolers) {
        if (si(cooler, 'coolant') === undefined)
          found.push({ component: cooler.id, property: 'coolant', value: 'ambient', source: 'default', note: 'air cooler' });
      }
    }
  }
  return found;
}

/** Where a run goes above 150 bar the real gas decides; what an ideal one would give is said beside it. */
function idealGas(plant: Plant, cycles: Study['cycles']): readonly Assumption[] {
  return plant.at.accumulators.flatMap((accumulator): readonly Assumption[] => {
    const net = plant.at.netOf(accumulator.id, 'P');
    const pressures = net === undefined ? [] : cycles.flatMap((one) => one.run?.pressures[net] ?? []);
    if (pressures.length === 0) return [];
    const [low, high] = [Math.min(...pressures), Math.max(...pressures)];
    const stored = high > REAL_ABOVE ? storedBetween(accumulator, low, high, plant.temperature) : undefined;
    if (!stored) return [];
    const { circuit } = plant;
    const between = `between ${say(circuit, low, 'pressure')} and ${say(circuit, high, 'pressure')}`;
    return [
      {
        component: accumulator.id,
        property: 'gas law',
        value: `real nitrogen: ${say(circuit, stored.real.value, 'volume')} ${between}; an ideal gas: ${say(circuit, stored.ideal.value, 'volume')}`,
        source: 'derived',
        note: 'filled slowly; nitrogen after Span et al. (2000), which the run follows at such pressures',
      },
    ];
  });
}
