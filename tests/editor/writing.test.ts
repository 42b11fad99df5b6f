/** Help while writing: completion, rename, formatting, outline. */
import { expect, it } from 'vitest';
import { plain } from '../support/rig/editor.ts';
import { inEditor, sample } from './support/session.ts';

const TWO_PUMP = sample('05-two-pump.oilway');

it('completion knows the properties of the kind, and the ports after a dot', async (context) => {
  await inEditor(context, TWO_PUMP, async ({ editor, find, page, show }) => {
    await editor.outline();
    const list = page.locator('.suggest-widget.visible .monaco-list-row');
    const cylinder = find('attitude level');
    await editor.goTo(cylinder.line, cylinder.column);
    await page.keyboard.type('cu');
    await page.keyboard.press('Control+Space');
    await list.filter({ hasText: 'cushion' }).first().waitFor();
    await show('completion');
    await page.keyboard.press('Escape');
    await editor.replace(cylinder.line, cylinder.column, 2, '');

    const port = find('V1.A to C1.cap');
    await editor.replace(port.line, port.column, 'V1.A'.length, 'V1');
    await page.keyboard.type('.');
    await list.filter({ hasText: /^\s*A/ }).first().waitFor();
    const ports = (await list.allInnerTexts()).map((text) => plain(text).trim().split(/\s/)[0]);
    expect(ports).toContain('A');
    // What is no port of a 4/3 valve is not offered.
    expect(ports).not.toContain('cap');
  });
});

it('renaming a coil renames it everywhere', async (context) => {
  await inEditor(context, TWO_PUMP, async ({ editor, find, page, saved }) => {
    await editor.outline();
    const places = TWO_PUMP.match(/\bSOL1\b/g)?.length ?? 0;
    expect(places).toBeGreaterThan(2);
    const { line, column } = find('SOL1');
    await editor.goTo(line, column + 1);
    await page.keyboard.press('F2');
    const box = page.locator('.monaco-editor .rename-box input, .rename-box input').first();
    await box.waitFor();
    await box.fill('PRESS');
    await page.keyboard.press('Enter');
    await editor.waitForText('.editor-instance .view-line', /energise\sSOL0,\sPRESS/);
    await editor.save();
    expect(saved().match(/\bPRESS\b/g)?.length).toBe(places);
    expect(saved()).not.toMatch(/\bSOL1\b/);
  });
});

it('formatting mends the spacing and changes no word', async (context) => {
  const untidy = TWO_PUMP.replace('cylinder  C1 (bore 100 mm, rod 70 mm,', 'cylinder C1(bore   100mm,rod 70 mm ,');
  expect(untidy).not.toBe(TWO_PUMP);
  await inEditor(context, untidy, async ({ editor, saved }) => {
    await editor.outline();
    await editor.command('Format Document');
    await editor.waitForText('.editor-instance .view-line', /\(bore\s100\smm,\srod\s70\smm,\sstroke/);
    await editor.save();
    const words = (text: string): string => text.replace(/\s+/g, '');
    expect(words(saved())).toBe(words(untidy));
    expect(saved()).toMatch(/^cylinder\s+C1 \(bore 100 mm, rod 70 mm, stroke 500 mm/m);
  });
});

it('the outline lists the components and, below their cycle, its steps', async (context) => {
  await inEditor(context, TWO_PUMP, async ({ editor, page, show }) => {
    await editor.outline();
    await show('outline');
    // The list of symbols is the same outline, with a box to search in.
    await editor.goTo(1);
    await page.keyboard.press('Control+Shift+O');
    const box = page.locator('.quick-input-widget .quick-input-filter input');
    await box.waitFor();
    const options = page.locator('.quick-input-widget').getByRole('option');
    for (const name of ['C1', 'Form', 'Back']) {
      await box.fill(`@${name}`);
      await options.filter({ hasText: name }).first().waitFor();
    }
    await page.keyboard.press('Enter');
    await editor.waitForText('.statusbar-item', /Ln 42/);
  });
});
