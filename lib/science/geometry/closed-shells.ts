/** More forward edges at one vertex than this are left to the general pairing, which is linear for hubs too. */
const BUCKET_MAX = 32;

/** First triangle of the shell so far of a triangle; halves the path on the way. */
export function shellRoot(parents: Int32Array, triangle: number): number {
  let t = triangle;
  for (;;) {
    const parent = parents[t] ?? t;
    if (parent === t) return t;
    const grand = parents[parent] ?? parent;
    parents[t] = grand;
    t = grand;
  }
}

/** Joins the shells of two triangles; the lower root stays. */
export function joinShells(parents: Int32Array, s: number, t: number): void {
  const a = shellRoot(parents, s);
  const b = shellRoot(parents, t);
  if (a < b) parents[b] = a;
  else if (b < a) parents[a] = b;
}

/**
 * The quick way for sound meshes: puts each edge that runs from its lower to its higher vertex with its lower vertex,
 * then looks up the one that runs back. True when every edge is used just once in each direction; `parents` (−1 for
 * triangles that take no part, else the triangle itself) then says what hangs together. False, with `parents` as
 * handed in, as soon as an edge isn't so, or a vertex has very many.
 */
export function closedShells(triangles: Uint32Array, parents: Int32Array, vertices: number): boolean {
  const count = parents.length;
  const starts = new Int32Array(vertices + 2);
  let forward = 0;
  let used = 0;
  for (let t = 0; t < count; t++) {
    if (parents[t] === -1) continue;
    const a = triangles[3 * t] ?? 0;
    const b = triangles[3 * t + 1] ?? 0;
    const c = triangles[3 * t + 2] ?? 0;
    // Of three different corners one edge or two run upwards.
    if (a < b) starts[a + 2] = (starts[a + 2] ?? 0) + 1;
    if (b < c) starts[b + 2] = (starts[b + 2] ?? 0) + 1;
    if (c < a) starts[c + 2] = (starts[c + 2] ?? 0) + 1;
    forward += (a < b ? 1 : 0) + (b < c ? 1 : 0) + (c < a ? 1 : 0);
    used += 3;
  }
  if (2 * forward !== used) return false;
  for (let v = 2; v < starts.length; v++) {
    if ((starts[v] ?? 0) > BUCKET_MAX) return false;
    starts[v] = (starts[v] ?? 0) + (starts[v - 1] ?? 0);
  }
  const heads = new Int32Array(forward);
  const owners = new Int32Array(forward);
  for (let t = 0; t < count; t++) {
    if (parents[t] === -1) continue;
    let tail = triangles[3 * t + 2] ?? 0;
    for (let i = 3 * t; i < 3 * t + 3; i++) {
      const head = triangles[i] ?? 0;
      if (tail < head) {
        const position = starts[tail + 1] ?? 0;
        heads[position] = head;
        owners[position] = t;
        starts[tail + 1] = position + 1;
      }
      tail = head;
    }
  }
  if (!paired(triangles, parents, { starts, heads, owners })) {
    for (let t = 0; t < count; t++) if (parents[t] !== -1) parents[t] = t;
    return false;
  }
  return true;
}

interface ForwardEdges {
  readonly starts: Int32Array;
  readonly heads: Int32Array;
  readonly owners: Int32Array;
}

function paired(triangles: Uint32Array, parents: Int32Array, { starts, heads, owners }: ForwardEdges): boolean {
  for (let t = 0; t < parents.length; t++) {
    if (parents[t] === -1) continue;
    let tail = triangles[3 * t + 2] ?? 0;
    for (let i = 3 * t; i < 3 * t + 3; i++) {
      const head = triangles[i] ?? 0;
      if (tail > head) {
        let found = -1;
        for (let e = starts[head] ?? 0; e < (starts[head + 1] ?? 0); e++) {
          if (heads[e] !== tail) continue;
          if (found >= 0) return false;
          found = e;
        }
        const owner = found < 0 ? -1 : (owners[found] ?? -1);
        // An owner is taken away once met, so that a second edge running back finds none.
        if (owner < 0) return false;
        owners[found] = -1;
        joinShells(parents, owner, t);
      }
      tail = head;
    }
  }
  return true;
}
