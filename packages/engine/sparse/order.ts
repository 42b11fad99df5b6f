/** Elimination order of least fill: minimum degree on the symmetric pattern, ties by number so that the order is repeatable. */

/** Columns of an n x n pattern (column pointers, row numbers) in the order in which to eliminate them. */
export function minimumDegree(n: number, start: Int32Array, rows: Int32Array): Int32Array {
  const neighbours: Set<number>[] = [];
  for (let i = 0; i < n; i++) neighbours.push(new Set());
  for (let c = 0; c < n; c++) {
    for (let k = start[c]!; k < start[c + 1]!; k++) {
      const r = rows[k]!;
      if (r !== c) {
        neighbours[r]!.add(c);
        neighbours[c]!.add(r);
      }
    }
  }
  const order = new Int32Array(n);
  const done = new Uint8Array(n);
  for (let step = 0; step < n; step++) {
    let best = -1;
    let least = Number.POSITIVE_INFINITY;
    for (let i = 0; i < n; i++) {
      if (!done[i] && neighbours[i]!.size < least) {
        least = neighbours[i]!.size;
        best = i;
      }
    }
    order[step] = best;
    done[best] = 1;
    const ring = [...neighbours[best]!];
    for (const a of ring) {
      const of = neighbours[a]!;
      of.delete(best);
      for (const b of ring) if (b !== a) of.add(b);
    }
    neighbours[best]!.clear();
  }
  return order;
}
