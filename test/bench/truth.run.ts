import {afterAll, describe, expect, test} from 'vitest';
import {HARDER_SCENARIOS, SCENARIOS, type Scenario} from '../simulate/scenarios.ts';
import {type Bar, meets, percentOf, type Rate, rateOf, standardErrorPercent} from './truth-bars.ts';
import {AXES} from './truth-judgement.ts';
import {trueRequiredS} from './truth-required-time.ts';
import {
  drift,
  driftOfEach,
  type Signal,
  STILL,
  settling,
  step,
  stepAndDrift,
  threeSteps,
} from './truth-signals.ts';
import {
  MEAN_BARS,
  REQUIRED_TIME_BARS,
  SIGNAL_BARS,
  STEP_TIME_LIMIT_OTHERS_S,
  STEP_TIME_LIMIT_S,
  WIDTH_AIMS,
  WIDTH_LIMITS,
} from './truth-specification.ts';
import {
  type MeanSummary,
  quantileOf,
  stepTimeErrorS,
  summariseMeans,
  type Trial,
  trials,
} from './truth-trials.ts';

/*
 * The truth about the estimator, by simulation: `npm run bench:truth`. Settings come from the
 * environment: TRUTH_REPLICATES (default 500; signals get three tenths of it), TRUTH_SEED (first
 * seed), TRUTH_SCENARIOS (names by commas), TRUTH_SIGNALS (0: only occupations that stand still).
 */
const REPLICATES = Number(process.env.TRUTH_REPLICATES ?? 500);
const FIRST_SEED = Number(process.env.TRUTH_SEED ?? 1_000_000);
const ONLY = process.env.TRUTH_SCENARIOS?.split(',');
const WITH_SIGNALS = process.env.TRUTH_SIGNALS !== '0';
const SIGNAL_REPLICATES = Math.max(1, Math.round(0.3 * REPLICATES));

const SIGNALS: readonly Signal[] = [
  step(10),
  step(20),
  driftOfEach(10),
  driftOfEach(20),
  drift(10),
  drift(20),
  settling(20),
];
const JUMPING_SIGNALS: readonly Signal[] = [step(15)];
const HARDER_SIGNALS: readonly Signal[] = [threeSteps(20), stepAndDrift(20, 20)];
const HARDER_SIGNALS_IN = ['A', 'C', 'D', 'H', 'J'];

/** A bar that was not met, or an aim that was not reached. */
interface Shortfall {
  readonly scenario: string;
  readonly what: string;
  readonly measured: string;
  readonly asked: string;
}

const failed: Shortfall[] = [];
const aimsMissed: Shortfall[] = [];

function say(text: string): void {
  process.stdout.write(`${text}\n`);
}

function shown(rate: Rate): string {
  return `${percentOf(rate).toFixed(1)}±${standardErrorPercent(rate).toFixed(1)}`;
}

/** Holds the rates of a scenario against the bars that name it. */
function hold(
  scenario: Scenario,
  about: string,
  rates: ReadonlyMap<string, Rate>,
  bars: readonly Bar[],
) {
  for (const bar of bars) {
    const rate = rates.get(bar.what);
    if (rate === undefined || !bar.scenarios.includes(scenario.name) || meets(rate, bar)) continue;
    (bar.kind.startsWith('aim') ? aimsMissed : failed).push({
      scenario: scenario.name,
      what: `${about}: ${bar.what}`,
      measured: `${shown(rate)} %`,
      asked: `${bar.kind} ${bar.percent} %`,
    });
  }
}

function holdNumber(
  scenario: Scenario,
  what: string,
  value: number,
  limit: number | undefined,
  list = failed,
) {
  if (limit === undefined || value <= limit) return;
  list.push({
    scenario: scenario.name,
    what,
    measured: value.toFixed(2),
    asked: `at most ${limit}`,
  });
}

function meanRates(all: readonly Trial[], summary: MeanSummary): Map<string, Rate> {
  const rates = new Map<string, Rate>();
  for (const axis of AXES) {
    rates.set(`coverage ${axis}`, rateOf(summary.holds[axis]));
    const drifting = all.map(({judgement}) => judgement.driftP[axis] < 0.05);
    rates.set(`drift ${axis} p < 5 %`, rateOf(drifting));
  }
  rates.set('ellipse', rateOf(summary.ellipseHolds));
  rates.set('warning', rateOf(summary.slow));
  rates.set('few looks', rateOf(summary.fewLooks));
  rates.set('one position', rateOf(all.map(({judgement}) => !judgement.material)));
  return addMovementRates(rates, all);
}

function addMovementRates(rates: Map<string, Rate>, all: readonly Trial[]): Map<string, Rate> {
  rates.set('step found', rateOf(all.map(({judgement}) => judgement.stepFound)));
  for (const verdict of ['still', 'stepped', 'drifting', 'settling'] as const) {
    rates.set(
      `verdict ${verdict}`,
      rateOf(all.map(({judgement}) => judgement.verdict === verdict)),
    );
  }
  const found = all.flatMap(({judgement}) => AXES.map((axis) => judgement.driftP[axis] < 0.05));
  rates.set('drift found', rateOf(found));
  rates.set('material step', rateOf(all.map(({judgement}) => judgement.material)));
  return rates;
}

function verdictsOf(rates: ReadonlyMap<string, Rate>): string {
  return ['still', 'stepped', 'drifting', 'settling']
    .map((verdict) => percentOf(rates.get(`verdict ${verdict}`)!).toFixed(0))
    .join('/');
}

function stillExperiment(scenario: Scenario): MeanSummary {
  const all = trials(scenario, STILL, REPLICATES, FIRST_SEED);
  const summary = summariseMeans(all);
  const rates = meanRates(all, summary);
  const cell = (what: string) => shown(rates.get(what)!);
  const millimetres = AXES.map((axis) => (1000 * summary.oracleM[axis]).toFixed(2)).join('/');
  const widths = AXES.map((axis) => summary.widthMedian[axis].toFixed(2)).join('/');
  const wide = AXES.map((axis) => summary.widthP90[axis].toFixed(2)).join('/');
  say(`\n${scenario.name}: ${scenario.about} (${REPLICATES} replicates from seed ${FIRST_SEED})`);
  say(`  coverage E/N/U %   ${AXES.map((axis) => cell(`coverage ${axis}`)).join('  ')}`);
  say(`  ellipse %          ${cell('ellipse')}`);
  say(`  oracle E/N/U mm    ${millimetres}`);
  say(`  width E/N/U        median ${widths}, p90 ${wide}`);
  say(`  warning %          ${cell('warning')}; fewer than 4 looks ${cell('few looks')}`);
  say(`  drift p<5 % E/N/U  ${AXES.map((axis) => cell(`drift ${axis} p < 5 %`)).join('  ')}`);
  say(`  step found %       ${cell('step found')}; one position ${cell('one position')}`);
  say(`  verdicts %         ${verdictsOf(rates)} (still/stepped/drifting/settling)`);
  hold(scenario, 'nothing happens', rates, MEAN_BARS);
  const limit = WIDTH_LIMITS[scenario.name];
  const upLimit = limit === undefined ? undefined : 1.7 * limit;
  holdNumber(scenario, 'median width east', summary.widthMedian.east, limit);
  holdNumber(scenario, 'median width north', summary.widthMedian.north, limit);
  holdNumber(scenario, 'median width up', summary.widthMedian.up, upLimit);
  const plan = Math.max(summary.widthMedian.east, summary.widthMedian.north);
  holdNumber(scenario, 'median width in plan', plan, WIDTH_AIMS[scenario.name], aimsMissed);
  return summary;
}

function signalExperiment(scenario: Scenario, signal: Signal): void {
  // Seeds of signals lie apart from those of the still experiment.
  const all = trials(scenario, signal, SIGNAL_REPLICATES, FIRST_SEED + 500_000);
  const rates = addMovementRates(new Map(), all);
  const errors = all.map(stepTimeErrorS).filter(Number.isFinite);
  const median = quantileOf(errors, 0.5);
  const times = signal.name.startsWith('step')
    ? `; time error median ${median.toFixed(1)} s, p90 ${quantileOf(errors, 0.9).toFixed(1)} s`
    : '';
  const counts = all.map(({judgement}) => judgement.steps.length);
  const meanCount = counts.reduce((sum, count) => sum + count, 0) / counts.length;
  say(
    `  ${signal.name.padEnd(24)} step found ${shown(rates.get('step found')!)}, material ${shown(rates.get('material step')!)}, ` +
      `drift found ${shown(rates.get('drift found')!)}, verdicts ${verdictsOf(rates)}, ` +
      `steps ${meanCount.toFixed(2)}${times}`,
  );
  hold(scenario, signal.name, rates, SIGNAL_BARS[signal.name] ?? []);
  if (signal.name === 'step 20 mm' && scenario.name !== 'I' && scenario.name !== 'P') {
    const limit = STEP_TIME_LIMIT_S[scenario.name] ?? STEP_TIME_LIMIT_OTHERS_S;
    holdNumber(scenario, `${signal.name}: median time error`, median, limit);
  }
}

function requiredTimeExperiment(scenario: Scenario, summary: MeanSummary): void {
  const bars = REQUIRED_TIME_BARS.filter((bar) => bar.scenarios.includes(scenario.name));
  if (bars.length === 0) return;
  for (const factor of [1.5, 0.7]) {
    const targetM = factor * summary.oracleM.east;
    const trueS = trueRequiredS(scenario.noise.east, scenario.intervalS, targetM);
    const said = trials(scenario, STILL, SIGNAL_REPLICATES, FIRST_SEED + 800_000).map(
      ({judgement}) => judgement.requiredS(targetM),
    );
    const told = said.filter(({median}) => Number.isFinite(median));
    const ratios = told.map(({median}) => median / trueS);
    const within = rateOf(ratios.map((ratio) => ratio >= 0.5 && ratio <= 2));
    const allowed = rateOf(told.map(({allow}) => allow >= trueS));
    if (told.length === 0) {
      say(`  required time for ${(1000 * targetM).toFixed(2)} mm: never told`);
      continue;
    }
    say(
      `  required time for ${(1000 * targetM).toFixed(2)} mm: true ${trueS.toFixed(0)} s, told in ${told.length} of ${said.length}, ` +
        `ratio median ${quantileOf(ratios, 0.5).toFixed(2)}, within factor 2 ${shown(within)}, allowance enough ${shown(allowed)}`,
    );
    hold(
      scenario,
      `required time, ${factor} of oracle`,
      new Map([['within factor 2', within]]),
      bars,
    );
  }
}

describe('the truth', () => {
  const all = [...SCENARIOS, ...HARDER_SCENARIOS];
  const chosen = all.filter(({name}) => ONLY === undefined || ONLY.includes(name));
  test.each(chosen.map((scenario) => [scenario.name, scenario] as const))('%s', (_, scenario) => {
    const summary = stillExperiment(scenario);
    requiredTimeExperiment(scenario, summary);
    if (!WITH_SIGNALS) return;
    const specified = SCENARIOS.includes(scenario) && scenario.resolution === undefined;
    const signals = [
      ...(specified ? SIGNALS : []),
      ...(scenario.name === 'F30' ? JUMPING_SIGNALS : []),
      ...(HARDER_SIGNALS_IN.includes(scenario.name) ? HARDER_SIGNALS : []),
    ];
    for (const signal of signals) signalExperiment(scenario, signal);
  });

  test('every bar is met', () => {
    expect(failed).toEqual([]);
  });

  afterAll(() => {
    const line = ({scenario, what, measured, asked}: Shortfall) =>
      `  ${scenario}  ${what}: ${measured}, asked ${asked}`;
    say(`\nBars not met (one-sided 99 % binomial bound): ${failed.length}`);
    for (const shortfall of failed) say(line(shortfall));
    say(`Aims not reached: ${aimsMissed.length}`);
    for (const shortfall of aimsMissed) say(line(shortfall));
  });
});
