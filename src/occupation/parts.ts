import {keptIndices, type LocalColumns} from './local-columns.ts';
import type {ReduceRequest} from './request.ts';
import type {EpochAccount, Stability} from './result.ts';
import {reasonCode, type ScreenOutcome} from './screen.ts';
import {screenNeighbours} from './screen-neighbours.ts';
import {type Session, sessionOf} from './session.ts';

/** What every part of a record is averaged from. */
export interface Parted {
  readonly request: ReduceRequest;
  readonly account: EpochAccount;
  readonly columns: LocalColumns;
}

/** The stretch of the epochs at these indices, averaged by itself. */
export function sessionAt({request, account, columns}: Parted, indices: Uint32Array): Session {
  return sessionOf(request.log.epochs.gpsSeconds, columns, indices, account.resolutionM);
}

/** Times of the material steps. */
export function materialCuts({steps: found}: Session, {steps}: Stability): number[] {
  return found.filter((_, i) => steps[i]!.material).map(({gpsSeconds}) => gpsSeconds);
}

/**
 * The stretches between material steps, each screened again by itself: what was far from its
 * neighbours across a jump need not be so within its own part.
 */
export function sessionsBetween(
  cuts: readonly number[],
  parted: Parted,
  {reason}: ScreenOutcome,
): Session[] {
  const {request, account, columns} = parted;
  const {gpsSeconds} = request.log.epochs;
  const gross = reasonCode('far from its neighbours');
  for (let i = 0; i < reason.length; i++) if (reason[i] === gross) reason[i] = 0;
  const edges = [Number.NEGATIVE_INFINITY, ...cuts, Number.POSITIVE_INFINITY];
  return edges.slice(1).flatMap((end, part) => {
    const within = () =>
      keptIndices(reason).filter((i) => gpsSeconds[i]! >= edges[part]! && gpsSeconds[i]! < end);
    screenNeighbours(gpsSeconds, columns, within(), account.resolutionM, reason);
    const indices = within();
    return indices.length === 0 ? [] : [sessionAt(parted, indices)];
  });
}
