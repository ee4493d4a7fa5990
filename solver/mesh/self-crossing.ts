// Rings that cross themselves, told from rings that merely touch themselves.

/**
 * Finds vertices where a ring crosses itself.
 *
 * @param vertices - The ring after the arrangement, its first vertex repeated at the end.
 * @param x - x of all vertices.
 * @param y - y of all vertices.
 * @returns The places; a ring that touches itself or runs back along itself has none there.
 */
export function findSelfCrossings(
  vertices: readonly number[],
  x: ArrayLike<number>,
  y: ArrayLike<number>,
): [number, number][] {
  const count = vertices.length - 1;
  const passes = new Map<number, [number, number][]>();
  for (let i = 0; i < count; i++) {
    const pass: [number, number] = [vertices[(i + count - 1) % count], vertices[(i + 1) % count]];
    const list = passes.get(vertices[i]);
    if (list) list.push(pass);
    else passes.set(vertices[i], [pass]);
  }
  const found: [number, number][] = [];
  for (const [v, list] of passes) {
    if (list.length < 2) continue;
    const turn = (w: number): number => Math.atan2(y[w] - y[v], x[w] - x[v]);
    const crossed = list.some((p, i) =>
      list.slice(i + 1).some((q) => {
        if (p.some((w) => q.includes(w))) return false;
        const [from, to] = [turn(p[0]), turn(p[1])].sort((a, b) => a - b);
        const inside = q.map(turn).filter((angle) => angle > from && angle < to).length;
        return inside === 1;
      }),
    );
    if (crossed) found.push([x[v], y[v]]);
  }
  return found;
}
