import type {NoticeList} from './notices.ts';
import type {Result, Severity} from './result.ts';

/** Why a value is null, decided by where it stands; the first rule that matches applies. */
interface Rule {
  readonly path: RegExp;
  readonly code: string;
  readonly severity: Severity;
  readonly when?: (result: Result) => boolean;
}

const RULES: readonly Rule[] = [
  {path: /^(occupation\.|fieldSheet|markRecord)|setUpId$/, code: 'not-given', severity: 'absent'},
  {
    path: /^(comparison|verdict)$/,
    code: 'nothing-compared',
    severity: 'absent',
    when: (result) => result.command === 'reduce',
  },
  {path: /^stability\.settling$/, code: 'no-settling', severity: 'absent'},
  {path: /\.(frame|frameFrom|coordinateEpoch)$/, code: 'frame-not-stated', severity: 'caution'},
  {path: /^comparison\.diagnosis/, code: 'nothing-to-explain', severity: 'absent'},
  {path: /^comparison\.frameChange$/, code: 'frame-not-transformed', severity: 'absent'},
  {
    path: /\.(pointScale|combinedFactor|elevationFactor)$/,
    code: 'grid-factor-unknown',
    severity: 'absent',
  },
  {path: /\.grid$/, code: 'grid-not-asked', severity: 'absent'},
  {path: /\.(sharedBy|id)$/, code: 'budget-row-not-shared', severity: 'absent'},
  {path: /^budget\[\]\.standardUncertaintyM/, code: 'budget-row-not-included', severity: 'absent'},
  {path: /separation\.model$/, code: 'geoid-model-not-named', severity: 'absent'},
  {path: /separation\.receiverM$/, code: 'no-receiver-separation', severity: 'absent'},
  {
    path: /(orthometricHeightM|separation)$/,
    code: 'no-orthometric-height',
    severity: 'absent',
  },
  {
    path: /(ecefM|ellipsoidalHeightM)$/,
    code: 'no-ellipsoidal-height',
    severity: 'caution',
  },
  {
    path: /(\.up|upM|covarianceEnuM2\[\]\[\])$/,
    code: 'up-not-known',
    severity: 'absent',
  },
  {path: /receiverSigmaM/, code: 'no-receiver-sigma', severity: 'absent'},
  {path: /^epochs\.(intervalS|resolutionM)/, code: 'resolution-unknown', severity: 'absent'},
  {path: /^inputs\[\]\.(firstUtc|lastUtc)$/, code: 'input-without-time', severity: 'absent'},
  {path: /^screening\.fixClassKept$/, code: 'all-fix-classes', severity: 'absent'},
  {path: /\.reason$/, code: 'no-tolerance-reason', severity: 'absent'},
  {path: /^settings\./, code: 'setting-off', severity: 'absent'},
  {
    path: /^(scatter|stability|comparison|reference|position|segments\[\])/,
    code: 'not-known-from-this-record',
    severity: 'absent',
  },
];

/**
 * Adds a notice for every null that no notice speaks of yet, so that a reader never wonders
 * whether a value was forgotten. Elements of lists share one path, written `segments[].position`.
 */
export function explainNulls(result: Result, notices: NoticeList): Result {
  const told = notices.notices.flatMap(({about}) => about);
  const found = new Map<Rule, Set<string>>();
  for (const path of nullPaths(result, '')) {
    if (told.some((known) => covers(known, path))) continue;
    const rule = RULES.find(({path: where, when}) => where.test(path) && (when?.(result) ?? true));
    if (rule === undefined) throw new Error(`explainNulls: no rule explains the null at ${path}`);
    found.set(rule, (found.get(rule) ?? new Set<string>()).add(path));
  }
  for (const rule of RULES) {
    const paths = found.get(rule);
    if (paths !== undefined) notices.add(rule.severity, rule.code, [...paths].sort());
  }
  return {...result, notices: [...notices.notices]};
}

/** Whether a notice about `known` also speaks of `path`: the same place or one inside it. */
export function covers(known: string, path: string): boolean {
  return path === known || path.startsWith(`${known}.`) || path.startsWith(`${known}[`);
}

/** Paths of all nulls outside the notices, list positions left out. */
export function* nullPaths(value: unknown, path: string): Generator<string> {
  if (value === null) {
    yield path;
  } else if (Array.isArray(value)) {
    for (const element of value) yield* nullPaths(element, `${path}[]`);
  } else if (typeof value === 'object') {
    for (const [name, member] of Object.entries(value)) {
      if (path === '' && name === 'notices') continue;
      yield* nullPaths(member, path === '' ? name : `${path}.${name}`);
    }
  }
}
