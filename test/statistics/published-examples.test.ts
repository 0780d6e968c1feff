import {describe, expect, test} from 'vitest';
import {autocorrelationOf} from '../../src/occupation/series/autocorrelation.ts';
import {
  principalDeviations,
  probabilityInCircle,
  r95,
  sep,
} from '../../src/statistics/accuracy-measures.ts';
import {
  chiSquareCdf,
  chiSquareTail,
  normalCdf,
  normalQuantile,
} from '../../src/statistics/distribution.ts';
import {fitModels, type ModelFit} from '../../src/statistics/model-fits.ts';
import {moments} from '../../src/statistics/moments.ts';
import {median, quantiles} from '../../src/statistics/quantile.ts';
import {slopes} from '../../src/statistics/slope.ts';
import type {TimeCells} from '../../src/statistics/time-cells.ts';
import {readReference} from '../reference/read.ts';

interface Series {
  readonly series: string;
  readonly n: number;
  readonly acf: Readonly<Record<string, string>>;
  readonly ljung_box: Readonly<Record<string, {readonly Q: string; readonly p: string}>>;
  readonly median: string;
  readonly mad_raw: string;
  readonly iqr_linear: string;
}
interface Trend {
  readonly series: string;
  readonly Z: string;
  readonly p: string;
  readonly ols: {readonly slope: string; readonly se_slope: string; readonly p: string};
}
interface WeightedMean {
  readonly values: readonly string[];
  readonly sigmas: readonly string[];
  readonly result: {readonly mean: string; readonly external_sigma: string};
}
interface Power {
  readonly alpha0: string;
  readonly power: string;
  readonly critical_w: string;
  readonly delta0: string;
}
interface Examples {
  readonly grubbs: {
    readonly data: readonly string[];
    readonly published: {readonly G: string};
    readonly recomputed: {readonly mean: string; readonly sd: string};
  };
  readonly outlier_worked: {
    readonly observations: readonly number[];
    readonly mean: string;
    readonly s: string;
  };
  readonly mann_kendall: {readonly recomputed: {readonly Z: string; readonly p_two_sided: string}};
  readonly trend_on_nist_series: readonly Trend[];
  readonly normality_and_correlation: readonly Series[];
  readonly effective_sample_size: {
    readonly rows: readonly {readonly series: string; readonly naive_se: string}[];
  };
  readonly weighted_mean: readonly WeightedMean[];
  readonly baarda: readonly Power[];
}
interface Strd {
  readonly univariate: readonly {readonly name: string; readonly data: readonly string[]}[];
}

const examples = readReference<Examples>('b5_examples');
const strd = readReference<Strd>('b1_nist_strd').univariate;

/** Values recomputed by the source to 12 digits. */
const TWELVE_DIGITS = 1e-11;

function near(found: number, exact: string, bound = TWELVE_DIGITS): void {
  const size = Math.abs(Number(exact));
  expect(Math.abs(found - Number(exact))).toBeLessThanOrEqual(bound * (size === 0 ? 1 : size));
}

function dataOf(name: string): Float64Array {
  const found = strd.find((one) => one.name === name);
  if (found === undefined) throw new Error(`no data of ${name}`);
  return Float64Array.from(found.data, Number);
}

/** One value a cell; counts are weights. */
function cellsOf(values: Float64Array, counts = values.map(() => 1)): TimeCells {
  const index = Int32Array.from(values.keys());
  const m = values.length;
  return {widthS: 1, spanS: m, index, counts, means: [values], expected: m};
}

/** The fit by white noise alone: ordinary, or weighted, least squares. */
function whiteFit(cells: TimeCells): ModelFit {
  const white = fitModels(cells).filter(({model}) => model.whiteShare === 1);
  expect(white).toHaveLength(1);
  return white[0]!;
}

const CIRCLE = {eastEast: 1, northNorth: 1, eastNorth: 0};

const nistSeries = examples.normality_and_correlation.filter(({series}) =>
  strd.some(({name}) => name === series),
);

test('four NIST series have examples', () => {
  expect(nistSeries.map(({series}) => series)).toEqual(['Lew', 'Lottery', 'Mavro', 'Michelso']);
});

describe('reference: robust measures of the NIST series, by scipy', () => {
  test.each(nistSeries)('$series: median, median absolute deviation, quartiles', (row) => {
    const values = dataOf(row.series);
    const centre = median(values);
    near(centre, row.median);
    near(median(values.map((value) => Math.abs(value - centre))), row.mad_raw, 1e-9);
    const [lower, upper] = quantiles(values, [0.25, 0.75]);
    near(upper! - lower!, row.iqr_linear, 1e-9);
  });
});

describe('reference: serial correlation of the NIST series, by statsmodels', () => {
  test.each(nistSeries)('$series: autocorrelation', ({series, n, acf}) => {
    const values = dataOf(series);
    const gpsSeconds = Float64Array.from(values.keys());
    const columns = {
      count: n,
      gpsSeconds,
      eastM: values,
      northM: values,
      upM: values,
      hasUp: false,
    };
    const found = autocorrelationOf(columns, 1);
    let compared = 0;
    for (const [lag, exact] of Object.entries(acf)) {
      const at = found!.lagS.indexOf(Number(lag));
      if (at < 0) continue;
      // Theirs divides the sum of n − k products by n and the squares by n; ours by n − k and n − 1.
      const ours = (found!.value.east![at]! * (n - Number(lag))) / (n - 1);
      near(ours, exact, 1e-10);
      compared++;
    }
    expect(compared).toBeGreaterThanOrEqual(4);
  });

  test.each(nistSeries)('$series: tail probabilities of Ljung & Box', ({ljung_box}) => {
    // Q is printed to 12 digits, p to 8: far tails cannot agree better.
    for (const [lags, {Q, p}] of Object.entries(ljung_box)) {
      near(chiSquareTail(Number(Q), Number(lags)), p, 1e-7);
    }
  });
});

describe('reference: a line through the NIST series, ordinary least squares', () => {
  test.each(examples.trend_on_nist_series)('$series', ({series, ols}) => {
    const cells = cellsOf(dataOf(series));
    const [slope] = slopes(cells, [whiteFit(cells)], 'none');
    near(slope!.perCell, ols.slope);
    near(slope!.pValue, ols.p, 1e-9);
  });

  test.each(examples.trend_on_nist_series)('$series: two-sided normal probability', ({Z, p}) => {
    near(2 * normalCdf(-Math.abs(Number(Z))), p, 1e-10);
  });

  test('EPA QA/G-9S (2006), p. 109: Z = 1.685', () => {
    const {Z, p_two_sided} = examples.mann_kendall.recomputed;
    near(2 * normalCdf(-Number(Z)), p_two_sided, 1e-10);
  });
});

describe('reference: means', () => {
  test.each(examples.effective_sample_size.rows)(
    '$series: standard error of independent values',
    ({series, naive_se}) => {
      const [fit] = whiteFit(cellsOf(dataOf(series))).components;
      near(fit!.standardError, naive_se);
    },
  );

  test.each(examples.weighted_mean)(
    'weighted mean of $values with deviations $sigmas, Taylor section 7.3 (from memory) first',
    ({values, sigmas, result}) => {
      // White noise in cells of n epochs has the variance 1/n: counts are the weights.
      const weights = Float64Array.from(sigmas, (sigma) => Number(sigma) ** -2);
      const [fit] = whiteFit(cellsOf(Float64Array.from(values, Number), weights)).components;
      near(fit!.mean, result.mean, 1e-13);
      near(fit!.standardError, result.external_sigma, 1e-9);
    },
  );

  test('uranium isotopes of Tietjen & Moore, e-Handbook section 1.3.5.17.1', () => {
    const {data, published, recomputed} = examples.grubbs;
    const values = Float64Array.from(data, Number);
    const {mean, standardDeviation} = moments(values)!;
    near(mean, recomputed.mean);
    near(standardDeviation!, recomputed.sd);
    near((Math.max(...values) - mean) / standardDeviation!, published.G, 5e-7);
  });

  test('eight readings of one length', () => {
    const {observations, mean, s} = examples.outlier_worked;
    const found = moments(Float64Array.from(observations))!;
    near(found.mean, mean);
    near(found.standardDeviation!, s);
  });
});

describe('reference: Baarda (1968), critical value and shift of a test by its power', () => {
  test.each(examples.baarda)('α $alpha0, power $power', ({alpha0, power, critical_w, delta0}) => {
    const critical = normalQuantile(1 - Number(alpha0) / 2);
    near(critical, critical_w, 1e-9);
    near(critical + normalQuantile(Number(power)), delta0, 1e-9);
  });
});

describe('reference: an offset in a circle, by the distribution of Rice (1945)', () => {
  /** Noncentral chi-square with two degrees of freedom as its Poisson sum (Patnaik 1949). */
  const rice = (radius: number, offset: number) => {
    const half = (offset * offset) / 2;
    let weight = Math.exp(-half);
    let sum = 0;
    for (let j = 0; j < 400; j++) {
      sum += weight * chiSquareCdf(radius * radius, 2 + 2 * j);
      weight *= half / (j + 1);
    }
    return sum;
  };

  test('without an offset it is Rayleigh: 1 − exp(−r²/2)', () => {
    for (const radius of [0.01, 0.5, 1, 2, 4]) {
      expect(probabilityInCircle({radius, east: 0, north: 0, covariance: CIRCLE})).toBeCloseTo(
        -Math.expm1((-radius * radius) / 2),
        10,
      );
    }
  });

  test.each([
    [1, 0.5],
    [2, 2],
    [0.3, 3],
    [6, 5],
    [12, 10],
    [10, 12],
  ])('radius %f, offset %f deviations', (radius, offset) => {
    for (const bearing of [0, 0.7, 2.9]) {
      const [east, north] = [offset * Math.sin(bearing), offset * Math.cos(bearing)];
      const found = probabilityInCircle({radius, east, north, covariance: CIRCLE});
      expect(Math.abs(found - rice(radius, offset))).toBeLessThanOrEqual(1e-10);
    }
  });
});

describe('reference: axes of a covariance in space', () => {
  test.each([
    [
      'second differences: 2 − 2 cos(kπ/4)',
      [
        [2, -1, 0],
        [-1, 2, -1],
        [0, -1, 2],
      ],
      [2 + Math.SQRT2, 2, 2 - Math.SQRT2],
    ],
    [
      'equal correlations: 1 + 2ρ and 1 − ρ',
      [
        [2, 1, 1],
        [1, 2, 1],
        [1, 1, 2],
      ],
      [4, 1, 1],
    ],
  ])('%s', (_, matrix, variances) => {
    const found = principalDeviations(matrix);
    variances.forEach((variance, i) => {
      expect(found[i]!).toBeCloseTo(Math.sqrt(variance), 13);
    });
  });

  test('GeodePy tests (Geoscience Australia), commit 00bd983: the same in XYZ and in ENU', () => {
    const xyz = [
      [1.44, -1.32, 1.32],
      [-1.32, 1.22, -1.2],
      [1.32, -1.2, 1.2],
    ];
    const enu = [
      [2.23971834, -1.86955194, 0.3599339],
      [-1.86955194, 1.55096504, -0.29615085],
      [0.3599339, -0.29615085, 0.06931662],
    ];
    const [inXyz, inEnu] = [principalDeviations(xyz), principalDeviations(enu)];
    // Eight decimals are printed; the smallest variance is zero but for them.
    inXyz.forEach((deviation, i) => {
      expect(deviation ** 2).toBeCloseTo(inEnu[i]! ** 2, 7);
    });
    expect(sep(enu) / sep(xyz)).toBeCloseTo(1, 7);
  });
});

test('property: a thin ellipse in a circle comes close to a line', () => {
  const line = {east: 0.3, north: 0.2, radius: 1};
  const exact = normalCdf(Math.sqrt(1 - 0.04) - 0.3) - normalCdf(-Math.sqrt(1 - 0.04) - 0.3);
  for (const thin of [1e-4, 1e-6, 1e-8]) {
    const covariance = {eastEast: 1, northNorth: thin * thin, eastNorth: 0};
    expect(Math.abs(probabilityInCircle({...line, covariance}) - exact)).toBeLessThanOrEqual(
      thin * thin + 1e-10,
    );
    expect(r95(covariance)).toBeCloseTo(normalQuantile(0.975), 7);
  }
});
