// The rig's file system: every call goes to the server that served the page, and from there to the disk.
const vscode = require('vscode');

const SCHEME = 'rigdisk';

/** @param {string} status @param {import('vscode').Uri} uri */
function failure(status, uri) {
  if (status === 404) return vscode.FileSystemError.FileNotFound(uri);
  if (status === 409) return vscode.FileSystemError.FileExists(uri);
  if (status === 401 || status === 403) return vscode.FileSystemError.NoPermissions(uri);
  return vscode.FileSystemError.Unavailable(uri);
}

class RigDisk {
  constructor(origin) {
    this.origin = origin;
    this.changes = new vscode.EventEmitter();
    this.onDidChangeFile = this.changes.event;
  }

  async call(method, action, uri, { to, body } = {}) {
    const address = new URL(`/disk/${action}`, this.origin);
    address.searchParams.set('path', uri.path);
    if (to) address.searchParams.set('to', to.path);
    const headers = method === 'GET' ? {} : { 'x-oilway-rig': '1' };
    const response = await fetch(address, { method, headers, body, credentials: 'same-origin' });
    if (!response.ok) throw failure(response.status, uri);
    return response;
  }

  tell(type, uri) {
    this.changes.fire([{ type, uri }]);
  }

  async has(uri) {
    try {
      await this.stat(uri);
      return true;
    } catch {
      return false;
    }
  }

  async stat(uri) {
    return await (await this.call('GET', 'stat', uri)).json();
  }

  async readDirectory(uri) {
    return await (await this.call('GET', 'dir', uri)).json();
  }

  async readFile(uri) {
    return new Uint8Array(await (await this.call('GET', 'read', uri)).arrayBuffer());
  }

  async writeFile(uri, body, { create, overwrite }) {
    const there = await this.has(uri);
    if (!there && !create) throw vscode.FileSystemError.FileNotFound(uri);
    if (there && create && !overwrite) throw vscode.FileSystemError.FileExists(uri);
    await this.call('PUT', 'write', uri, { body });
    this.tell(there ? vscode.FileChangeType.Changed : vscode.FileChangeType.Created, uri);
  }

  async createDirectory(uri) {
    await this.call('POST', 'mkdir', uri);
    this.tell(vscode.FileChangeType.Created, uri);
  }

  async rename(uri, to, { overwrite }) {
    if (!overwrite && (await this.has(to))) throw vscode.FileSystemError.FileExists(to);
    await this.call('POST', 'rename', uri, { to });
    this.tell(vscode.FileChangeType.Deleted, uri);
    this.tell(vscode.FileChangeType.Created, to);
  }

  async delete(uri) {
    await this.call('DELETE', 'delete', uri);
    this.tell(vscode.FileChangeType.Deleted, uri);
  }

  /** Changes made outside the editor come in as server-sent events over one long answer. */
  watch() {
    this.listening ??= this.listen();
    return new vscode.Disposable(() => {});
  }

  async listen() {
    const response = await fetch(new URL('/disk/events', this.origin), { credentials: 'same-origin' });
    const reader = response.body.pipeThrough(new TextDecoderStream()).getReader();
    let rest = '';
    for (;;) {
      const { value, done } = await reader.read();
      if (done) return;
      const lines = (rest + value).split('\n');
      rest = lines.pop() ?? '';
      for (const line of lines) {
        if (!line.startsWith('data: ')) continue;
        const uri = vscode.Uri.from({ scheme: SCHEME, authority: 'workspace', path: JSON.parse(line.slice(6)) });
        this.tell((await this.has(uri)) ? vscode.FileChangeType.Changed : vscode.FileChangeType.Deleted, uri);
      }
    }
  }
}

exports.activate = (context) => {
  const { scheme, authority } = context.extensionUri;
  const disk = new RigDisk(`${scheme}://${authority}`);
  context.subscriptions.push(vscode.workspace.registerFileSystemProvider(SCHEME, disk, { isCaseSensitive: true }));
};
