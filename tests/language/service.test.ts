/** The service: text, topology and figures together; what breaks inside is told apart from what is found. */
import type { Circuit, Study } from '@oilway/circuit';
import { analyse, analyseText, finding, forgetStatements } from '@oilway/language';
import { describe, expect, it } from 'vitest';
import { circuitText } from './support.ts';

const text = 'circuit T\ngauge G1 (range 0 bar to 250 bar)\nworking low: G1 to low2';
const study = (circuit: Circuit): Study => ({
  uri: circuit.uri,
  states: [],
  steps: [],
  cycles: [],
  requirements: [],
  assumptions: [],
  heat: {},
  spent: 0,
  notComputed: {},
});

describe('analyse', () => {
  it('brings syntax, rules and study together in text order', () => {
    const seen: (Study | undefined)[] = [];
    const { documents } = analyse([{ uri: 'a', text }], {
      study,
      rules: (context) => {
        seen.push(context.study);
        expect(context.text('a')).toBe(text);
        return [finding({ code: 'H14', what: 'open', origin: { uri: 'a', start: 0, end: 7 } })];
      },
    });
    expect(documents[0]?.findings.map((found) => found.code)).toEqual(['H14', 'NAME']);
    expect(documents[0]?.study).toBeDefined();
    expect(seen[0]).toBe(documents[0]?.study);
  });

  it('computes nothing where it is told so, and for a shelf', () => {
    expect(analyse([{ uri: 'a', text }], { study, compute: false }).documents[0]).not.toHaveProperty('study');
    const shelf = analyse([{ uri: 'a', text: 'part check NR (crack 1 bar)' }], {
      study,
      rules: () => {
        throw new Error('a shelf is not checked');
      },
    });
    expect(shelf.documents[0]).not.toHaveProperty('study');
    expect(shelf.documents[0]).not.toHaveProperty('failed');
  });

  it('a break inside is `failed`, never a finding, and the rest stays', () => {
    const { documents } = analyse(
      [
        { uri: 'a', text },
        { uri: 'b', text: 'circuit B' },
      ],
      {
        study: () => {
          throw new Error('broken study');
        },
        rules: (context) => {
          if (context.circuit.name === 'B') throw new Error('broken rule');
          return [];
        },
      },
    );
    expect(documents.map((document) => document.failed?.split('\n')[0])).toEqual(['Error: broken study', 'Error: broken study']);
    expect(documents[1]?.failed).toContain('broken rule');
    expect(documents[0]?.findings.map((found) => found.code)).toEqual(['NAME']);
  });

  it('what comes back is plain data', () => {
    const [document] = analyse([{ uri: 'a', text }]).documents;
    expect(structuredClone({ circuit: document?.circuit, findings: document?.findings })).toEqual({
      circuit: document?.circuit,
      findings: document?.findings,
    });
  });
});

describe('remembered statements', () => {
  it('typing a circuit letter by letter gives what reading it at once gives', () => {
    const whole = circuitText('07-lift-table.oilway');
    const from = whole.indexOf('cylinder');
    const to = whole.indexOf('suction');
    for (let end = from; end <= to; end += 9) {
      const typed = whole.slice(0, end) + whole.slice(to);
      const warm = analyseText({ uri: 'a', text: typed });
      if ((end - from) % 450 === 0) {
        forgetStatements();
        const cold = analyseText({ uri: 'a', text: typed });
        expect(JSON.stringify(cold.circuit)).toBe(JSON.stringify(warm.circuit));
        expect(cold.findings).toEqual(warm.findings);
      }
    }
  });

  it('the same statement twice, and the same text in two files, stand each at their own place', () => {
    const twice = 'gauge G1\nrequire G1 pressure at most 5 bar\nrequire G1 pressure at most 5 bar';
    const places = analyseText({ uri: 'a', text: twice }).circuit.requirements.map(({ origin }) => origin.start);
    expect(places).toEqual([twice.indexOf('require'), twice.lastIndexOf('require')]);
    const [a, b] = [analyseText({ uri: 'a', text: 'gauge G1' }), analyseText({ uri: 'b', text: '// note\ngauge G1' })];
    expect([a.circuit.components[0]?.origin, b.circuit.components[0]?.origin]).toEqual([
      { uri: 'a', start: 0, end: 8 },
      { uri: 'b', start: 8, end: 16 },
    ]);
    expect(a.parsed.originOf(a.parsed.statements[0])).toEqual({ uri: 'a', start: 0, end: 8 });
  });
});
