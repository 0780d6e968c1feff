import type {BudgetRow, PerAxis, SharedBy} from './result.ts';
import type {FixClassName} from './screen.ts';

/*
 * The uncertainty budget: what the record itself shows, what its digits hide, and what no record
 * can see and somebody must state. A contribution that nobody gave is a row all the same, "not
 * included", so that the reader sees what the 95 % figures leave out.
 */

/** A contribution that the user states, from the field sheet. */
export interface StatedContribution {
  readonly standardUncertaintyM: PerAxis;
  readonly id: string | null;
  readonly from: string;
}

export interface BudgetInput {
  /** Standard uncertainty of the mean by its own scatter and correlation; null: cannot be told. */
  readonly session: PerAxis<number | null> | null;
  /** What rounding in the log can hide after averaging; null when the digits are fine enough. */
  readonly quantisation: PerAxis<number | null> | null;
  /** Step of the printed geoid separation where heights rest on it; null where they do not. */
  readonly separationStepM: number | null;
  /** The site that shares the rounded separation: any name that is the same for the same place. */
  readonly separationId: string | null;
  readonly fixClass: FixClassName | null;
  readonly hasHeight: boolean;
  readonly service: StatedContribution | null;
  readonly base: StatedContribution | null;
  readonly antennaHeight: StatedContribution | null;
  readonly centring: StatedContribution | null;
}

/**
 * 95 % of positions of a user of the open service, global average: 8 m horizontally, 13 m in
 * height. GPS Standard Positioning Service Performance Standard, 5th edition, 2020, from memory.
 */
const SERVICE_HORIZONTAL_95_M = 8;
const SERVICE_VERTICAL_95_M = 13;
/** Radius of 95 % of a circular normal distribution, and half-width of 95 % of a normal one. */
const CIRCLE_95_SIGMAS = 2.447746830680816;
const LINE_95_SIGMAS = 1.959963984540054;

const DEFAULT_SERVICE: StatedContribution = {
  standardUncertaintyM: {
    east: SERVICE_HORIZONTAL_95_M / CIRCLE_95_SIGMAS,
    north: SERVICE_HORIZONTAL_95_M / CIRCLE_95_SIGMAS,
    up: SERVICE_VERTICAL_95_M / LINE_95_SIGMAS,
  },
  id: 'open service',
  from: 'GPS SPS Performance Standard, 5th edition (2020), from memory',
};

export function budgetRows(input: BudgetInput): BudgetRow[] {
  const rows: BudgetRow[] = [
    {
      source: 'session repeatability',
      standardUncertaintyM: input.session,
      sharedBy: null,
      id: null,
      from: input.session === null ? 'this record cannot tell' : 'this record',
    },
  ];
  if (input.quantisation !== null) {
    rows.push({
      source: 'digits of the log',
      standardUncertaintyM: input.quantisation,
      sharedBy: null,
      id: null,
      from: 'resolution of the log',
    });
  }
  if (input.separationStepM !== null) {
    rows.push({
      source: 'rounded geoid separation',
      // A value rounded to a step is uniform within it.
      standardUncertaintyM: {east: 0, north: 0, up: input.separationStepM / Math.sqrt(12)},
      sharedBy: 'site',
      id: input.separationId,
      from: 'digits of the separation in the log',
    });
  }
  rows.push(correctionRow(input));
  rows.push(statedRow('antenna height', 'antenna', input.antennaHeight));
  rows.push(statedRow('centring over the mark', null, input.centring));
  return input.hasHeight ? rows : rows.map(withoutUp);
}

export interface ComparisonContributions {
  readonly mark: {
    readonly name: string;
    readonly covarianceM2: readonly (readonly number[])[] | null;
  } | null;
  /** null: nothing was transformed. */
  readonly transformation: StatedContribution | null;
  /** Heights above the geoid are compared, so that its model counts. */
  readonly heightsAboveGeoid: boolean;
  readonly geoid: StatedContribution | null;
}

/**
 * What enters a comparison beside the position's own budget: the geoid model, the transformation
 * into the frame of the mark, and the mark itself.
 */
export function comparisonRows(contributions: ComparisonContributions): BudgetRow[] {
  const {mark, transformation, heightsAboveGeoid, geoid} = contributions;
  const rows: BudgetRow[] = [];
  if (heightsAboveGeoid) rows.push(statedRow('geoid model', 'geoid', geoid));
  if (transformation !== null) {
    rows.push(statedRow('transformation to the frame of the mark', 'frame', transformation));
  }
  if (mark !== null) {
    const root = (axis: number) => Math.sqrt(mark.covarianceM2?.[axis]?.[axis] ?? 0);
    const stated: StatedContribution = {
      standardUncertaintyM: {east: root(0), north: root(1), up: root(2)},
      id: mark.name,
      from: 'marks file',
    };
    rows.push(statedRow('the mark', 'mark', mark.covarianceM2 === null ? null : stated));
  }
  return rows;
}

/** Autonomous and satellite-augmented fixes rest on the service, corrected ones on the base. */
function correctionRow(input: BudgetInput): BudgetRow {
  const autonomous = input.fixClass === 'autonomous' || input.fixClass === 'differential';
  if (autonomous && input.base === null) {
    return statedRow('positioning service', 'service', input.service ?? DEFAULT_SERVICE);
  }
  return statedRow('base or network', 'base', input.base);
}

function statedRow(
  source: string,
  sharedBy: SharedBy,
  stated: StatedContribution | null,
): BudgetRow {
  if (stated === null) {
    return {source, standardUncertaintyM: null, sharedBy, id: null, from: 'not included'};
  }
  const {standardUncertaintyM, id, from} = stated;
  return {source, standardUncertaintyM, sharedBy, id, from};
}

function withoutUp(row: BudgetRow): BudgetRow {
  if (row.standardUncertaintyM === null) return row;
  return {...row, standardUncertaintyM: {...row.standardUncertaintyM, up: null}};
}

/** Variances of all rows but the session's, which comes with its covariances. */
export function budgetVariancesM2(rows: readonly BudgetRow[]): PerAxis {
  const sum = {east: 0, north: 0, up: 0};
  for (const {source, standardUncertaintyM} of rows) {
    if (source === 'session repeatability' || standardUncertaintyM === null) continue;
    sum.east += (standardUncertaintyM.east ?? 0) ** 2;
    sum.north += (standardUncertaintyM.north ?? 0) ** 2;
    sum.up += (standardUncertaintyM.up ?? 0) ** 2;
  }
  return sum;
}
