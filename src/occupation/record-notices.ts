import {leapSecondsKnownAt} from '../time/gps-time.ts';
import {LEAP_SECONDS_SOURCE} from '../time/leap-seconds.ts';
import type {NoticeList} from './notices.ts';
import type {OutOfReach} from './reach.ts';
import type {ReduceRequest} from './request.ts';
import type {
  BudgetRow,
  Comparison,
  Decision,
  PerAxis,
  Requirement,
  Result,
  Step,
} from './result.ts';
import type {ScreenOutcome} from './screen.ts';
import type {Session} from './session.ts';

/*
 * Which facts of a finished reduction the user must be told, as codes with values. The sentences
 * are made elsewhere from the same codes.
 */

/** A record of which more than this share is far from its neighbours is not clean. */
const CLEAN_SHARE = 0.1;

/** What reading found, before anything is computed. */
export function noticeRecord({log}: ReduceRequest, notices: NoticeList): void {
  for (const {severity, code, values} of log.findings) notices.add(severity, code, [], values);
  noticeLeapSeconds(log, notices);
}

/** GPS time was turned into UTC: by which table, and whether it reaches as far as the record. */
function noticeLeapSeconds({timeScale, epochs}: ReduceRequest['log'], notices: NoticeList): void {
  if (timeScale !== 'gps' || epochs.count === 0) return;
  const known = leapSecondsKnownAt(epochs.gpsSeconds[epochs.count - 1]!);
  notices.add(
    known ? 'note' : 'caution',
    known ? 'leap-seconds-used' : 'leap-seconds-expired',
    [],
    {
      source: LEAP_SECONDS_SOURCE,
    },
  );
}

export function noticeScreening(
  {epochs, screening, position}: Result,
  {fixClassKept, fixClassShare}: ScreenOutcome,
  notices: NoticeList,
): void {
  if (fixClassKept !== null && fixClassShare < 0.5) {
    notices.add('caution', 'fix-class-minority', ['epochs.screened'], {
      fixClass: fixClassKept,
      share: fixClassShare,
    });
  }
  if (fixClassKept === 'unknown') notices.add('note', 'fix-class-unknown', ['budget']);
  const gross = epochs.screened['far from its neighbours'] ?? 0;
  if (gross > CLEAN_SHARE * (gross + epochs.used)) {
    notices.add('caution', 'record-not-clean', ['epochs.screened'], {
      share: gross / (gross + epochs.used),
    });
  }
  const moved = screening.withoutScreening?.offsetFromResultM;
  const limit = position?.uncertainty95M;
  if (
    moved &&
    limit &&
    (beyond(moved, limit, 'east') || beyond(moved, limit, 'north') || beyond(moved, limit, 'up'))
  ) {
    notices.add('caution', 'screening-moves-mean', ['screening.withoutScreening'], {
      horizontalM: Math.hypot(moved.east ?? 0, moved.north ?? 0),
      upM: moved.up,
    });
  }
}

function beyond(
  moved: PerAxis<number | null>,
  limit: PerAxis<number | null>,
  axis: keyof PerAxis,
): boolean {
  return Math.abs(moved[axis] ?? 0) > (limit[axis] ?? Number.POSITIVE_INFINITY);
}

/** The receiver's own sigmas and the observed scatter differ when their ratio leaves this range. */
const SIGMA_RATIO = 2;
/** Receivers that smooth at rest change by less than this part of their scatter per epoch. */
const SMOOTH_STEP_SHARE = 0.05;

/** Whether the receiver's account of its own errors fits what its positions do. */
export function noticeReceiver(
  {scatter, screening, epochs}: Result,
  typicalStepM: PerAxis<number | null>,
  notices: NoticeList,
): void {
  const observed = scatter?.aboutMean.observed.standardDeviationM;
  if (!observed) return;
  const stated = screening.receiverSigmaM;
  const ratio = planRatio(observed, stated);
  if (ratio !== null && (ratio > SIGMA_RATIO || ratio < 1 / SIGMA_RATIO)) {
    notices.add(
      ratio > 1 ? 'caution' : 'note',
      'receiver-sigma-differs',
      ['screening.receiverSigmaM'],
      {
        ratio,
        observedM: Math.hypot(observed.east ?? 0, observed.north ?? 0),
        statedM: Math.hypot(stated?.east ?? 0, stated?.north ?? 0),
      },
    );
  }
  const smooth = (['east', 'north'] as const).every((axis) => {
    const [step, spread] = [typicalStepM[axis], observed[axis]];
    // Coarse digits repeat a position too; that is another finding.
    const digits = epochs.resolutionM[axis] ?? 0;
    return spread !== null && Math.max(step ?? spread, digits) < SMOOTH_STEP_SHARE * spread;
  });
  if (smooth) notices.add('caution', 'output-smoothed', ['position.independentLooks']);
}

function planRatio(
  observed: PerAxis<number | null>,
  stated: PerAxis<number | null> | null,
): number | null {
  const statedM = Math.hypot(stated?.east ?? 0, stated?.north ?? 0);
  return statedM > 0 ? Math.hypot(observed.east ?? 0, observed.north ?? 0) / statedM : null;
}

/** What limits the uncertainty, and which contributions nobody gave. */
export function noticeBudget({budget, position}: Result, notices: NoticeList): void {
  const missing = (source: string) =>
    budget.some((row) => row.source === source && row.standardUncertaintyM === null);
  if (missing('base or network')) notices.add('caution', 'base-not-included', ['budget']);
  if (missing('centring over the mark')) notices.add('note', 'centring-not-included', ['budget']);
  const service = budget.find((row) => row.source === 'positioning service');
  if (service !== undefined && position?.uncertainty95M) {
    notices.add('caution', 'service-included', ['position.uncertainty95M'], serviceValues(service));
  }
}

function serviceValues({standardUncertaintyM, from}: BudgetRow) {
  return {eastM: standardUncertaintyM?.east ?? null, upM: standardUncertaintyM?.up ?? null, from};
}

export function noticeStability({stability, epochs}: Result, notices: NoticeList): void {
  const material = stability.steps.filter((step) => step.material);
  for (const step of material)
    notices.add('concern', 'step-material', ['position'], stepValues(step));
  const small = stability.steps.filter((step) => !step.material);
  if (small.length > 0) {
    const largest = small.reduce((a, b) => (sizeM(b) > sizeM(a) ? b : a));
    notices.add('note', 'steps-small', ['stability.steps'], {
      count: small.length,
      ...stepValues(largest),
    });
  }
  const {east, north, up} = stability.drift;
  if (stability.verdict === 'drifting') {
    notices.add('concern', 'drift-material', ['stability.drift'], {
      eastMPerHour: east?.material === true ? east.rateMPerHour : null,
      northMPerHour: north?.material === true ? north.rateMPerHour : null,
      upMPerHour: up?.material === true ? up.rateMPerHour : null,
    });
  }
  const {settling} = stability;
  if (settling !== null) {
    const values = {
      timeConstantS: settling.timeConstantS,
      sizeM: Math.hypot(settling.eastM, settling.northM, settling.upM ?? 0),
    };
    const code = settling.material ? 'settling-material' : 'settling-small';
    notices.add(settling.material ? 'concern' : 'note', code, ['stability.settling'], values);
  }
  if (epochs.gaps.length > 0) {
    const longest = epochs.gaps.reduce((a, b) => (b.durationS > a.durationS ? b : a));
    notices.add('note', 'gaps', ['epochs.gaps'], {
      count: epochs.gaps.length,
      longestS: longest.durationS,
      fromUtc: longest.fromUtc,
    });
  }
}

function sizeM({eastM, northM, upM}: Step): number {
  return Math.hypot(eastM, northM, upM ?? 0);
}

function stepValues(step: Step) {
  return {
    utc: step.utc,
    sizeM: sizeM(step),
    eastM: step.eastM,
    northM: step.northM,
    upM: step.upM,
    beside: step.beside.length === 0 ? null : step.beside.join(', '),
  };
}

/** Where the uncertainty of the mean stands in the result. */
const UNCERTAINTY = [
  'standardUncertaintyM',
  'uncertainty95M',
  'ellipse95',
  'covarianceEnuM2',
  'independentLooks',
  'correlationTimeS',
].flatMap((name) => [`position.${name}`, `segments[].position.${name}`]);

/** What limits the interval of the mean: each reason once, with the axes that it touches. */
export function noticeSession(sessions: readonly Session[], notices: NoticeList): void {
  const axesOf = new Map<string, Set<string>>();
  for (const {code, axes} of sessions.flatMap(({limits}) => limits)) {
    const known = axesOf.get(code) ?? new Set<string>();
    for (const axis of axes) known.add(axis);
    axesOf.set(code, known);
  }
  for (const [code, axes] of axesOf) {
    notices.add('caution', code, UNCERTAINTY, {axes: [...axes].join(', ')});
  }
}

export function noticeComparison(
  {comparison, segments, reference, command}: Result,
  {asked: allAsked}: ReduceRequest,
  outOfReach: readonly OutOfReach[],
  coordinatesDiffer: readonly string[],
  notices: NoticeList,
): void {
  if (command !== 'check') return;
  if (comparison === null) {
    if (segments.length > 1) {
      notices.add('caution', 'segments-not-compared', ['comparison'], {
        mark: reference?.name ?? null,
        segments: segments.length,
      });
    }
    return;
  }
  for (const assumption of comparison.assumptions) {
    notices.add('caution', 'assumed', ['comparison.assumptions'], {
      assumption,
      mark: comparison.mark,
    });
  }
  if (allAsked.length === 0) notices.add('caution', 'no-tolerance', ['comparison.requirements']);
  for (const {asked, needed} of outOfReach) {
    const told = typeof needed === 'object';
    notices.add('caution', 'tolerance-out-of-reach', ['comparison.requirements'], {
      of: asked.of,
      toleranceM: asked.toleranceM,
      record: told ? 'longer' : needed,
      aboutS: told ? needed.aboutS : null,
      allowS: told ? needed.allowS : null,
    });
  }
  noticeAgreement(comparison, notices);
  noticeOtherSetups(comparison, notices);
  for (const name of coordinatesDiffer) {
    notices.add('caution', 'setup-with-other-coordinates', [], {name, mark: comparison.mark});
  }
}

/** What the decision and the agreement say together: one of six sentences, or why only one says. */
function noticeAgreement(
  {requirements, agreement, normalisedError}: Comparison,
  notices: NoticeList,
): void {
  if (requirements.length === 0) return;
  const decision = decisionOfAll(requirements);
  const beyond = [
    (normalisedError.horizontal ?? 0) > 1 ? 'in plan' : '',
    (normalisedError.up ?? 0) > 1 ? 'in height' : '',
  ].filter((where) => where !== '');
  const settled = decision === 'accept' && agreement !== 'disagrees';
  notices.add(
    settled ? 'note' : 'caution',
    `${DECISION_CODES[decision]}-${agreement === 'not tested' ? 'untested' : agreement}`,
    ['comparison.agreement'],
    {where: beyond.join(' and ')},
  );
}

const DECISION_CODES: Readonly<Record<Decision, string>> = {
  accept: 'accept',
  reject: 'reject',
  'cannot tell': 'cannot-tell',
};

/** Whether other occupations of the mark, when they were named, say the same. */
function noticeOtherSetups({otherSetups}: Comparison, notices: NoticeList): void {
  otherSetups.forEach(({agreement, differenceM, hoursEarlier, name}, i) => {
    const severity = agreement === 'agrees' ? 'note' : 'concern';
    const code = {
      agrees: 'setups-agree',
      disagrees: 'setups-disagree',
      'not tested': 'setups-not-tested',
    }[agreement];
    notices.add(
      agreement === 'not tested' ? 'caution' : severity,
      code,
      [`comparison.otherSetups[${i}]`],
      {
        name,
        horizontalM: differenceM.horizontal,
        upM: differenceM.up,
        hoursEarlier,
      },
    );
  });
}

function decisionOfAll(requirements: readonly Requirement[]): Decision {
  const all = requirements.map(({decision}) => decision);
  if (all.includes('reject')) return 'reject';
  return all.every((decision) => decision === 'accept') ? 'accept' : 'cannot tell';
}

/** How long it would take to reach the radius that the user wishes, or the tolerance asks for. */
export function noticeTime(
  session: Session | null,
  {wantM}: ReduceRequest,
  notices: NoticeList,
): void {
  if (wantM === null) return;
  const time = session?.timeForRadius(wantM) ?? null;
  if (time === null) notices.add('caution', 'time-not-known', [], {wantM});
  else notices.add('note', 'time-needed', [], {wantM, aboutS: time.aboutS, allowS: time.allowS});
}
