/** Where the oil comes from and goes to: by the flows of the study, by the lines without one. */
import { readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { describe, expect, test } from 'vitest';
import { componentAt, neighbours } from '../../packages/language/features/oil-way.ts';
import { workJob } from '../../packages/language/server/study-job.ts';
import { analyseText, BENCH, check, URI } from './support/check.ts';

const TEXT = readFileSync(fileURLToPath(new URL('../../samples/04-traverse-feed.oilway', import.meta.url)), 'utf8');
const plain = analyseText(TEXT);
const studied =
  plain.circuit &&
  analyseText(TEXT, { study: workJob({ circuit: plain.circuit, texts: { [URI]: TEXT } }).study, circuit: plain.circuit, older: false });

describe('with figures', () => {
  const ways = (id: string, into: boolean): string[] =>
    studied ? neighbours(studied, id, into).map((one) => `${one.component.id} in ${one.detail.replace(/: up to [\d.]+ L\/min$/, '')}`) : [];
  test('the cylinder is fed by the valve going out, through throttle and deceleration valve coming back', () => {
    expect(ways('1A1', true)).toEqual(['1V1 in Out', '1V2 in Back', '1V3 in Back']);
    expect(ways('1A1', false)).toEqual(['1V1 in Back', '1V2 in Out', '1V3 in Out']);
  });
  test('the pump draws from the reservoir and feeds the valve; what is too much goes over the relief', () => {
    expect(ways('0P1', true)).toEqual(['0Z2 in Out, Back']);
    expect(ways('0P1', false)).toEqual(['0V1 in Out', '1V1 in Out, Back']);
    expect(ways('0Z2', false)).toEqual(['0P1 in Out, Back']);
    expect(ways('0Z2', true)).toEqual(['0V1 in Out', '0Z1 in Out, Back']);
  });
});

describe('without figures', () => {
  test('what the lines join', () => {
    expect(neighbours(analyseText(BENCH), 'C1', true).map((one) => `${one.component.id}: ${one.detail}`)).toEqual([
      'V1: cap with V1.A',
      'FC1: rod with FC1.in',
    ]);
  });
  test('components by their name or a port of theirs; nothing at what has no ports', () => {
    expect(check(BENCH.replace('working V1.A', 'working V1.A|'), (analysis, cursor) => componentAt(analysis, cursor)?.id)).toBe('V1');
    expect(check(BENCH.replace('cylinder  C1', 'cylinder  C|1'), (analysis, cursor) => componentAt(analysis, cursor)?.id)).toBe('C1');
    expect(check(BENCH.replace('driven by M1', 'driven by M|1'), componentAt)).toBeUndefined();
    expect(check(BENCH.replace('step Out', 'step O|ut'), componentAt)).toBeUndefined();
  });
});
