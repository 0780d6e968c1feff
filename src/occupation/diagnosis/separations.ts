import {GEOID_MODEL_SIGMA_M} from './hypothesis.ts';
import type {DiagnosisInput, KnownSeparation} from './input.ts';

/** Tables in receivers are coarse: their separation as a value of the geoid. Common practice, no source. */
const RECEIVER_TABLE_SIGMA_M = 0.5;
/** Separations are printed to 0.1 m at worst; half a step either way. */
const PRINTED_SIGMA_M = 0.03;

export interface SeparationInUse {
  readonly separationM: number;
  readonly sigmaM: number;
  readonly source: KnownSeparation['source'];
}

/** The separation that comes nearest to the truth: of the mark, else a grid, the sheet, the log. */
export function trueSeparation({separation}: DiagnosisInput): SeparationInUse | undefined {
  for (const source of ['mark', 'geoid grid', 'sheet', 'log'] as const) {
    const found = separation.known.find((known) => known.source === source);
    if (found === undefined) continue;
    const sigmaM = source === 'log' ? RECEIVER_TABLE_SIGMA_M : GEOID_MODEL_SIGMA_M;
    return {separationM: found.separationM, sigmaM, source};
  }
  return undefined;
}

/** The separation that the receiver itself works with, else the true one in its place. */
export function receiverSeparation(input: DiagnosisInput): SeparationInUse | undefined {
  const logged = input.separation.known.find(({source}) => source === 'log');
  if (logged === undefined) return trueSeparation(input);
  return {separationM: logged.separationM, sigmaM: PRINTED_SIGMA_M, source: 'log'};
}
