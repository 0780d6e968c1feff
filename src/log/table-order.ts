import {takeEpochs} from '../epochs/builder.ts';
import {EpochFlag, type Epochs} from '../epochs/epochs.ts';

/**
 * The epochs in time order, flagged where a row ran back in time, repeats the time of the epoch
 * before it, or holds exactly its position at a later time.
 */
export function inTimeOrder(read: Epochs): Epochs {
  const ranBack = flagRowsThatRanBack(read);
  const epochs = ranBack ? takeEpochs(read, rowsByTime(read.gpsSeconds)) : read;
  const {gpsSeconds, latitudeDeg, longitudeDeg, ellipsoidalHeightM, altitudeM} = epochs;
  for (let k = 1; k < epochs.count; k += 1) {
    if (gpsSeconds[k] === gpsSeconds[k - 1]) {
      setFlag(epochs, k, EpochFlag.repeated);
      continue;
    }
    const stands =
      latitudeDeg[k] === latitudeDeg[k - 1] &&
      longitudeDeg[k] === longitudeDeg[k - 1] &&
      Object.is(ellipsoidalHeightM[k], ellipsoidalHeightM[k - 1]) &&
      Object.is(altitudeM[k], altitudeM[k - 1]);
    if (stands) setFlag(epochs, k, EpochFlag.frozen);
  }
  return epochs;
}

function flagRowsThatRanBack(epochs: Epochs): boolean {
  let ranBack = false;
  for (let k = 1; k < epochs.count; k += 1) {
    if ((epochs.gpsSeconds[k] ?? 0) < (epochs.gpsSeconds[k - 1] ?? 0)) {
      setFlag(epochs, k, EpochFlag.outOfOrder);
      ranBack = true;
    }
  }
  return ranBack;
}

/** Rows of equal time keep the order of the file. */
function rowsByTime(gpsSeconds: Float64Array): Uint32Array {
  const rows = Uint32Array.from(gpsSeconds.keys());
  return rows.sort((a, b) => (gpsSeconds[a] ?? 0) - (gpsSeconds[b] ?? 0) || a - b);
}

function setFlag(epochs: Epochs, row: number, flag: number): void {
  epochs.flags[row] = (epochs.flags[row] ?? 0) | flag;
}
