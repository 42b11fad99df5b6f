/** Takes the picture of the README: a sample in the editor, with hints, a finding and the hover of the cylinder. */
import { copyFileSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { openWindow } from './driver.ts';
import { Editor } from './editor.ts';
import { editorBuild } from './editor-build.ts';
import { startRig } from './server.ts';

const root = fileURLToPath(new URL('../../..', import.meta.url));
const target = join(root, 'packages/vscode/images/editor.png');
/** A picture is looked at in a browser and kept in the repository: no larger than this, bytes. */
const LARGEST = 400_000;
const FILE = 'two-pump.oilway';
/** Height of the panel with the findings, px. */
const PANEL = 178;

const SETTINGS = {
  'workbench.colorTheme': 'Light Modern',
  'workbench.activityBar.location': 'hidden',
  'editor.scrollbar.horizontal': 'hidden',
  'workbench.layoutControl.enabled': false,
  'window.commandCenter': false,
  'editor.minimap.enabled': false,
  'editor.fontSize': 12.5,
  'editor.lineHeight': 17,
  'editor.scrollBeyondLastLine': false,
  'editor.occurrencesHighlight': 'off',
  'breadcrumbs.enabled': false,
};

const workspace = mkdtempSync(join(tmpdir(), 'oilway-picture-'));
const file = join(workspace, FILE);
copyFileSync(join(root, 'samples/05-two-pump.oilway'), file);
// A relief set above the rating of what it guards, and a requirement just missed: findings, while all figures stand.
const text = readFileSync(file, 'utf8').replace(/^\/\/ Expected.*\n/m, '');
const faulty = text.replace('set 240 bar', 'set 270 bar').replace('at least 100 mm/s', 'at least 150 mm/s');
if (faulty === text) throw new Error('The sample has changed: the picture no longer finds what it wants to show.');
writeFileSync(file, faulty);

const rig = await startRig({
  build: editorBuild(root, console.log),
  extension: join(root, 'packages/vscode'),
  workspace,
  open: `/${FILE}`,
  settings: SETTINGS,
});
try {
  const window = await openWindow(rig.address, { width: 1180, height: 1080, scale: 1.3 });
  try {
    const { page } = window;
    const editor = new Editor(page);
    await editor.ready();
    await editor.computed();
    await page.getByRole('button', { name: 'Understood' }).click();
    await editor.command('View: Close Primary Side Bar');
    await editor.problems();
    // As low as the findings allow.
    const panel = await page.locator('.part.panel').boundingBox();
    if (!panel) throw new Error('The problems are not in sight.');
    await page.mouse.move(panel.x + panel.width / 2, panel.y);
    await page.mouse.down();
    await page.mouse.move(panel.x + panel.width / 2, panel.y + panel.height - PANEL, { steps: 4 });
    await page.mouse.up();
    await editor.command('View: Toggle Status Bar Visibility');
    await editor.goTo(1);
    await editor.hover(/^cylinder/, 'C1', /mm\/s/);
    const picture = await page.screenshot();
    if (picture.length > LARGEST) throw new Error(`The picture has ${picture.length} bytes, at most ${LARGEST} are kept.`);
    writeFileSync(target, picture);
    console.log(`${target}: ${Math.round(picture.length / 1000)} kB`);
  } finally {
    await window.close();
  }
} finally {
  await rig.close();
  rmSync(workspace, { recursive: true, force: true });
}
