/** Workings of cylinders, motors and semi-rotary actuators: force, torque, speed, power. */
import { areasOf, DEFAULT_SEAL } from '../../kinds/cylinder-areas.ts';
import type { Component } from '../../model/circuit.ts';
import { flag, si } from '../read.ts';
import type { Figure, Working } from '../study.ts';
import { agrees, derived, given, type Input, type Reader, solved } from './inputs.ts';

export function cylinderForce(cylinder: Component, read: Reader): Figure | undefined {
  const actuator = read.point.actuators.find((one) => one.id === cylinder.id);
  const areas = areasOf(cylinder);
  if (!actuator || !areas || flag(cylinder, 'spring') || flag(cylinder, 'telescopic')) return undefined;
  const side = (port: 'cap' | 'rod', area: number | undefined): { readonly inputs: readonly Input[]; readonly force: number } => {
    const p = read.pressure(cylinder.id, port);
    if (area === undefined || p === undefined) return { inputs: [], force: 0 };
    const sizes = port === 'rod' || flag(cylinder, 'through') ? 'bore and rod' : 'bore';
    return { inputs: [solved(`p ${port}`, p, 'pressure'), derived(`A ${port}`, area, 'area', `${cylinder.id} ${sizes}`)], force: p * area };
  };
  const cap = side('cap', areas.cap);
  const rod = side('rod', areas.rod);
  const moving = Math.sign(actuator.velocity) || actuator.direction;
  const seal = given(cylinder, 'seal', 'p seal', 'pressure', {
    value: DEFAULT_SEAL,
    words: '3 bar on the bore (common practice, no source)',
  })!;
  const friction = seal.value * areas.bore;
  const stop = actuator.stopForce ?? 0;
  const result = cap.force - rod.force - moving * friction + stop;
  if (!agrees(actuator.force, result, friction)) return undefined;
  return {
    value: actuator.force,
    dimension: 'force',
    working: {
      formula: `F = ${cap.inputs.length > 0 ? 'p cap x A cap ' : ''}${rod.inputs.length > 0 ? '- p rod x A rod ' : ''}${moving < 0 ? '+' : '-'} p seal x A bore${stop === 0 ? '' : ' + stop force'}`,
      inputs: [
        ...cap.inputs,
        ...rod.inputs,
        seal,
        derived('A bore', areas.bore, 'area', `${cylinder.id} bore`),
        ...(stop === 0 ? [] : [solved('stop force', stop, 'force')]),
      ],
      result,
      dimension: 'force',
      source: 'balance of forces at the piston (Esposito, Fluid Power with Applications, example 6-1)',
    },
  };
}

export function cylinderSpeed(cylinder: Component, read: Reader): Figure | undefined {
  const actuator = read.point.actuators.find((one) => one.id === cylinder.id);
  const areas = areasOf(cylinder);
  if (!actuator || !areas || actuator.velocity === 0 || flag(cylinder, 'telescopic')) return undefined;
  const entering = actuator.velocity > 0 ? ('cap' as const) : ('rod' as const);
  const leaving = entering === 'cap' ? ('rod' as const) : ('cap' as const);
  for (const port of [entering, leaving]) {
    const flow = read.flow(cylinder.id, port);
    const area = areas[port];
    if (flow === undefined || area === undefined || !(area > 0)) continue;
    const result = Math.abs(flow) / area;
    if (!agrees(Math.abs(actuator.velocity), result)) continue;
    return {
      value: Math.abs(actuator.velocity),
      dimension: 'velocity',
      working: {
        formula: `v = q ${port} / A ${port}`,
        inputs: [
          { ...solved(`q ${port}`, Math.abs(flow), 'flow'), source: `solved, ${port === entering ? 'entering' : 'leaving'}` },
          derived(`A ${port}`, area, 'area', `${cylinder.id} ${port === 'rod' ? 'bore and rod' : 'bore'}`),
        ],
        result,
        dimension: 'velocity',
        source: 'continuity (Esposito, Fluid Power with Applications, example 6-1)',
      },
    };
  }
  return undefined;
}

/** Force available against force needed. */
export function margin(component: Component, read: Reader): Figure | undefined {
  const actuator = read.point.actuators.find((one) => one.id === component.id);
  if (!actuator || actuator.available === undefined || !(actuator.needed > 0)) return undefined;
  const dimension = component.kind === 'cylinder' ? ('force' as const) : ('torque' as const);
  const result = actuator.available / actuator.needed;
  return {
    value: result,
    dimension: 'ratio',
    working: {
      formula: 'margin = F available / F needed',
      inputs: [
        { symbol: 'F available', value: actuator.available, dimension, source: 'solved with the actuator held, seal friction taken off' },
        { symbol: 'F needed', value: actuator.needed, dimension, source: `loads against the motion and friction of load ${component.id}` },
      ],
      result,
      dimension: 'ratio',
      source: 'definition',
    },
  };
}

export function motorTorque(motor: Component, read: Reader): Figure | undefined {
  const actuator = read.point.actuators.find((one) => one.id === motor.id);
  const displacement = given(motor, 'displacement', 'V', 'displacement');
  const [a, b] = [read.pressure(motor.id, 'A'), read.pressure(motor.id, 'B')];
  if (!actuator || !displacement || a === undefined || b === undefined) return undefined;
  const mechanical = given(motor, 'mechanical', 'mechanical', 'ratio', { value: 0.9, words: '90 % (common practice, no source)' })!;
  const gear = si(motor, 'gear') ?? 1;
  const ideal = displacement.value * (a - b) * gear;
  const loss = (1 - mechanical.value) * Math.abs(ideal);
  const turning = Math.sign(actuator.velocity) || actuator.direction;
  const result = ideal - turning * loss;
  if (!agrees(actuator.force, result)) return undefined;
  const braking = turning * ideal < 0;
  const inputs: readonly (Input | undefined)[] = [
    displacement,
    solved('p A', a, 'pressure'),
    solved('p B', b, 'pressure'),
    mechanical,
    gear === 1 ? undefined : given(motor, 'gear', 'gear', 'ratio'),
  ];
  const working: Working = {
    formula: `T = V x (p A - p B) x ${braking ? '(2 - mechanical)' : 'mechanical'}${gear === 1 ? '' : ' x gear'}`,
    inputs: inputs.filter((one) => one !== undefined),
    result,
    dimension: 'torque',
    source: 'motor torque (Esposito, Fluid Power with Applications, example 7-5)',
  };
  return { value: actuator.force, dimension: 'torque', working };
}

export function motorSpeed(motor: Component, read: Reader): Figure | undefined {
  const actuator = read.point.actuators.find((one) => one.id === motor.id);
  const displacement = given(motor, 'displacement', 'V', 'displacement');
  if (!actuator || !displacement || actuator.velocity === 0) return undefined;
  const gear = si(motor, 'gear') ?? 1;
  const entering = actuator.velocity > 0 ? 'A' : 'B';
  const flow = read.flow(motor.id, entering);
  if (flow === undefined) return undefined;
  const through = Math.abs(actuator.velocity) * gear * displacement.value;
  const leak = flow - through;
  if (leak < -0.02 * through || leak > 0.5 * Math.max(flow, through)) return undefined;
  const result = (flow - leak) / displacement.value / gear;
  return {
    value: Math.abs(actuator.velocity),
    dimension: 'rotation',
    working: {
      formula: `n = (q ${entering} - leakage) / V${gear === 1 ? '' : ' / gear'}`,
      inputs: [
        solved(`q ${entering}`, flow, 'flow'),
        solved('leakage', leak, 'flow'),
        displacement,
        ...(gear === 1 ? [] : [given(motor, 'gear', 'gear', 'ratio')!]),
      ],
      result,
      dimension: 'rotation',
      source: 'displacement and volumetric loss (Esposito, Fluid Power with Applications, example 7-5)',
    },
  };
}

/** What an actuator gives its load. */
export function outputPower(component: Component, read: Reader): Figure | undefined {
  const actuator = read.point.actuators.find((one) => one.id === component.id);
  if (!actuator || actuator.velocity === 0) return undefined;
  const rotating = component.kind !== 'cylinder';
  const result = actuator.force * actuator.velocity;
  return {
    value: result,
    dimension: 'power',
    working: {
      formula: rotating ? 'P = T x n' : 'P = F x v',
      inputs: [
        solved(rotating ? 'T' : 'F', actuator.force, rotating ? 'torque' : 'force'),
        solved(rotating ? 'n' : 'v', actuator.velocity, rotating ? 'rotation' : 'velocity'),
      ],
      result,
      dimension: 'power',
      source: 'definition of power',
    },
  };
}
