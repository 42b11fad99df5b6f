/** Measures of requirements: what they may be asked of, and their dimension. */
import type { Component, KindName, Measure } from '@oilway/circuit';
import type { Dimension } from '@oilway/quantity';

/** What a requirement is about, as far as it decides the measure. */
export type Subject =
  | { readonly is: 'component'; readonly component: Component; readonly port?: string }
  | { readonly is: 'line' }
  | { readonly is: 'step' }
  | { readonly is: 'cycle' };

export const MEASURES: readonly Measure[] = [
  'speed',
  'force',
  'torque',
  'pressure',
  'power',
  'loading',
  'flow',
  'loss',
  'temperature',
  'time',
  'position',
  'volume',
  'drift',
];

const LINEAR: readonly KindName[] = ['cylinder'];
const TURNING: readonly KindName[] = ['motor', 'rotary'];
const ACTUATORS: readonly KindName[] = [...LINEAR, ...TURNING];
const NO_OIL: readonly KindName[] = ['fluid', 'drive', 'heater'];
/** Kinds with two ports a flow goes through. */
const THROUGH: readonly KindName[] = [
  'check',
  'pilotcheck',
  'counterbalance',
  'burst',
  'throttle',
  'filter',
  'cooler',
  'shutoff',
  'coupling',
  'deceleration',
  'sequence',
  'reducing',
  'relief',
  'unloading',
  'directional',
  'divider',
  'intensifier',
];

/** Dimension of the measure for this subject, or in words what the measure is of. */
export function measureOf(measure: Measure, subject: Subject): { readonly dimension: Dimension } | { readonly of: string } {
  const kind = subject.is === 'component' ? subject.component.kind : undefined;
  const among = (kinds: readonly KindName[]): boolean => kind !== undefined && kinds.includes(kind);
  const turning = among(TURNING);
  const port = subject.is === 'component' && subject.port !== undefined;
  const fits = (good: boolean, dimension: Dimension, of: string) => (good ? { dimension } : { of });
  switch (measure) {
    case 'speed':
      return fits(among(ACTUATORS) && !port, turning ? 'rotation' : 'velocity', 'an actuator');
    case 'force':
      return fits(among(LINEAR) && !port, 'force', 'a cylinder');
    case 'torque':
      return fits(turning && !port, 'torque', 'a motor or semi-rotary actuator');
    case 'pressure': {
      const onePort =
        subject.is === 'component' &&
        (port ||
          subject.component.kind === 'accumulator' ||
          ['pump', 'relief', 'unloading', 'brake', 'switch', 'sensor', 'gauge'].includes(subject.component.kind));
      return fits(onePort || subject.is === 'line', 'pressure', 'a port, a line, or a component with one pressure port');
    }
    case 'power':
      return fits(
        (subject.is === 'component' && !port && !among(['fluid', 'reservoir'])) || subject.is === 'line',
        'power',
        'a drive, pump, actuator, valve or line',
      );
    case 'loading':
      return fits(among(['drive']), 'ratio', 'a drive');
    case 'flow':
      return fits(
        (subject.is === 'component' && !among(NO_OIL)) || subject.is === 'line',
        'flow',
        'a line, or a component oil goes through',
      );
    case 'loss':
      return fits(among(THROUGH) || subject.is === 'line', 'pressure', 'a component oil goes through');
    case 'temperature':
      return fits(among(['reservoir']), 'temperature', 'a reservoir');
    case 'time':
      return fits(subject.is === 'step' || subject.is === 'cycle', 'time', 'a step or cycle');
    case 'position':
      return fits(among(ACTUATORS) && !port, turning ? 'angle' : 'length', 'an actuator');
    case 'volume':
      return fits(among(['accumulator', 'reservoir']), 'volume', 'an accumulator or reservoir');
    case 'drift':
      return fits(among(ACTUATORS) && !port, turning ? 'angle' : 'length', 'an actuator');
  }
}

/** Measures that fit the subject, for completion and messages. */
export function measuresOf(subject: Subject): readonly Measure[] {
  return MEASURES.filter((measure) => 'dimension' in measureOf(measure, subject));
}
