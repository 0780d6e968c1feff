import {UsageError} from '../errors.ts';

/** Coordinates before the first frames and after any prediction make no sense. */
const EARLIEST_EPOCH = 1980;
const LATEST_EPOCH = 2040;

/**
 * A coordinate epoch as a user writes it: a decimal year, `2010.0` or `2026.34`.
 *
 * @throws UsageError that says what to write
 */
export function parseCoordinateEpoch(text: string): number {
  const trimmed = text.trim();
  if (/^\d{4}-\d{2}-\d{2}/.test(trimmed)) {
    throw new UsageError(
      `need a coordinate epoch as a decimal year, such as 2026.34, found the date "${trimmed}"`,
    );
  }
  if (!/^\d{4}(\.\d*)?$/.test(trimmed)) {
    throw new UsageError(
      `need a coordinate epoch as a decimal year, such as 2020.0, found "${text}"`,
    );
  }
  return checkedCoordinateEpoch(Number(trimmed));
}

/** @throws UsageError unless the epoch lies between 1980 and 2040 */
export function checkedCoordinateEpoch(epoch: number): number {
  if (epoch >= EARLIEST_EPOCH && epoch <= LATEST_EPOCH) return epoch;
  throw new UsageError(
    `need a coordinate epoch between ${EARLIEST_EPOCH} and ${LATEST_EPOCH} as a decimal year, ` +
      `such as 2020.0, found ${epoch}`,
  );
}
