/** Covariance of east, north and up in m², row by row; NaN in the row of a height not known. */
export type CovarianceM2 = readonly (readonly number[])[];

/** The horizontal part, in the names that the accuracy measures use. */
export function planeOf(covarianceM2: CovarianceM2) {
  return {
    eastEast: covarianceM2[0]![0]!,
    eastNorth: covarianceM2[0]![1]!,
    northNorth: covarianceM2[1]![1]!,
  };
}

/** Sum of two covariances; one that is not known counts as zero. */
export function covarianceSum(one: CovarianceM2, other: CovarianceM2 | null): CovarianceM2 {
  return one.map((row, i) => row.map((value, j) => value + (other?.[i]?.[j] ?? 0)));
}

/** The covariance with variances added per axis. */
export function withVariances(
  covarianceM2: CovarianceM2,
  addedM2: readonly number[],
): CovarianceM2 {
  return covarianceM2.map((row, i) =>
    row.map((value, j) => (i === j ? value + addedM2[i]! : value)),
  );
}
