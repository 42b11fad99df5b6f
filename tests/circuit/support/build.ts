/** Circuits as objects, without the notation: for tests of the assembly that must not depend on the parser. */
import type { Circuit, Component, Coil, KindName, Load, Net, Piece, Property, PropertyValue } from '@oilway/circuit';
import type { Dimension, Quantity } from '@oilway/quantity';

const origin = { uri: 'test', start: 0, end: 0 };
export const q = (si: number, dimension: Dimension): Quantity => ({ si, dimension, unit: '' });
const quantity = (si: number, dimension: Dimension): PropertyValue => ({ type: 'quantity', q: q(si, dimension), origin });

export const bar = (v: number) => quantity(v * 1e5, 'pressure');
export const mm = (v: number) => quantity(v * 1e-3, 'length');
export const lpm = (v: number) => quantity(v / 60000, 'flow');
export const percent = (v: number) => quantity(v / 100, 'ratio');
export const celsius = (v: number) => quantity(v + 273.15, 'temperature');
export const cm3rev = (v: number) => quantity((v * 1e-6) / (2 * Math.PI), 'displacement');
export const rpm = (v: number) => quantity((v * 2 * Math.PI) / 60, 'rotation');
export const kW = (v: number) => quantity(v * 1e3, 'power');
export const litres = (v: number) => quantity(v * 1e-3, 'volume');
export const metres = (v: number) => quantity(v, 'length');
export const seconds = (v: number) => quantity(v, 'time');
export const Nm = (v: number) => quantity(v, 'torque');
export const number = (value: number): PropertyValue => ({ type: 'number', value, origin });
export const flag: PropertyValue = { type: 'flag', origin };
export const word = (w: string): PropertyValue => ({ type: 'word', word: w, origin });
export const at = (flow: number, drop: number): PropertyValue => ({ type: 'flowAt', flow: q(flow / 60000, 'flow'), drop: q(drop * 1e5, 'pressure'), origin });
export const by = (id: string): PropertyValue => ({ type: 'reference', id, origin });
export const coil = (name: string, side?: 'a' | 'b'): PropertyValue => ({ type: 'coil', name, ...(side === undefined ? {} : { side }), origin, nameOrigin: origin });
export const cam = (actuator: string, from: number, to: number, side?: 'a' | 'b'): PropertyValue => ({
  type: 'cam', actuator, from: q(from * 1e-3, 'length'), to: q(to * 1e-3, 'length'), ...(side === undefined ? {} : { side }), origin,
});
export const join = (...paths: string[]): PropertyValue => ({
  type: 'position',
  paths: paths.map((p) => ({ from: p.split('-')[0] ?? '', to: p.split('-')[1] ?? '', origin })),
  origin,
});
export const centre = (w: 'closed' | 'open' | 'tandem' | 'float'): PropertyValue => ({ type: 'position', word: w, paths: [], origin });
export const precharge = (pressure: number, t: number): PropertyValue => ({
  type: 'precharge', pressure: q(pressure * 1e5, 'pressure'), temperature: q(t + 273.15, 'temperature'), origin,
});
export const bypass = (crack?: number): PropertyValue => ({ type: 'bypass', ...(crack === undefined ? {} : { crack: q(crack * 1e5, 'pressure') }), origin });
export const span = (from: number, to: number): PropertyValue => ({ type: 'range', from: q(from, 'force'), to: q(to, 'force'), origin });

export function part(kind: KindName, id: string, properties: Readonly<Record<string, PropertyValue | readonly PropertyValue[]>>, shape?: string): Component {
  const list: Property[] = Object.entries(properties).flatMap(([name, v]) =>
    (Array.isArray(v) ? v : [v]).map((value): Property => ({ name, value, origin, nameOrigin: origin })),
  );
  const [ports, positions] = (shape ?? '').split('/').map(Number);
  return {
    id, kind, properties: list, origin, nameOrigin: origin,
    ...(ports !== undefined && positions !== undefined ? { shape: { ports, positions, origin } } : {}),
  };
}

/** Nets as `P1.P RV1.P`; a net that names a reservoir is a pipe to it. */
export function circuit(components: readonly Component[], nets: readonly string[], extra: { loads?: readonly Load[]; pieces?: readonly Piece[]; unknown?: Record<string, string> } = {}): Circuit {
  const coils: Coil[] = components.flatMap((c) =>
    c.properties.flatMap((p) => (p.value.type === 'coil' ? [{ id: p.value.name, component: c.id, ...(p.value.side === undefined ? {} : { side: p.value.side }), origin }] : [])),
  );
  const list: Net[] = nets.map((text) => {
    const words = text.split(' ');
    const reservoir = words.find((w) => components.some((c) => c.id === w && c.kind === 'reservoir'));
    const ports = words.filter((w) => w !== reservoir).map((w) => ({ component: w.split('.')[0] ?? '', port: w.split('.')[1] ?? '' }));
    return {
      id: words.find((w) => w !== reservoir) ?? text,
      ports, pieces: ['line'], functions: ['working'], ...(reservoir === undefined ? {} : { reservoir }), origin,
    };
  });
  return {
    uri: 'test', display: 'as written', units: {}, components, coils, lines: [], pieces: extra.pieces ?? [], nets: list, loads: extra.loads ?? [],
    cycles: [], whiles: [], interlocks: [], requirements: [], allows: [], constants: [], notComputed: [], unknown: extra.unknown ?? {},
  };
}
export const together = (...actuators: string[]): Load => ({ actuators, properties: [], origin });
