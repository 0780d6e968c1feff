import type {Result} from './result.ts';

/**
 * What the one-sentence answer speaks of, taken out of the result: the terminal and the report
 * word the same facts.
 */
export function headlineFacts(result: Result) {
  const {comparison, position, segments, stability, epochs} = result;
  const shown = position ?? segments[0]?.position ?? null;
  const largest = stability.steps
    .filter((step) => step.material)
    .map((step) => ({utc: step.utc, sizeM: Math.hypot(step.eastM, step.northM, step.upM ?? 0)}))
    .sort((a, b) => b.sizeM - a.sizeM)[0];
  return {
    command: result.command,
    mark: result.occupation.mark,
    verdict: result.verdict,
    stability: stability.verdict,
    epochsUsed: epochs.used,
    durationS: durationS(result),
    offsetHorizontalM: comparison?.offsetM.horizontal ?? null,
    offsetUpM: comparison?.offsetM.up ?? null,
    azimuthDeg: comparison?.azimuthDeg ?? null,
    requirements: comparison?.requirements ?? [],
    radius95M: shown?.uncertainty95M?.horizontalRadius ?? null,
    up95M: shown?.uncertainty95M?.up ?? null,
    materialStep: largest ?? null,
    segments: segments.length,
    rests: restsOn(result),
  };
}

/** What the 95 % figures leave out, or take from elsewhere, in one word. */
function restsOn({budget}: Result): 'base not included' | 'service included' | null {
  const row = budget.find(({sharedBy}) => sharedBy === 'base' || sharedBy === 'service');
  if (row?.sharedBy === 'service') return 'service included';
  return row?.sharedBy === 'base' && row.standardUncertaintyM === null ? 'base not included' : null;
}

function durationS({occupation: {startUtc, endUtc}}: Result): number {
  return startUtc === null || endUtc === null
    ? 0
    : (Date.parse(endUtc) - Date.parse(startUtc)) / 1000;
}
