import {notTested, type Outcome, predicted} from './hypothesis.ts';
import type {DiagnosisInput} from './input.ts';
import {type Misplaced, recomputed} from './recomputed.ts';

/** How a magnitude in degrees is misread, and which true ones could have been misread to it. */
export interface Misreading {
  /** undefined: this magnitude cannot be misread so. */
  readonly misread: (degrees: number) => number | undefined;
  readonly truths: (degrees: number) => readonly number[];
}

/**
 * The offsets of a misread latitude, longitude or both; of the measured position, or of the mark,
 * whose true place is then one that reads as the mark does.
 */
export function misreadAngle(input: DiagnosisInput, reading: Misreading): Outcome {
  const {markPlan} = input;
  if (markPlan === null) return notTested('no-plan');
  const {latitudeDeg, longitudeDeg} = markPlan;
  const places: Misplaced[] = [];
  for (const side of ['measured', 'mark'] as const) {
    const alternatives = (degrees: number) =>
      side === 'measured' ? only(reading.misread(degrees)) : reading.truths(degrees);
    const latitudes = signed(latitudeDeg, alternatives).filter((value) => Math.abs(value) <= 90);
    const longitudes = signed(longitudeDeg, alternatives).filter((value) => Math.abs(value) <= 360);
    const place = (latitude: number, longitude: number, of: string): Misplaced => ({
      latitudeDeg: latitude,
      longitudeDeg: longitude,
      upM: 0,
      values: {side, of},
    });
    places.push(
      ...latitudes.map((latitude) => place(latitude, longitudeDeg, 'latitude')),
      ...longitudes.map((longitude) => place(latitudeDeg, longitude, 'longitude')),
      ...latitudes.flatMap((latitude) =>
        longitudes.map((longitude) => place(latitude, longitude, 'latitude and longitude')),
      ),
    );
  }
  return predicted(recomputed(input, places));
}

function only(value: number | undefined): readonly number[] {
  return value === undefined ? [] : [value];
}

/** Signs stand apart from the digits that are misread. */
function signed(degrees: number, alternatives: (magnitude: number) => readonly number[]): number[] {
  return alternatives(Math.abs(degrees)).map((value) => (degrees < 0 ? -value : value));
}
