/** The table of kinds: adding a kind is one file and one line here. */
import type { KindName } from './names.ts';
import type { Kind } from './kind.ts';
import { fluid } from './fluid.ts';
import { reservoir } from './reservoir.ts';
import { drive } from './drive.ts';
import { pump } from './pump.ts';
import { relief } from './relief.ts';
import { unloading } from './unloading.ts';
import { sequence } from './sequence.ts';
import { counterbalance } from './counterbalance.ts';
import { reducing } from './reducing.ts';
import { check } from './check.ts';
import { pilotcheck } from './pilotcheck.ts';
import { burst } from './burst.ts';
import { shuttle } from './shuttle.ts';
import { directional } from './directional.ts';
import { deceleration } from './deceleration.ts';
import { throttle } from './throttle.ts';
import { divider } from './divider.ts';
import { shutoff } from './shutoff.ts';
import { coupling } from './coupling.ts';
import { cylinder } from './cylinder.ts';
import { motor } from './motor.ts';
import { rotary } from './rotary.ts';
import { brake } from './brake.ts';
import { accumulator } from './accumulator.ts';
import { intensifier } from './intensifier.ts';
import { filter } from './filter.ts';
import { cooler } from './cooler.ts';
import { heater } from './heater.ts';
import { switchKind } from './switch.ts';
import { sensor } from './sensor.ts';
import { gauge } from './gauge.ts';

export const KINDS: Readonly<Record<KindName, Kind>> = {
  fluid,
  reservoir,
  drive,
  pump,
  relief,
  unloading,
  sequence,
  counterbalance,
  reducing,
  check,
  pilotcheck,
  burst,
  shuttle,
  directional,
  deceleration,
  throttle,
  divider,
  shutoff,
  coupling,
  cylinder,
  motor,
  rotary,
  brake,
  accumulator,
  intensifier,
  filter,
  cooler,
  heater,
  switch: switchKind,
  sensor,
  gauge,
};
