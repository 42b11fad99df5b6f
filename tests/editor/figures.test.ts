/** Computed figures in the editor: hover, hints, and findings that follow a setting. */
import { expect, it } from 'vitest';
import { textOf } from '../support/rig/editor.ts';
import { inEditor, sample } from './support/session.ts';

const TWO_PUMP = sample('05-two-pump.oilway');

/** cm2 of the cap, from the bore in the sample: pi/4 d^2. */
const CAP = (Math.PI / 4) * 10 ** 2;
/** What both pumps displace at most, L/min; no cylinder runs out faster than this over its cap (continuity). */
const MOST_FLOW = ((40 + 8) * 1450) / 1000;
const MOST_SPEED = ((MOST_FLOW * 1000) / 60 / CAP) * 10; // mm/s
/** Relief setting times cap, kN: no cylinder presses harder (Pascal). 163 bar is the upper end of the setting's band. */
const MOST_FORCE = (163 * CAP) / 100;

const figures = (text: string, unit: string): number[] =>
  [...text.matchAll(new RegExp(`(\\d+(?:\\.\\d+)?)\\s*${unit}`, 'g'))].map((match) => Number(match[1]));

it('hovering the cylinder reads speed and force by step', async (context) => {
  await inEditor(context, TWO_PUMP, async ({ editor, show }) => {
    await editor.computed();
    const said = await editor.hover(/^cylinder/, 'C1', /mm\/s/);
    await show('hover');
    expect(said).toMatch(/Out/);
    const speeds = figures(said, 'mm/s');
    expect(Math.max(...speeds.filter((v) => v <= MOST_SPEED))).toBeGreaterThan(0.9 * MOST_SPEED);
    const forces = figures(said, 'kN');
    expect(forces.length).toBeGreaterThan(0);
    expect(Math.max(...forces)).toBeGreaterThan(100);
    expect(Math.max(...forces)).toBeLessThanOrEqual(MOST_FORCE);
  });
});

it('hints stand at the lines and go with the one switch', async (context) => {
  await inEditor(context, TWO_PUMP, async ({ editor }) => {
    await editor.computed();
    const line = editor.lines.filter({ hasText: /^cylinder/ }).first();
    await line.filter({ hasText: /mm\/s/ }).waitFor();
    expect(await textOf(line)).toMatch(/mm\/s/);
    await editor.command('Oilway: Show or Hide Computed Hints');
    await line.filter({ hasText: /mm\/s/ }).waitFor({ state: 'detached' });
    await editor.command('Oilway: Show or Hide Computed Hints');
    await line.filter({ hasText: /mm\/s/ }).waitFor();
  });
});

it('a setting that no longer gives the force brings a computed finding a moment later', async (context) => {
  await inEditor(context, TWO_PUMP, async ({ editor, find, show }) => {
    await editor.computed();
    const rows = await editor.problems();
    const missed = rows.filter({ hasText: /missed/ }).filter({ hasText: /100\skN/ });
    expect(await missed.count()).toBe(0);
    // 90 bar, give or take the 3 bar of its band, on 78.5 cm2 is 70.7 kN (Pascal): the 100 kN required cannot be reached.
    const { line, column } = find('160 bar');
    await editor.replace(line, column, '160'.length, '90');
    await missed.first().waitFor();
    await show('computed-finding');
    const told = await textOf(missed.first());
    const reached = Number(/([\d.]+) of 100 kN/.exec(told)?.[1]);
    expect(reached, told).toBeGreaterThan((87 * CAP) / 100);
    expect(reached, told).toBeLessThan((93 * CAP) / 100);
    await editor.replace(line, column, '90'.length, '160');
    await missed.first().waitFor({ state: 'detached' });
  });
});
