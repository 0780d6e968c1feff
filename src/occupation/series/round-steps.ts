/** The smallest of 1, 2, 5 times a power of ten that is not below the value; value > 0. */
export function roundStepAbove(value: number): number {
  const power = 10 ** Math.floor(Math.log10(value));
  const factor = [1, 2, 5, 10].find((step) => step * power >= value * (1 - 1e-9)) ?? 10;
  return factor * power;
}

/**
 * A cell width near the wished one that holds a whole number of the steps that the log can
 * express: any other width would count two steps in one cell and one in the next, a pattern that
 * is not in the data.
 */
export function widthOfWholeSteps(wishedM: number, resolutionM: number | null): number {
  if (resolutionM === null || !(resolutionM > 0) || wishedM > 8 * resolutionM) return wishedM;
  return Math.max(1, Math.round(wishedM / resolutionM)) * resolutionM;
}

const ROUND_DURATIONS_S = [
  0.05, 0.1, 0.2, 0.5, 1, 2, 5, 10, 15, 20, 30, 60, 120, 180, 240, 360, 600, 720, 900, 1200, 1800,
  3600, 7200, 10_800, 14_400, 21_600, 43_200, 86_400,
];

/** The shortest round duration that cuts the span into at most so many bins, one interval or more. */
export function roundBinS(spanS: number, intervalS: number, bins: number): number {
  const least = Math.max(spanS / bins, intervalS);
  const round = ROUND_DURATIONS_S.find((duration) => duration >= least * (1 - 1e-9));
  return round ?? Math.ceil(least / 86_400) * 86_400;
}
