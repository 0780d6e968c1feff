import {withoutControls} from '../svg/slim.ts';

/**
 * The same value with control characters and lone surrogates taken out of every string in it, keys
 * included: HTML forbids them, and no log or field sheet needs them.
 */
export function cleaned<T>(value: T): T {
  if (typeof value === 'string') return plain(value) as T;
  if (Array.isArray(value)) return value.map(cleaned) as T;
  if (typeof value !== 'object' || value === null) return value;
  return Object.fromEntries(
    Object.entries(value).map(([key, part]) => [plain(key), cleaned(part)]),
  ) as T;
}

function plain(text: string): string {
  return withoutControls(text).replace(/\p{Surrogate}/gu, '');
}
