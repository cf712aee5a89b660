/**
 * Compact letter display by insert-and-absorb (H.-P. Piepho, J. Comput. Graph. Stat. 13 (2004) 456): two entries share
 * a letter exactly when they are not told apart. "a" goes to the first entry's group, so hand them in by rank.
 * @param count entries @param differ whether i and j (i < j) are told apart, at the level and adjustment that the caller names
 * @param most more groups than this on the way are given up: their number can grow exponentially with the entries
 * @returns one string an entry; letters a–z, A–Z, then a2, b2, …; none for no entries; undefined when given up
 */
export function compactLetters(count: number, differ: (i: number, j: number) => boolean): string[];
export function compactLetters(
  count: number,
  differ: (i: number, j: number) => boolean,
  most: number,
): string[] | undefined;
export function compactLetters(
  count: number,
  differ: (i: number, j: number) => boolean,
  most = Infinity,
): string[] | undefined {
  if (count === 0) return [];
  let groups: Uint8Array[] = [new Uint8Array(count).fill(1)];
  for (let i = 0; i < count; i++) {
    for (let j = i + 1; j < count; j++) {
      if (differ(i, j)) groups = split(groups, i, j);
      if (groups.length > most) return undefined;
    }
  }
  groups.sort(byFirstMember);
  return Array.from({ length: count }, (_, i) =>
    groups.flatMap((group, column) => (group[i] === 1 ? [letter(column)] : [])).join(""),
  );
}

/** Every group that holds both is replaced by two, one without each, unless another group already covers it. */
function split(groups: readonly Uint8Array[], i: number, j: number): Uint8Array[] {
  const kept = groups.filter((group) => group[i] !== 1 || group[j] !== 1);
  const halves = groups
    .filter((group) => group[i] === 1 && group[j] === 1)
    .flatMap((group) => [i, j].map((left) => group.map((member, at) => (at === left ? 0 : member))));
  for (const half of halves) {
    if (kept.some((group) => covers(group, half))) continue;
    for (let k = kept.length - 1; k >= 0; k--) {
      const other = kept[k];
      if (other && covers(half, other)) kept.splice(k, 1);
    }
    kept.push(half);
  }
  return kept;
}

function covers(larger: Uint8Array, smaller: Uint8Array): boolean {
  return smaller.every((member, at) => member === 0 || larger[at] === 1);
}

function byFirstMember(a: Uint8Array, b: Uint8Array): number {
  const at = a.findIndex((member, index) => member !== b[index]);
  return (b[at] ?? 0) - (a[at] ?? 0);
}

function letter(column: number): string {
  const base = column % 52;
  const character = String.fromCharCode(base < 26 ? 97 + base : 65 + base - 26);
  return column < 52 ? character : `${character}${Math.floor(column / 52) + 1}`;
}
