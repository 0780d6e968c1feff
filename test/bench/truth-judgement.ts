/** One number for each of east, north and up. */
export interface Axes {
  readonly east: number;
  readonly north: number;
  readonly up: number;
}

export const AXES = ['east', 'north', 'up'] as const;

/** The answers of the estimator that can be held against the truth; metres and seconds. */
export interface Judgement {
  readonly meanM: Axes;
  /** 95 % half-width; NaN where no number is printed. */
  readonly halfWidthM: Axes;
  /** Whether the truth lies within the 95 % ellipse about the mean. */
  readonly ellipseHolds: boolean;
  /** The warning that the record is not longer than its errors. */
  readonly slow: boolean;
  readonly fewLooks: boolean;
  /** Two-sided p-value of a drift of each component. */
  readonly driftP: Axes;
  readonly stepFound: boolean;
  readonly steps: readonly {readonly atS: number; readonly horizontalM: number}[];
  readonly material: boolean;
  readonly verdict: 'still' | 'stepped' | 'drifting' | 'settling' | 'cannot tell';
  /** Seconds until the half-width east reaches a target; NaN when it cannot be told. */
  readonly requiredS: (targetM: number) => {readonly median: number; readonly allow: number};
}
