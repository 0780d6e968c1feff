import type {BudgetRow, PerAxis} from '../result.ts';
import type {Occupation} from './occupations.ts';

/** What a row is shared by; null for a contribution of the occupation's own. */
export function keyOf({source, sharedBy, id}: BudgetRow): string | null {
  return sharedBy === null ? null : [source, sharedBy, id ?? ''].join('\n');
}

export function sourceOf(key: string): string {
  return key.split('\n')[0] ?? '';
}

/**
 * Whether the error is the same at two marks. A rounded separation is another one at another site,
 * and what a positioning service leaves uncertain is another one at another time. A base or tape
 * that nobody named may be another one too.
 */
export function cancelsBetweenMarks(key: string): boolean {
  const [, sharedBy, id] = key.split('\n');
  return sharedBy !== 'site' && sharedBy !== 'service' && id !== '';
}

export function uncertaintyM(row: BudgetRow, axis: keyof PerAxis): number {
  return row.standardUncertaintyM?.[axis] ?? 0;
}

/** Shared contributions that every occupation has. */
export function keysOfAll(occupations: readonly Occupation[]): Set<string> {
  const keys = occupations.map(({rows}) => new Set(rows.map(keyOf).filter((key) => key !== null)));
  const [first = new Set<string>(), ...others] = keys;
  return new Set([...first].filter((key) => others.every((other) => other.has(key))));
}
