/**
 * The known name that a mistyped one most likely stands for.
 *
 * Case, spaces, hyphens and underscores do not count as differences. A name is near when at most a
 * third of its letters (and at least one) must change, or when one name contains the other.
 *
 * Method: edit distance with neighbouring letters swapped counted once.
 * Source: Damerau (1964), Communications of the ACM 7(3), doi:10.1145/363958.363994; Wagner and
 * Fischer (1974), Journal of the ACM 21(1), doi:10.1145/321796.321811.
 *
 * @returns undefined when no name is near
 */
export function nearestName(given: string, known: readonly string[]): string | undefined {
  return nearestNames(given, known)[0];
}

/** The near names, nearest first, names at equal distance in the order given; at most three. */
export function nearestNames(given: string, known: readonly string[]): string[] {
  const wanted = bare(given);
  if (wanted === '') return [];
  return known
    .map((name) => ({name, distance: distanceBetween(wanted, bare(name))}))
    .filter(({name, distance}) => distance <= Math.max(1, Math.floor(bare(name).length / 3)))
    .sort((a, b) => a.distance - b.distance)
    .slice(0, 3)
    .map(({name}) => name);
}

/** A name without the differences that people do not mean. */
export function bare(name: string): string {
  return name.toLowerCase().replace(/[\s_-]+/g, '');
}

function distanceBetween(given: string, known: string): number {
  const shorter = given.length < known.length ? given : known;
  const longer = shorter === given ? known : given;
  if (shorter.length >= 3 && longer.includes(shorter)) return 1;
  return editDistance(given, known);
}

function editDistance(a: string, b: string): number {
  let twoBack: number[] = [];
  let back = Array.from({length: b.length + 1}, (_, j) => j);
  for (let i = 1; i <= a.length; i++) {
    const row = [i];
    for (let j = 1; j <= b.length; j++) {
      const change = back[j - 1]! + (a[i - 1] === b[j - 1] ? 0 : 1);
      let least = Math.min(change, back[j]! + 1, row[j - 1]! + 1);
      if (i > 1 && j > 1 && a[i - 1] === b[j - 2] && a[i - 2] === b[j - 1]) {
        least = Math.min(least, twoBack[j - 2]! + 1);
      }
      row.push(least);
    }
    twoBack = back;
    back = row;
  }
  return back[b.length]!;
}
