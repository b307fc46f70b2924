/** Disjoint sets of 0 … n − 1, smallest member as the representative. */
export function disjointSets(n: number) {
  const up = new Int32Array(n);
  for (let i = 0; i < n; i++) up[i] = i;
  const find = (i: number): number => {
    let root = i;
    while (up[root] !== root) root = up[root]!;
    while (up[i] !== root) {
      const next = up[i]!;
      up[i] = root;
      i = next;
    }
    return root;
  };
  const join = (a: number, b: number): void => {
    const x = find(a);
    const y = find(b);
    if (x < y) up[y] = x;
    else up[x] = y;
  };
  return { find, join };
}
