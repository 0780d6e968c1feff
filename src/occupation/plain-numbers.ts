/**
 * The same document without a negative zero, which would print as "-0" in some languages and vanish
 * in others. Everything else stays what it is.
 */
export function withoutNegativeZero<T>(value: T): T {
  if (typeof value === 'number') return (value === 0 ? 0 : value) as T;
  if (Array.isArray(value)) return value.map(withoutNegativeZero) as T;
  if (typeof value !== 'object' || value === null) return value;
  return Object.fromEntries(
    Object.entries(value).map(([name, member]) => [name, withoutNegativeZero(member)]),
  ) as T;
}
