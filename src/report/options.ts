import type {UnitChoice} from './units.ts';

/** What the person who hands the report over decides about it; nothing here changes a number. */
export interface ReportOptions {
  /** Instead of the name of the mark. */
  readonly title: string | null;
  readonly preparedFor: string | null;
  readonly remarks: string | null;
  /** A picture as a data URL of type image/png or image/svg+xml, already checked and cleaned. */
  readonly logoDataUrl: string | null;
  readonly units: UnitChoice;
  readonly angles: 'dms' | 'deg';
  /** Zone of the IANA database whose clock is printed beside UTC. */
  readonly timeZone: string | null;
}

export const PLAIN_REPORT: ReportOptions = {
  title: null,
  preparedFor: null,
  remarks: null,
  logoDataUrl: null,
  units: 'm',
  angles: 'deg',
  timeZone: null,
};
