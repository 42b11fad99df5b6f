/** The study as rules may see it: figures that rest on something unknown are left out, so that no finding is a guess. */
import type { Point, Study } from '@oilway/circuit';

function without<T>(values: Readonly<Record<string, T>>, unknown: (key: string) => boolean): Readonly<Record<string, T>> {
  return Object.fromEntries(Object.entries(values).filter(([key]) => !unknown(key)));
}

function knownPoint(point: Point): Point {
  const ids = new Set(Object.keys(point.notComputed));
  if (ids.size === 0) return point;
  const unknown = (key: string) => ids.has(key);
  // `V1.A` is a port of the component V1.
  const unknownPort = (key: string) => ids.has(key) || ids.has(key.slice(0, Math.max(0, key.lastIndexOf('.'))));
  return {
    ...point,
    pressures: without(point.pressures, unknown),
    undetermined: without(point.undetermined, unknown),
    flows: without(point.flows, unknownPort),
    openings: without(point.openings, unknown),
    power: without(point.power, unknown),
    lifting: point.lifting.filter((id) => !unknown(id)),
    actuators: point.actuators.filter((one) => !unknown(one.id)),
    diagnosis: point.diagnosis.filter((one) => !one.nets.some(unknown)),
  };
}

/** The same study without figures of nets and components that are not computed. */
export function knownFigures(study: Study): Study {
  const ids = new Set(Object.keys(study.notComputed));
  const unknown = (key: string) => ids.has(key);
  return {
    ...study,
    states: study.states.map((state) => ({
      ...state,
      variants: state.variants.map((variant) => ({
        ...variant,
        point: knownPoint(variant.point),
        moving: variant.moving.filter((one) => variant.point.notComputed[one.id] === undefined),
      })),
    })),
    steps: study.steps.map((step) => ({
      ...step,
      points: step.points.map(knownPoint),
      peaks: without(step.peaks, unknown),
      lows: without(step.lows, unknown),
      speeds: without(step.speeds, unknown),
    })),
  };
}
