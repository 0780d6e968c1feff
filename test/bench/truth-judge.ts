import {GRS80} from '../../src/geodesy/ellipsoid.ts';
import {type EnuColumns, localFrame} from '../../src/geodesy/local.ts';
import {sessionOf} from '../../src/occupation/session.ts';
import {stabilityOf} from '../../src/occupation/stability.ts';
import {analyseSession} from '../../src/statistics/analyse-session.ts';
import {blockMedianScreen} from '../../src/statistics/robust.ts';
import type {SessionAnalysis} from '../../src/statistics/session-analysis.ts';
import type {SimulatedOccupation} from '../simulate/occupation.ts';
import type {Scenario} from '../simulate/scenarios.ts';
import {AXES, type Axes, type Judgement} from './truth-judgement.ts';

const SLOW = 0.5;
const FEW_LOOKS = 4;
/** √χ²₂(95 %). */
const ELLIPSE_95 = 2.447746830680816;
const NORMAL_95 = 1.959963984540054;

/** Screens and analyses one occupation as the tool does, and keeps what the truth is held against. */
export function judge(occupation: SimulatedOccupation, scenario: Scenario): Judgement {
  const resolutions = resolutionsOf(scenario);
  const all = AXES.map((axis) => occupation[`${axis}M`]);
  const rejected = blockMedianScreen({
    elapsedS: occupation.elapsedS,
    components: all,
    resolutions,
  });
  const kept = (column: Float64Array) => column.filter((_, i) => rejected[i] === 0);
  const analysis = analyseSession({
    elapsedS: kept(occupation.elapsedS),
    components: all.map(kept),
    resolutions,
  });
  const {components, steps} = analysis;
  const halfWidthM = perAxis((c) => halfWidthOf(analysis, c));
  const meanM = perAxis((c) => components[c]!.mean);
  return {
    meanM,
    halfWidthM,
    ellipseHolds: truthInsideEllipse(analysis, {meanM, halfWidthM}),
    slow: analysis.slowProbability > SLOW,
    fewLooks: components.some(({independentLooks}) => (independentLooks ?? 0) < FEW_LOOKS),
    driftP: perAxis((c) => components[c]!.drift?.pValue ?? 1),
    stepFound: steps.length > 0,
    steps: steps.map(({elapsedS, sizes}) => ({
      atS: elapsedS,
      horizontalM: Math.hypot(sizes[0] ?? 0, sizes[1] ?? 0),
    })),
    material:
      steps.length > 0 &&
      isMaterial(
        kept(occupation.elapsedS),
        {eastM: kept(occupation.eastM), northM: kept(occupation.northM), upM: kept(occupation.upM)},
        scenario,
      ),
    verdict: verdictOf(analysis),
    requiredS: requiredBy(analysis),
  };
}

/** By itself, so that what is kept of a trial holds its fits and not its epochs. */
function requiredBy({requiredTime}: SessionAnalysis): Judgement['requiredS'] {
  return (targetM) => {
    const time = requiredTime(0, targetM);
    return {median: time?.aboutS ?? Number.NaN, allow: time?.allowS ?? Number.NaN};
  };
}

function resolutionsOf({resolution}: Scenario): number[] {
  return resolution === undefined
    ? [0, 0, 0]
    : [resolution.eastM, resolution.northM, resolution.upM];
}

function perAxis(value: (component: number) => number): Axes {
  return {east: value(0), north: value(1), up: value(2)};
}

function halfWidthOf({components}: SessionAnalysis, component: number): number {
  const {halfWidth95, quantisation95} = components[component]!;
  return (halfWidth95 ?? Number.NaN) + quantisation95;
}

/** Whether the 95 % ellipse about the mean holds the truth, which stands at zero. */
function truthInsideEllipse(
  {planCorrelation: c}: SessionAnalysis,
  {meanM, halfWidthM}: Pick<Judgement, 'meanM' | 'halfWidthM'>,
): boolean {
  const e = meanM.east / halfWidthM.east;
  const n = meanM.north / halfWidthM.north;
  return e * e - 2 * c * e * n + n * n <= (1 - c * c) * (ELLIPSE_95 / NORMAL_95) ** 2;
}

/** Whether any step matters by the default limit, as the tool decides it. */
function isMaterial(elapsedS: Float64Array, columns: EnuColumns, scenario: Scenario): boolean {
  const [east, north, up] = resolutionsOf(scenario);
  const session = sessionOf(
    elapsedS,
    {...columns, heightKind: 'ellipsoidal', frame: ANYWHERE},
    Uint32Array.from(elapsedS.keys()),
    {east: east ?? null, north: north ?? null, up: up ?? null},
  );
  const stability = stabilityOf(session, {statedM: null, asked: []}, () => []);
  return stability.steps.some(({material}) => material);
}

const ANYWHERE = localFrame({latitudeDeg: 45, longitudeDeg: 0, ellipsoidalHeightM: 0}, GRS80);

const VERDICTS = {
  none: 'still',
  step: 'stepped',
  drift: 'drifting',
  settling: 'settling',
  'cannot tell': 'cannot tell',
} as const;

function verdictOf({movement}: SessionAnalysis): Judgement['verdict'] {
  return VERDICTS[movement];
}
