/** Hover on a number or unit: what it is, and the same in the other units of its dimension. */
import { format, parseQuantity, unitOf, unitsOf, type Dimension } from '@oilway/quantity';
import type { Token } from '../text/scan.ts';

/** Units that are shown first: the trade's, then the rest in table order. */
const FIRST: Partial<Record<Dimension, readonly string[]>> = {
  pressure: ['bar', 'psi', 'MPa', 'kPa', 'kgf/cm2'],
  flow: ['L/min', 'gpm', 'cm3/s', 'm3/h', 'in3/s'],
  length: ['mm', 'in', 'm', 'cm', 'ft'],
  force: ['kN', 'lbf', 'N', 'kgf'],
  volume: ['L', 'gal', 'cm3', 'in3'],
  displacement: ['cm3/rev', 'in3/rev', 'cm3/rad'],
};
const MOST = 6;

/** The number as written, its unit token behind it. */
export function hoverUnit(number: string, unitToken: Token | undefined): string | undefined {
  if (!unitToken) return undefined;
  const unit = unitOf(unitToken.text);
  if (!unit) return undefined;
  const parsed = parseQuantity(`${number} ${unitToken.text}`);
  if (!parsed.ok) return undefined;
  const wanted = FIRST[unit.dimension] ?? [];
  const others = [...unitsOf(unit.dimension)]
    .filter((one) => one.symbol !== unit.symbol)
    .sort((a, b) => rank(a.symbol, wanted) - rank(b.symbol, wanted))
    .slice(0, MOST)
    .filter((one) => one.offset === 0 || unit.dimension === 'temperature')
    .map((one) => format(parsed.value.si, unit.dimension, { unit: one.symbol, digits: 4 }));
  return [`**${number} ${unit.symbol}**${others.length > 0 ? ` = ${others.join(' = ')}` : ''}`, `${unit.about} (${unit.dimension})`].join(
    '  \n',
  );
}

const rank = (symbol: string, wanted: readonly string[]): number => {
  const place = wanted.indexOf(symbol);
  return place < 0 ? wanted.length : place;
};
