/**
 * The circles in which files import each other, types too: each a list of its arrows, `[from, to]`.
 * `arrows` maps a file to those that it imports. By Tarjan's strongly connected components (SIAM J. Comput. 1, 1972).
 */
export function circlesIn(arrows) {
  const order = new Map();
  const lowest = new Map();
  const path = [];
  const circles = [];

  function visit(file) {
    order.set(file, order.size);
    lowest.set(file, order.get(file));
    path.push(file);
    for (const next of arrows.get(file) ?? []) {
      if (!order.has(next)) visit(next);
      if (path.includes(next)) lowest.set(file, Math.min(lowest.get(file), lowest.get(next)));
    }
    if (lowest.get(file) !== order.get(file)) return;
    const tied = new Set(path.splice(path.indexOf(file)));
    const inside = [...tied].flatMap((one) =>
      (arrows.get(one) ?? []).filter((next) => tied.has(next)).map((next) => [one, next]),
    );
    if (inside.length > 0) circles.push(inside);
  }

  for (const file of arrows.keys()) if (!order.has(file)) visit(file);
  return circles;
}
