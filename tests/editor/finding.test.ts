/** A fault in the text: its squiggle, its words, its quick fix, and nothing where there is no fault. */
import { expect, it } from 'vitest';
import { textOf } from '../support/rig/editor.ts';
import { inEditor, type Session, sample } from './support/session.ts';

const TWO_PUMP = sample('05-two-pump.oilway');
const JOINT = 'working low to CV1 to pressure';

/** Takes the check valve out of the line between the two pumps, by hand. */
async function takeOutCheck({ editor, find }: Session): Promise<void> {
  const { line, column } = find(JOINT);
  await editor.replace(line, column + JOINT.indexOf('CV1'), 'CV1 to '.length, '');
}

it('a sample without faults is coloured and has no error', async (context) => {
  await inEditor(context, TWO_PUMP, async ({ editor, page, show }) => {
    // The server has read the text once the outline stands; only then is "no squiggle" a statement.
    await editor.outline();
    await editor.computed();
    // Keywords, names and numbers are drawn in different colours: more than one class of token on a line.
    const classes = await editor.lines
      .filter({ hasText: 'cylinder' })
      .first()
      .locator('span span')
      .evaluateAll((spans) => spans.map((span) => span.getAttribute('class') ?? ''));
    expect(new Set(classes.flatMap((one) => one.split(' ').filter((name) => name.startsWith('mtk')))).size).toBeGreaterThan(2);
    await show('sample');
    expect(await editor.errors.count()).toBe(0);
    const rows = await editor.problems();
    await page.locator('.markers-panel').waitFor();
    const errors = await rows.filter({ has: page.locator('.codicon-error') }).allInnerTexts();
    expect(errors).toEqual([]);
  });
});

it('a missing check between the pumps is underlined, told and mended by its quick fix', async (context) => {
  await inEditor(context, TWO_PUMP, async (session) => {
    const { editor, saved, show } = session;
    await editor.computed();
    await takeOutCheck(session);
    await editor.errors.first().waitFor();

    const rows = await editor.problems();
    const row = rows.filter({ hasText: 'B01' }).first();
    await row.waitFor();
    const told = await textOf(row);
    expect(told).toMatch(/check/i);
    expect(told).toMatch(/P1|P2|UV1/);
    await show('finding');

    // A double click leads to the place; the cursor then stands where the fix is offered.
    await editor.goToProblem(row);
    const fixes = await editor.fixes();
    const fix = fixes.find((title) => /check/i.test(title));
    expect(fix, fixes.join(' | ')).toBeDefined();
    await show('quick-fix');
    await editor.takeFix(/check/i);
    await rows.filter({ hasText: 'B01' }).first().waitFor({ state: 'detached' });
    await show('mended');
    await editor.save();
    expect(saved()).toMatch(/^working\s.*\bCV\w+\b/m);
  });
});

it('a word that is no unit is underlined where it stands, and the rest of the file keeps its findings', async (context) => {
  await inEditor(context, TWO_PUMP, async ({ editor, find, page }) => {
    const { line, column } = find('160 bar');
    await editor.replace(line, column, '160 bar'.length, '160 bra');
    await editor.errors.first().waitFor();
    const rows = await editor.problems();
    const row = rows.filter({ hasText: 'bra' }).first();
    await row.waitFor();
    expect(await textOf(row)).toContain('bar');
    expect(await textOf(row)).toMatch(new RegExp(`Ln ${line}, Col \\d+`));
    await editor.replace(line, column, '160 bra'.length, '160 bar');
    await rows.filter({ hasText: 'bra' }).first().waitFor({ state: 'detached' });
    await page.locator('.editor-instance .squiggly-error').first().waitFor({ state: 'detached' });
  });
});
