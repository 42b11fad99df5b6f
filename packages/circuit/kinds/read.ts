/** Reading a component's properties: each reader gives undefined where nothing usable is written. */
import type { Component } from '../model/circuit.ts';
import type {
  CamValue,
  CoilValue,
  FlowAtValue,
  PathPassesValue,
  PositionValue,
  PrechargeValue,
  PropertyValue,
  RangeValue,
  ReferenceValue,
} from '../model/value.ts';

type Owner = Pick<Component, 'properties'>;

/** All values written under a name (own ones first). */
export function valuesOf(owner: Owner, name: string): readonly PropertyValue[] {
  return owner.properties.filter((p) => p.name === name).map((p) => p.value);
}

/** True where the property stands, whatever its value (flags above all). */
export function has(owner: Owner, name: string): boolean {
  return owner.properties.some((p) => p.name === name && p.value.type !== 'unknown');
}

function first<T extends PropertyValue>(owner: Owner, name: string, type: T['type']): T | undefined {
  for (const p of owner.properties) if (p.name === name && p.value.type === type) return p.value as T;
  return undefined;
}

/** Value in SI of the property's dimension; a bare number counts as itself. */
export function si(owner: Owner, name: string): number | undefined {
  for (const p of owner.properties) {
    if (p.name !== name) continue;
    if (p.value.type === 'quantity') return p.value.q.si;
    if (p.value.type === 'number') return p.value.value;
  }
  return undefined;
}

export function word(owner: Owner, name: string): string | undefined {
  for (const p of owner.properties) {
    if (p.name !== name) continue;
    if (p.value.type === 'word') return p.value.word;
    if (p.value.type === 'place' && p.value.word !== undefined) return p.value.word;
    if (p.value.type === 'reference') return p.value.id;
  }
  return undefined;
}

/** The general `passes` (or `leak`): flow in m3/s, drop in Pa. */
export function flowAt(owner: Owner, name: string): { readonly flow: number; readonly drop: number } | undefined {
  const v = first<FlowAtValue>(owner, name, 'flowAt');
  return v === undefined ? undefined : { flow: v.flow.si, drop: v.drop.si };
}

export const pathPasses = (owner: Owner): readonly PathPassesValue[] =>
  valuesOf(owner, 'passes').filter((v): v is PathPassesValue => v.type === 'pathPasses');
export const position = (owner: Owner, name: string): PositionValue | undefined => first<PositionValue>(owner, name, 'position');
export const range = (owner: Owner, name: string): RangeValue | undefined => first<RangeValue>(owner, name, 'range');
export const reference = (owner: Owner, name: string): ReferenceValue | undefined => first<ReferenceValue>(owner, name, 'reference');
export const precharge = (owner: Owner, name: string): PrechargeValue | undefined => first<PrechargeValue>(owner, name, 'precharge');
export const cams = (owner: Owner, name: string): readonly CamValue[] =>
  valuesOf(owner, name).filter((v): v is CamValue => v.type === 'cam');
export const coils = (owner: Owner): readonly CoilValue[] => valuesOf(owner, 'coil').filter((v): v is CoilValue => v.type === 'coil');

/** Rating of a port, Pa: its own `rated T`, else the general one. */
export function ratedAt(owner: Owner, port: string): number | undefined {
  const all = owner.properties.filter((p) => p.name === 'rated' && p.value.type === 'quantity');
  const own = all.find((p) => p.port === port) ?? all.find((p) => p.port === undefined);
  return own?.value.type === 'quantity' ? own.value.q.si : undefined;
}
