/**
 * Tube or hose with loss; its flow is an unknown: p_a - p_b = rho v|v|/2 (f L/d + minor). Friction factor by Churchill (Chemical Engineering,
 * 7 Nov 1977) for all regimes: f = 8 ((8/Re)^12 + (A + B)^-1.5)^(1/12), A = (2.457 ln(1/((7/Re)^0.9 + 0.27 e/d)))^16, B = (37530/Re)^16.
 */
import type { LineSpec } from '../network.ts';
import { headsOf, type Law, OPENING } from './law.ts';

/** Below this the turbulent terms of Churchill are under 1e-20 of f: Hagen-Poiseuille exactly, finite slope at rest. */
const LAMINAR_RE = 10;

/** Darcy friction factor and its slope d f/d Re, Re > 0, `rough` = roughness/bore. */
export function churchill(re: number, rough: number): { f: number; slope: number } {
  if (re <= LAMINAR_RE) return { f: 64 / re, slope: -64 / (re * re) };
  const seven = (7 / re) ** 0.9;
  const inside = seven + 0.27 * rough;
  const log = -2.457 * Math.log(inside);
  const a = log ** 16;
  const aSlope = (16 * log ** 15 * (2.457 * 0.9 * seven)) / (inside * re);
  const b = (37530 / re) ** 16;
  const bSlope = (-16 * b) / re;
  const laminar = (8 / re) ** 12;
  const turbulent = (a + b) ** -1.5;
  const sum = laminar + turbulent;
  const sumSlope = (-12 * laminar) / re - 1.5 * (turbulent / (a + b)) * (aSlope + bSlope);
  const f = 8 * sum ** (1 / 12);
  return { f, slope: (f / (12 * sum)) * sumSlope };
}

export function lineLaw(spec: LineSpec): Law {
  const { bore, length, roughness, minor, nu, rho } = spec;
  const area = (Math.PI * bore * bore) / 4;
  /** v = speed q, Re = reynolds |q|, with q in L/s. */
  const speed = 1e-3 / area;
  const reynolds = (speed * bore) / nu;
  const dynamic = 0.5 * rho * speed * speed * 1e-6;
  const slender = length / bore;
  /** Laminar loss per flow, MPa s/L: dynamic 64/Re L/d q^2. */
  const laminar = (dynamic * 64 * slender) / reynolds;
  return {
    nodes: [spec.a, spec.b],
    heads: headsOf(spec.heads, 2),
    terminals: 2,
    own: 1,
    actuator: -1,
    floor: false,
    joins: true,
    evaluate(z, _parameters, _blend, out, gradient) {
      const q = z[2]!;
      const size = Math.abs(q);
      const re = reynolds * size;
      let loss = laminar * q;
      let slope = laminar;
      if (re > LAMINAR_RE) {
        const { f, slope: fSlope } = churchill(re, roughness / bore);
        loss = dynamic * slender * f * q * size;
        slope = dynamic * slender * (2 * f * size + fSlope * reynolds * q * q);
      }
      loss += dynamic * minor * q * size;
      slope += 2 * dynamic * minor * size;
      out[OPENING] = 1;
      out[0] = q;
      out[1] = -q;
      out[2] = z[0]! - z[1]! - loss;
      gradient[0] = 0;
      gradient[1] = 0;
      gradient[2] = 1;
      gradient[3] = 0;
      gradient[4] = 0;
      gradient[5] = -1;
      gradient[6] = 1;
      gradient[7] = -1;
      gradient[8] = -slope;
    },
  };
}
