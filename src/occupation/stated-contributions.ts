import type {Sheet, StatedUncertainty} from '../fieldbook/sheet.ts';
import type {AntennaReduction} from './antenna.ts';
import type {BudgetInput, StatedContribution} from './budget.ts';

/** What the field sheet states of the uncertainty that no record can see, by row of the budget. */
export function statedContributions(
  {standardUncertainties}: Sheet,
  antenna: AntennaReduction | null,
): Pick<BudgetInput, 'service' | 'base' | 'antennaHeight' | 'centring'> {
  return {
    service: stated(standardUncertainties, 'service'),
    base: stated(standardUncertainties, 'base', 'network'),
    antennaHeight: antennaHeight(antenna),
    centring: stated(standardUncertainties, 'centring'),
  };
}

/** What the field sheet states of the geoid model, which counts where heights above it meet. */
export function statedOfGeoid({standardUncertainties}: Sheet): StatedContribution | null {
  return stated(standardUncertainties, 'geoid', 'separation');
}

function stated(
  all: Sheet['standardUncertainties'],
  ...names: readonly StatedUncertainty['of'][]
): StatedContribution | null {
  const entry = all?.find(({of}) => names.includes(of));
  return entry === undefined ? null : contribution(entry);
}

function contribution(entry: StatedUncertainty): StatedContribution {
  const {eastM, northM, planM, upM, id, from} = entry;
  return {
    standardUncertaintyM: {east: eastM ?? planM ?? 0, north: northM ?? planM ?? 0, up: upM ?? 0},
    id: id ?? null,
    from: from ?? 'field sheet',
  };
}

function antennaHeight(antenna: AntennaReduction | null): StatedContribution | null {
  if (antenna?.uncertainty == null) return null;
  const {standardUncertaintyM, id, source, from} = antenna.uncertainty;
  return {
    standardUncertaintyM: {east: 0, north: 0, up: standardUncertaintyM},
    id,
    from: source ?? (from === 'stated' ? 'field sheet' : from),
  };
}
