/** The commands of the extension, and what stands beside the text. */
import { expect, it } from 'vitest';
import { textOf } from '../support/rig/editor.ts';
import { inEditor, sample } from './support/session.ts';

const TWO_PUMP = sample('05-two-pump.oilway');
const CUT = TWO_PUMP.replace('low to CV1 to pressure', 'low to pressure');

it('the caution is said in full at the first use, and gone when it is understood', async (context) => {
  await inEditor(context, TWO_PUMP, async ({ page }) => {
    const toast = page.locator('.notifications-toasts .notification-toast');
    await toast.filter({ hasText: /competent person decide/ }).waitFor();
    await page.getByRole('button', { name: 'Understood' }).click();
    await toast.first().waitFor({ state: 'detached' });
    await page.reload();
    await page
      .locator('.editor-instance .view-line')
      .filter({ hasText: /^cylinder.*mm\/s/ })
      .first()
      .waitFor();
    expect(await toast.filter({ hasText: /competent person decide/ }).count()).toBe(0);
  });
});

it('copies the figures at the cursor as a table for a spreadsheet', async (context) => {
  await inEditor(context, TWO_PUMP, async ({ editor, find, page }) => {
    await editor.computed();
    await page.context().grantPermissions(['clipboard-read', 'clipboard-write']);
    const { line, column } = find('C1 (bore');
    await editor.goTo(line, column);
    await editor.command('Oilway: Copy Figures at Cursor');
    await editor.waitForText('.statusbar-item', 'Figures copied');
    const copied = await page.evaluate(() => navigator.clipboard.readText());
    const rows = copied.split('\n').filter((row) => row.includes('\t'));
    expect(rows.length).toBeGreaterThanOrEqual(3);
    const widths = new Set(rows.slice(0, 3).map((row) => row.split('\t').length));
    expect(widths.size, copied).toBe(1);
    expect(copied).toMatch(/\d+ mm\/s/);
    expect(copied).not.toMatch(/\*\*|\|/);
  });
});

it("a finding's code leads to the page of its rule", async (context) => {
  await inEditor(context, CUT, async ({ editor, page, show }) => {
    const rows = await editor.problems();
    const row = rows.filter({ hasText: 'B01' }).first();
    await row.waitFor();
    await row.locator('a', { hasText: 'B01' }).click();
    const frame = page.frameLocator('iframe.webview.ready').first().frameLocator('iframe#active-frame');
    await frame
      .getByText(/unloading valve/)
      .first()
      .waitFor();
    await show('rule-page');
    expect(await textOf(frame.locator('body'))).toMatch(/check/i);
  });
});

it('a new circuit opens without findings and is computed', async (context) => {
  await inEditor(context, TWO_PUMP, async ({ editor, page }) => {
    await editor.computed();
    await editor.command('Oilway: New Circuit');
    await page.locator('.tab.active').filter({ hasText: 'Untitled' }).waitFor();
    const line = editor.lines.filter({ hasText: /^cylinder.*63\smm.*/ }).first();
    await line.filter({ hasText: /mm\/s/ }).waitFor();
    expect(await editor.errors.count()).toBe(0);
  });
});

it('the server restarts on command and finds again', async (context) => {
  await inEditor(context, CUT, async ({ editor }) => {
    await editor.errors.first().waitFor();
    await editor.command('Oilway: Restart Language Server');
    await editor.errors.first().waitFor({ state: 'detached' });
    await editor.errors.first().waitFor();
    await editor.computed();
  });
});

it('findings of the whole workspace are listed where that is wanted', async (context) => {
  await inEditor(
    context,
    TWO_PUMP,
    async ({ editor }) => {
      const rows = await editor.problems();
      await rows.filter({ hasText: 'other.oilway' }).first().waitFor();
      await rows.filter({ hasText: 'B01' }).first().waitFor();
    },
    { settings: { 'oilway.findings.scope': 'workspace' }, others: { 'other.oilway': CUT } },
  );
});
