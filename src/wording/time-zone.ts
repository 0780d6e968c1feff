/*
 * Times of a place beside UTC. The zones are those of the IANA database that Node brings; every
 * number stays UTC, and so does all that is computed.
 */

/** Whether Node knows a zone of that name, such as Europe/Berlin. */
export function isTimeZone(zone: string): boolean {
  try {
    new Intl.DateTimeFormat('en-GB', {timeZone: zone});
    return true;
  } catch {
    return false;
  }
}

/** "2026-05-12 11:12:00" at a place, from an ISO 8601 UTC string; fractions dropped. */
export function formatLocal(isoUtc: string, zone: string): string {
  const parts = new Intl.DateTimeFormat('en-GB', {
    timeZone: zone,
    year: 'numeric',
    month: '2-digit',
    day: '2-digit',
    hour: '2-digit',
    minute: '2-digit',
    second: '2-digit',
    hourCycle: 'h23',
  }).formatToParts(new Date(Math.floor(Date.parse(isoUtc) / 1000) * 1000));
  const of = (type: string) => parts.find((part) => part.type === type)?.value ?? '';
  return `${of('year')}-${of('month')}-${of('day')} ${of('hour')}:${of('minute')}:${of('second')}`;
}

/** The clock of a place in brackets behind a time in UTC, with its date where that differs. */
export function besideUtc(isoUtc: string, zone: string | null): string {
  if (zone === null) return '';
  const local = formatLocal(isoUtc, zone);
  const sameDay = local.slice(0, 10) === isoUtc.slice(0, 10);
  return ` (${sameDay ? local.slice(11) : local} in ${zone})`;
}

/** A span in UTC with the clocks of a place behind it. */
export function spanBesideUtc(fromUtc: string, toUtc: string, zone: string | null): string {
  if (zone === null) return '';
  const from = formatLocal(fromUtc, zone);
  const to = formatLocal(toUtc, zone);
  const shown = (local: string, utc: string) =>
    local.slice(0, 10) === utc.slice(0, 10) ? local.slice(11) : local;
  const end = to.slice(0, 10) === from.slice(0, 10) ? to.slice(11) : to;
  return ` (${shown(from, fromUtc)} to ${end} in ${zone})`;
}
