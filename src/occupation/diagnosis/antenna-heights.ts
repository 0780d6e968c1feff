import type {AntennaFacts, DiagnosisInput} from './input.ts';

/** A height that somebody may have got wrong, and who wrote it. */
export interface HeightInUse {
  readonly heightM: number;
  readonly by: 'field sheet' | 'receiver';
}

/** Closer than this, sheet and receiver hold the same height. */
const SAME_M = 0.003;

/** The heights in use: that of the field sheet, and that of the receiver where it differs. */
export function heightsInUse({antenna}: DiagnosisInput): HeightInUse[] {
  const heights: HeightInUse[] = [];
  const sheetM = antenna?.arpAboveMarkM ?? null;
  const receiverM = antenna?.receiverHeightM ?? null;
  if (sheetM !== null) heights.push({heightM: sheetM, by: 'field sheet'});
  if (receiverM !== null && !(sheetM !== null && Math.abs(sheetM - receiverM) <= SAME_M)) {
    heights.push({heightM: receiverM, by: 'receiver'});
  }
  return heights;
}

/** What was read, as far as it is known: the reading itself, else the reduced height. */
export function readingsInUse(input: DiagnosisInput): number[] {
  const {antenna} = input;
  const lengths = heightsInUse(input).map(({heightM, by}) =>
    by === 'field sheet' && antenna?.reading ? antenna.reading.lengthM : heightM,
  );
  return lengths.length > 0 || !antenna?.reading ? lengths : [antenna.reading.lengthM];
}

/** A slope and the vertical that belongs to it: √(s² − R²) − o. */
export function verticalOfSlantM(slantM: number, plateRadiusM: number, slantMarkM: number): number {
  return Math.sqrt(slantM * slantM - plateRadiusM * plateRadiusM) - slantMarkM;
}

/** Slopes that are long enough for the plate, with what the sheet says of it. */
export function slopes(
  input: DiagnosisInput,
): {readonly readingM: number; readonly verticalM: number}[] {
  const plateRadiusM = input.antenna?.plateRadiusM ?? Number.NaN;
  const slantMarkM = input.antenna?.slantMarkAboveArpM ?? 0;
  return readingsInUse(input)
    .filter((readingM) => readingM > plateRadiusM)
    .map((readingM) => ({
      readingM,
      verticalM: verticalOfSlantM(readingM, plateRadiusM, slantMarkM),
    }));
}

/** Whether a height could have been taken off by something else than this program. */
export function receiverMayHaveTakenOff(antenna: AntennaFacts): boolean {
  return antenna.takenOffBy !== 'stillmark';
}
