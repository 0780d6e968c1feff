import type {Sheet, StatedUncertainty} from '../fieldbook/sheet.ts';
import type {AntennaReduction} from './antenna.ts';
import type {BudgetInput, StatedContribution} from './budget.ts';

/** What the field sheet states of the uncertainty that no record can see, by row of the budget. */
export function statedContributions(
  {standardUncertainties}: Sheet,
  antenna: AntennaReduction | null,
): Pick<BudgetInput, 'service' | 'base' | 'antennaHeight' | 'centring' | 'geoid'> {
  const stated = (...names: readonly StatedUncertainty['of'][]) => {
    const entry = standardUncertainties?.find(({of}) => names.includes(of));
    return entry === undefined ? null : contribution(entry);
  };
  return {
    service: stated('service'),
    base: stated('base', 'network'),
    antennaHeight: antennaHeight(antenna),
    centring: stated('centring'),
    geoid: stated('geoid', 'separation'),
  };
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
