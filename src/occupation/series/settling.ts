import type {PerAxis} from '../result.ts';
import type {UsedColumns} from './used-columns.ts';

/** Half-width of the 95 % interval of the mean of a record that ends after this time. */
export type SettlingHalfWidth = (elapsedS: number) => PerAxis<number | null>;

/** The mean of all epochs used so far, at times that are evenly spaced in the logarithm. */
export interface Settling {
  readonly elapsedS: readonly number[];
  readonly meanM: PerAxis<readonly number[] | null>;
  /** null where no interval of the mean could be computed. */
  readonly halfWidthM: PerAxis<readonly number[] | null>;
  /** The furthest that the mean of the second half of the record's time stood from its last value. */
  readonly secondHalfM: PerAxis<number | null>;
}

const POINTS = 72;
const LEAST_EPOCHS = 10;

export function settlingOf(columns: UsedColumns, halfWidth: SettlingHalfWidth | null) {
  const {count, gpsSeconds} = columns;
  if (count < LEAST_EPOCHS) return null;
  const spanS = gpsSeconds[count - 1]! - gpsSeconds[0]!;
  const firstS = Math.max(gpsSeconds[1]! - gpsSeconds[0]!, spanS / 10_000);
  if (!(spanS > firstS) || !(firstS > 0)) return null;
  const elapsedS: number[] = [];
  const sums = {east: 0, north: 0, up: 0};
  const means = {east: [] as number[], north: [] as number[], up: [] as number[]};
  let next = 0;
  for (let i = 0; i < count; i++) {
    sums.east += columns.eastM[i]!;
    sums.north += columns.northM[i]!;
    sums.up += columns.upM[i]!;
    const elapsed = gpsSeconds[i]! - gpsSeconds[0]!;
    const due = firstS * (spanS / firstS) ** (next / (POINTS - 1));
    if (elapsed < due * (1 - 1e-9) && i < count - 1) continue;
    elapsedS.push(elapsed);
    means.east.push(sums.east / (i + 1));
    means.north.push(sums.north / (i + 1));
    means.up.push(sums.up / (i + 1));
    while (elapsed >= firstS * (spanS / firstS) ** (next / (POINTS - 1)) * (1 - 1e-9)) next++;
  }
  const widths = halfWidth === null ? [] : elapsedS.map(halfWidth);
  return {
    elapsedS,
    meanM: {...means, up: columns.hasUp ? means.up : null},
    halfWidthM: {
      east: complete(widths.map(({east}) => east)),
      north: complete(widths.map(({north}) => north)),
      up: complete(widths.map(({up}) => up)),
    },
    secondHalfM: {
      east: furthest(elapsedS, means.east),
      north: furthest(elapsedS, means.north),
      up: columns.hasUp ? furthest(elapsedS, means.up) : null,
    },
  } satisfies Settling;
}

function complete(values: readonly (number | null)[]): number[] | null {
  const known = values.filter((value) => value !== null);
  return known.length > 0 && known.length === values.length ? known : null;
}

function furthest(elapsedS: readonly number[], means: readonly number[]): number {
  const half = elapsedS[elapsedS.length - 1]! / 2;
  const last = means[means.length - 1]!;
  return Math.max(...means.map((mean, i) => (elapsedS[i]! < half ? 0 : Math.abs(mean - last))));
}
