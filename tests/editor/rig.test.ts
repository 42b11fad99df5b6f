/** The rig itself: its disk is the real one, and a request to another machine fails the test in which it is made. */
import { expect, it } from 'vitest';
import { inEditor } from './support/session.ts';

it('a request that leaves this machine fails its test', async (context) => {
  const session = inEditor(context, 'circuit A\n', async ({ page }) => {
    await page.evaluate(() => fetch('http://example.org/').catch(() => 'not reached'));
  });
  await expect(session).rejects.toThrow(/requests that left this machine/);
});

it('what is saved stands on the disk, and what changes on the disk changes in the editor', async (context) => {
  await inEditor(context, 'circuit A\n', async ({ editor, page, saved, write }) => {
    await editor.goTo(1, 10);
    await page.keyboard.type('B');
    await editor.save();
    expect(saved()).toBe('circuit AB\n');
    write('circuit C "Changed by another program"\n');
    await editor.waitForText('.editor-instance .view-line', /another\sprogram/);
  });
});
