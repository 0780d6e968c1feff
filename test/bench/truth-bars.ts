/** What a rate has to reach, in percent, in some scenarios. */
export interface Bar {
  readonly what: string;
  readonly scenarios: readonly string[];
  /** `aim`: to be reported, never to fail. */
  readonly kind: 'at least' | 'at most' | 'aim at least' | 'aim at most';
  readonly percent: number;
}

/** How often something happened. */
export interface Rate {
  readonly hits: number;
  readonly trials: number;
}

export function rateOf(outcomes: readonly boolean[]): Rate {
  return {hits: outcomes.filter((hit) => hit).length, trials: outcomes.length};
}

export function percentOf({hits, trials}: Rate): number {
  return (100 * hits) / trials;
}

/** Monte-Carlo standard error of a percentage; half a hit is added so that it is never zero. */
export function standardErrorPercent({hits, trials}: Rate): number {
  const share = (hits + 0.5) / (trials + 1);
  return 100 * Math.sqrt((share * (1 - share)) / trials);
}

/**
 * Whether a rate meets a bar. It fails when the one-sided 99 % binomial bound lies on the wrong
 * side: when a true rate exactly at the bar would be as bad as this less than once in a hundred
 * times.
 */
export function meets(rate: Rate, bar: Pick<Bar, 'kind' | 'percent'>): boolean {
  const share = bar.percent / 100;
  return bar.kind.endsWith('at least')
    ? binomialAtMost(rate.hits, rate.trials, share) >= 0.01
    : binomialAtMost(rate.trials - rate.hits, rate.trials, 1 - share) >= 0.01;
}

/** P(X ≤ k) of a binomial distribution, summed term by term in logarithms. */
export function binomialAtMost(k: number, n: number, p: number): number {
  if (p <= 0 || k >= n) return 1;
  if (p >= 1) return 0;
  let logarithm = n * Math.log1p(-p);
  let sum = Math.exp(logarithm);
  for (let i = 1; i <= k; i++) {
    logarithm += Math.log((n - i + 1) / i) + Math.log(p / (1 - p));
    sum += Math.exp(logarithm);
  }
  return Math.min(1, sum);
}
