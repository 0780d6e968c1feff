/**
 * Points that fill the unit ball of 1, 2 or 3 dimensions evenly, always the same ones.
 *
 * Source: J. H. Halton (1960), On the efficiency of certain quasi-random sequences of points,
 * Numer. Math. 2, 84–90; bases 2, 3 and 5.
 */
export function ballPoints(dimensions: number, count: number): number[][] {
  return Array.from({length: count}, (_, i) => {
    const [a, b, c] = [halton(i + 1, 2), halton(i + 1, 3), halton(i + 1, 5)];
    if (dimensions === 1) return [2 * a - 1];
    if (dimensions === 2) {
      const radius = Math.sqrt(a);
      return [radius * Math.cos(2 * Math.PI * b), radius * Math.sin(2 * Math.PI * b)];
    }
    const radius = Math.cbrt(a);
    const height = 2 * b - 1;
    const across = radius * Math.sqrt(1 - height * height);
    return [
      across * Math.cos(2 * Math.PI * c),
      across * Math.sin(2 * Math.PI * c),
      radius * height,
    ];
  });
}

/** The digits of an index in a base, mirrored at the point. */
function halton(index: number, base: number): number {
  let value = 0;
  let place = 1 / base;
  for (let rest = index; rest > 0; rest = Math.floor(rest / base)) {
    value += (rest % base) * place;
    place /= base;
  }
  return value;
}
