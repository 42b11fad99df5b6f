/** What a person does in the editor and sees there, in the words of this suite. Waits for things, never for time. */
import type { Locator, Page } from 'playwright-core';
import { OPENING, STEP } from './driver.ts';

/** The editor writes no-break spaces; the suite reads plain ones. */
export const plain = (text: string): string => text.replaceAll('\u00a0', ' ').replaceAll('\u200b', '');

export const textOf = async (found: Locator): Promise<string> => plain((await found.textContent()) ?? '');

export class Editor {
  readonly page: Page;

  constructor(page: Page) {
    this.page = page;
  }

  get errors(): Locator {
    return this.page.locator('.editor-instance .squiggly-error');
  }

  get lines(): Locator {
    return this.page.locator('.editor-instance .view-line');
  }

  /** The file at start is open and read by the language server. */
  async ready(): Promise<void> {
    await this.page.locator('.explorer-folders-view .monaco-list-row').first().waitFor({ timeout: OPENING });
    await this.lines.first().waitFor();
    await this.waitForText('.statusbar-item', 'Oilway');
    await this.page.locator('.editor-instance .view-line').first().click();
  }

  async waitForText(selector: string, text: string | RegExp): Promise<Locator> {
    const found = this.page.locator(selector).filter({ hasText: text }).first();
    await found.waitFor();
    return found;
  }

  /** Cursor by the go-to-line box; both from 1. */
  async goTo(line: number, column = 1): Promise<void> {
    await this.page.keyboard.press('Control+G');
    const box = this.page.locator('.quick-input-widget .quick-input-filter input');
    await box.waitFor();
    await box.fill(`:${line}:${column}`);
    await this.page.keyboard.press('Enter');
    await box.waitFor({ state: 'hidden' });
  }

  async command(title: string): Promise<void> {
    await this.page.keyboard.press('F1');
    const box = this.page.locator('.quick-input-widget .quick-input-filter input');
    await box.waitFor();
    await box.fill(`>${title}`);
    await this.page.locator('.quick-input-widget').getByRole('option', { name: title }).first().waitFor();
    await this.page.keyboard.press('Enter');
    await box.waitFor({ state: 'hidden' });
  }

  /** Replaces `length` characters at a place by typing; no closing brackets or suggestions get in between. */
  async replace(line: number, column: number, length: number, text: string): Promise<void> {
    await this.goTo(line, column);
    for (let i = 0; i < length; i++) await this.page.keyboard.press('Shift+ArrowRight');
    if (text === '') await this.page.keyboard.press('Delete');
    else await this.page.keyboard.insertText(text);
  }

  async save(): Promise<void> {
    await this.page.keyboard.press('Control+S');
    await this.page.locator('.tab.dirty').waitFor({ state: 'detached' });
  }

  /** Where a word stands on the line that starts with `lineStart`, as the editor draws it, in page pixels. */
  async place(lineStart: RegExp, word: string): Promise<{ readonly x: number; readonly y: number }> {
    const line = this.lines.filter({ hasText: lineStart }).first();
    await line.waitFor();
    const place = await line.evaluate((drawn, wanted) => {
      const walk = document.createTreeWalker(drawn, NodeFilter.SHOW_TEXT);
      const parts: { node: Node; from: number }[] = [];
      let text = '';
      for (let node = walk.nextNode(); node; node = walk.nextNode()) {
        parts.push({ node, from: text.length });
        text += node.textContent ?? '';
      }
      // A hint may follow without a space: the word ends where no further digit or letter of its kind follows.
      const at = text.search(new RegExp(`\\b${wanted}(?!\\d)`));
      const part = parts.filter(({ from }) => from <= at).at(-1);
      if (at < 0 || !part) return undefined;
      const range = document.createRange();
      range.setStart(part.node, at - part.from);
      range.setEnd(part.node, at - part.from + 1);
      const box = range.getBoundingClientRect();
      return { x: box.left + box.width / 2 + 2, y: box.top + box.height / 2 };
    }, word);
    if (!place) throw new Error(`There is no ${word} on that line.`);
    return place;
  }

  /** Rests the mouse on a word until its hover says what is awaited; returns all it says. */
  async hover(lineStart: RegExp, word: string, awaited: RegExp): Promise<string> {
    const hover = this.page.locator('.monaco-hover:not(.hidden) .hover-contents');
    let seen = '';
    for (let attempt = 0; attempt < 5; attempt++) {
      await this.page.mouse.move(2, 2);
      await hover.first().waitFor({ state: 'hidden' });
      const { x, y } = await this.place(lineStart, word);
      // Two moves: an editor takes no hover from a mouse that appears out of nowhere.
      await this.page.mouse.move(x - 6, y);
      await this.page.mouse.move(x, y);
      try {
        await hover
          .filter({ hasText: awaited })
          .first()
          .waitFor({ timeout: STEP / 4 });
        return plain((await hover.allInnerTexts()).join('\n'));
      } catch {
        seen = plain((await hover.allInnerTexts()).join('\n'));
      }
    }
    throw new Error(`The hover never said ${awaited}. It said:\n${seen}`);
  }

  /** Opens the quick fixes at the cursor and returns their titles. */
  async fixes(): Promise<string[]> {
    const menu = this.page.locator('.action-widget:not(.action-list-submenu-panel)');
    await this.page.keyboard.press('Control+.');
    await menu.getByRole('option').first().waitFor();
    return (await menu.getByRole('option').allInnerTexts()).map(plain);
  }

  /** Takes the quick fix with this title (the menu is open). */
  async takeFix(title: RegExp): Promise<void> {
    const menu = this.page.locator('.action-widget:not(.action-list-submenu-panel)');
    const option = menu.getByRole('option', { name: title }).first();
    await option.waitFor();
    const titles = (await menu.getByRole('option').allInnerTexts()).map(plain);
    const at = titles.findIndex((text) => title.test(text));
    // The first entry has the focus; the mouse would take it away again.
    for (let i = 0; i < at; i++) await this.page.keyboard.press('ArrowDown');
    await this.page.keyboard.press('Enter');
    await menu.waitFor({ state: 'hidden' });
  }

  /** Rows of the outline, once the server has given them. */
  async outline(): Promise<Locator> {
    await this.command('Explorer: Focus on Outline View');
    const rows = this.page.locator('.outline-tree .monaco-list-row');
    await rows.first().waitFor();
    return rows;
  }

  /** The first study has ended: its figures stand as hints in the text. */
  async computed(): Promise<void> {
    await this.lines
      .filter({ hasText: /^cylinder.*mm\/s/ })
      .first()
      .waitFor();
  }

  /** Goes to the place of a problem, as a double click does; the editor then has the keys. */
  async goToProblem(row: Locator): Promise<void> {
    await row.dblclick();
    await this.page.locator('.editor-instance .monaco-editor.focused').waitFor();
  }

  async problems(): Promise<Locator> {
    await this.page.keyboard.press('Control+Shift+M');
    const panel = this.page.locator('.markers-panel');
    await panel.waitFor();
    return panel.locator('.monaco-list-row');
  }
}
