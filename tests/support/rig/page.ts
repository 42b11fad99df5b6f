/** The page that opens the workbench: its configuration is data in an attribute, nothing else is dynamic. */

export interface PageSettings {
  /** Host and port as the browser sees them: `rig.localhost:1234`. */
  readonly host: string;
  /** Path in the workspace of the file to open at start, `/05-two-pump.oilway`. */
  readonly open: string | undefined;
  /** Settings that stand before the user's own. */
  readonly settings: Readonly<Record<string, unknown>>;
}

export const DISK_SCHEME = 'rigdisk';
export const DISK_AUTHORITY = 'workspace';
/** The name under which the editor shows the workspace folder. */
export const FOLDER = '/circuits';

/** Quiet and reproducible: no start page, no telemetry, no assistants, nothing fetched from anywhere. */
const QUIET = {
  'workbench.startupEditor': 'none',
  'workbench.secondarySideBar.defaultVisibility': 'hidden',
  'workbench.tips.enabled': false,
  'workbench.enableExperiments': false,
  'chat.disableAIFeatures': true,
  'telemetry.telemetryLevel': 'off',
  'extensions.autoCheckUpdates': false,
  'extensions.ignoreRecommendations': true,
  'files.autoSave': 'off',
};

const attribute = (text: string): string => text.replaceAll('&', '&amp;').replaceAll('"', '&quot;').replaceAll('<', '&lt;');

export function page({ host, open, settings }: PageSettings): string {
  const webHost = `http://{{uuid}}.${host}/build`;
  const folder = { scheme: DISK_SCHEME, authority: DISK_AUTHORITY, path: FOLDER };
  const configuration = {
    productConfiguration: {
      nameShort: 'Oilway',
      nameLong: 'Oilway in the browser',
      enableTelemetry: false,
      webEndpointUrlTemplate: webHost,
      webviewContentExternalBaseUrlTemplate: `${webHost}/out/vs/workbench/contrib/webview/browser/pre/`,
    },
    folderUri: folder,
    additionalBuiltinExtensions: ['/ext', '/disk-ext'].map((path) => ({ scheme: 'http', authority: host, path })),
    configurationDefaults: { ...QUIET, ...settings },
    defaultLayout: { force: true, editors: open === undefined ? [] : [{ uri: { ...folder, path: `${FOLDER}${open}` } }] },
  };
  return `<!DOCTYPE html>
<html lang="en">
<head>
<meta charset="utf-8">
<title>Oilway</title>
<meta name="viewport" content="width=device-width, initial-scale=1.0">
<meta id="vscode-workbench-web-configuration" data-settings="${attribute(JSON.stringify(configuration))}">
<link rel="icon" href="/ext/images/icon.png" type="image/png">
<link rel="stylesheet" href="/build/out/vs/workbench/workbench.web.main.internal.css">
</head>
<body aria-label="">
<script>globalThis._VSCODE_FILE_ROOT = location.origin + '/build/out/';</script>
<script type="module" src="/build/out/nls.messages.js"></script>
<script type="module">import init from '/build/workbench.js'; init();</script>
</body>
</html>
`;
}
