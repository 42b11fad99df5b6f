/** The suite's own alarm: a request to another machine fails the test in which it is made. */
import { expect, it } from 'vitest';
import { inEditor } from './support/session.ts';

it('a request that leaves this machine fails its test', async (context) => {
  const session = inEditor(context, 'circuit A\n', async ({ page }) => {
    await page.evaluate(() => fetch('http://example.org/').catch(() => 'not reached'));
  });
  await expect(session).rejects.toThrow(/requests that left this machine/);
});
