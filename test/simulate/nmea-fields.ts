/** Wraps the text between `$` and `*` as a sentence with its checksum; no line end. */
export function sentence(body: string): string {
  let checksum = 0;
  for (let i = 0; i < body.length; i++) checksum ^= body.charCodeAt(i);
  return `$${body}*${checksum.toString(16).toUpperCase().padStart(2, '0')}`;
}

/** Degrees and minutes with a fixed number of decimals and the hemisphere: `4142.1234567,N`. */
export function latitudeFields(latitudeDeg: number, decimals: number): string {
  return `${degreesMinutes(latitudeDeg, 2, decimals)},${latitudeDeg < 0 ? 'S' : 'N'}`;
}

export function longitudeFields(longitudeDeg: number, decimals: number): string {
  return `${degreesMinutes(longitudeDeg, 3, decimals)},${longitudeDeg < 0 ? 'W' : 'E'}`;
}

/** Whole units of the last decimal first, so that 59.99999996 minutes carry into the degrees. */
function degreesMinutes(deg: number, degreeDigits: number, decimals: number): string {
  const perMinute = 10 ** decimals;
  const units = Math.round(Math.abs(deg) * 60 * perMinute);
  const degrees = Math.floor(units / (60 * perMinute));
  const minuteUnits = units - degrees * 60 * perMinute;
  const minutes = Math.floor(minuteUnits / perMinute);
  const fraction = String(minuteUnits - minutes * perMinute).padStart(decimals, '0');
  const digits = String(degrees).padStart(degreeDigits, '0') + String(minutes).padStart(2, '0');
  return decimals === 0 ? digits : `${digits}.${fraction}`;
}

/** A civil date in UTC. */
export interface CivilDate {
  readonly year: number;
  readonly month: number;
  readonly day: number;
}

/** Date and time of day of an instant given by a start and the seconds elapsed since then. */
export function civilTime(start: CivilDate, secondsOfDay: number) {
  const instant = new Date(
    Date.UTC(start.year, start.month - 1, start.day) + Math.round(secondsOfDay * 1000),
  );
  const text = instant.toISOString();
  return {
    /** `hhmmss.ss` */
    time: `${text.slice(11, 13)}${text.slice(14, 16)}${text.slice(17, 22)}`,
    /** `ddmmyy` */
    date: `${text.slice(8, 10)}${text.slice(5, 7)}${text.slice(2, 4)}`,
    /** `dd,mm,yyyy` */
    dateFields: `${text.slice(8, 10)},${text.slice(5, 7)},${text.slice(0, 4)}`,
    /** `2026-05-12T09:12:00.00Z` */
    iso: `${text.slice(0, 22)}Z`,
  };
}
