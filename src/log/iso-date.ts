import {civilFromDays} from '../time/calendar.ts';

/** `YYYY-MM-DD` of a day counted from 1970-01-01. */
export function isoDate(daysSince1970: number): string {
  const {year, month, day} = civilFromDays(daysSince1970);
  const two = (value: number) => String(value).padStart(2, '0');
  return `${String(year).padStart(4, '0')}-${two(month)}-${two(day)}`;
}
