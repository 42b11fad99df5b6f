/** Which places are joined: sets that grow together, kept in the order of the text. */
export class Joints {
  private readonly parents = new Map<string, string>();

  add(key: string): string {
    if (!this.parents.has(key)) this.parents.set(key, key);
    return key;
  }

  root(key: string): string {
    this.add(key);
    let root = key;
    for (let parent = this.parents.get(root); parent !== undefined && parent !== root; parent = this.parents.get(root)) root = parent;
    // The way is shortened, so that a long chain of lines costs nothing.
    for (let at = key; at !== root; ) {
      const next = this.parents.get(at) ?? root;
      this.parents.set(at, root);
      at = next;
    }
    return root;
  }

  join(a: string, b: string): void {
    const rootA = this.root(a);
    const rootB = this.root(b);
    if (rootA !== rootB) this.parents.set(rootB, rootA);
  }

  keys(): IterableIterator<string> {
    return this.parents.keys();
  }
}
