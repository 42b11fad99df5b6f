/** Drives the workbench in Debian's Chromium: a fresh profile each time, and no request may leave this machine. */
import { mkdirSync } from 'node:fs';
import { dirname } from 'node:path';
import { type Browser, type BrowserContext, chromium, type Page } from 'playwright-core';
import { chromiumPath } from './chromium.ts';

/** A step of a test may take this long, ms. */
export const STEP = 20_000;
/** Opening the editor, some 30 MB of script, may take longer on a busy machine, ms. */
export const OPENING = 60_000;

const FLAGS = [
  '--no-sandbox',
  '--disable-gpu',
  '--disable-dev-shm-usage',
  '--disable-background-networking',
  '--disable-component-update',
  '--disable-sync',
  '--no-first-run',
  // Names that are not ours do not resolve at all, whatever asks for them.
  '--host-resolver-rules=MAP * ~NOTFOUND , EXCLUDE *.localhost , EXCLUDE 127.0.0.1',
];

const LOCAL = /^(?:https?|wss?):\/\/(?:[a-z0-9-]+\.)*(?:localhost|127\.0\.0\.1)(?::\d+)?(?:\/|$)|^(?:data|blob|about|chrome-error|chrome):/;

export interface Window {
  readonly page: Page;
  /** Addresses asked for that are not on this machine; a test fails if there is one. */
  readonly strangers: readonly string[];
  /** Lines of the page's console that are errors. */
  readonly errors: readonly string[];
  close(): Promise<void>;
}

export interface WindowOptions {
  readonly width?: number;
  readonly height?: number;
  /** Device pixels a CSS pixel, for pictures. */
  readonly scale?: number;
}

export async function openWindow(address: string, options: WindowOptions = {}): Promise<Window> {
  const browser: Browser = await chromium.launch({ executablePath: chromiumPath(), args: FLAGS });
  try {
    const context: BrowserContext = await browser.newContext({
      viewport: { width: options.width ?? 1400, height: options.height ?? 900 },
      deviceScaleFactor: options.scale ?? 1,
    });
    context.setDefaultTimeout(STEP);
    const strangers: string[] = [];
    const errors: string[] = [];
    context.on('request', (request) => {
      if (!LOCAL.test(request.url())) strangers.push(request.url());
    });
    const page = await context.newPage();
    page.on('console', (message) => {
      if (message.type() === 'error') errors.push(message.text());
    });
    await page.goto(address, { timeout: OPENING });
    await page.locator('.monaco-workbench').waitFor({ timeout: OPENING });
    return { page, strangers, errors, close: () => browser.close() };
  } catch (error) {
    await browser.close();
    throw error;
  }
}

export async function picture(page: Page, file: string): Promise<void> {
  mkdirSync(dirname(file), { recursive: true });
  await page.screenshot({ path: file });
}
