import {FixClass} from '../epochs/epochs.ts';
import {rankOfClass} from './mode-indicator.ts';
import type {
  FixColumns,
  GllColumns,
  GsaColumns,
  GstColumns,
  RmcColumns,
  ZdaColumns,
} from './sentence-columns.ts';
import {NO_DATE} from './sentence-fields.ts';
import {SentenceStatus} from './status.ts';

const NO_SATELLITES = 255;
const NO_STATION = 65_535;
/** More than any log has at one time. */
const MOST_TALKERS = 8;
const TALKER_GN = 0x474e;

/** What consecutive GSA sentences say together. */
export class GsaGroup {
  /** Sentences. */
  count = 0;
  /** Different satellites. */
  satellites = 0;
  pdop = Number.NaN;
  hdop = Number.NaN;
  vdop = Number.NaN;

  clear(): void {
    if (this.count === 0) return;
    this.count = 0;
    this.satellites = 0;
    this.pdop = Number.NaN;
    this.hdop = Number.NaN;
    this.vdop = Number.NaN;
  }

  /** Adds a sentence; all sentences of a burst repeat the same dilutions. */
  take(gsa: GsaColumns, row: number, newSatellites: number): void {
    this.count += 1;
    this.satellites += newSatellites;
    if (Number.isNaN(this.pdop)) this.pdop = gsa.pdop[row] ?? Number.NaN;
    if (Number.isNaN(this.hdop)) this.hdop = gsa.hdop[row] ?? Number.NaN;
    if (Number.isNaN(this.vdop)) this.vdop = gsa.vdop[row] ?? Number.NaN;
  }

  add(other: GsaGroup): void {
    this.count += other.count;
    this.satellites += other.satellites;
    if (Number.isNaN(this.pdop)) this.pdop = other.pdop;
    if (Number.isNaN(this.hdop)) this.hdop = other.hdop;
    if (Number.isNaN(this.vdop)) this.vdop = other.vdop;
  }
}

/** The position of one sentence. */
export class Fix {
  talker = 0;
  latitudeDeg = Number.NaN;
  longitudeDeg = Number.NaN;
  altitudeM = Number.NaN;
  separationM = Number.NaN;
  fixClass: number = FixClass.none;
  satellites = NO_SATELLITES;
  hdop = Number.NaN;
  correctionAgeS = Number.NaN;
  stationId = NO_STATION;
  lineNumber = 0;

  get hasPosition(): boolean {
    return !Number.isNaN(this.latitudeDeg);
  }

  clear(): void {
    this.talker = 0;
    this.latitudeDeg = Number.NaN;
    this.hdop = Number.NaN;
    this.satellites = NO_SATELLITES;
  }

  take(fixes: FixColumns, row: number, lineFeedsBefore: number): void {
    this.talker = fixes.talker[row] ?? 0;
    this.latitudeDeg = fixes.latitudeDeg[row] ?? Number.NaN;
    this.longitudeDeg = fixes.longitudeDeg[row] ?? Number.NaN;
    this.altitudeM = fixes.altitudeM[row] ?? Number.NaN;
    this.separationM = fixes.separationM[row] ?? Number.NaN;
    this.fixClass = fixes.fixClass[row] ?? FixClass.none;
    this.satellites = fixes.satellites[row] ?? NO_SATELLITES;
    this.hdop = fixes.hdop[row] ?? Number.NaN;
    this.correctionAgeS = fixes.correctionAgeS[row] ?? Number.NaN;
    this.stationId = fixes.stationId[row] ?? NO_STATION;
    this.lineNumber = lineFeedsBefore + (fixes.lineFeedsBefore[row] ?? 0) + 1;
  }

  /** Latitude and longitude of RMC or GLL. */
  takePlan(plan: RmcColumns | GllColumns, row: number, lineFeedsBefore: number): void {
    this.latitudeDeg = plan.latitudeDeg[row] ?? Number.NaN;
    this.longitudeDeg = plan.longitudeDeg[row] ?? Number.NaN;
    this.fixClass = plan.fixClass[row] ?? FixClass.unknown;
    this.lineNumber = lineFeedsBefore + (plan.lineFeedsBefore[row] ?? 0) + 1;
  }
}

/** Whether a repeated position is better than the one at hand; GN speaks for all systems at once. */
function isBetter(fixes: FixColumns, row: number, than: Fix): boolean {
  if (!than.hasPosition) return true;
  if (Number.isNaN(fixes.latitudeDeg[row] ?? Number.NaN)) return false;
  const rank = rankOfClass(fixes.fixClass[row] ?? 0) - rankOfClass(than.fixClass);
  return rank > 0 || (rank === 0 && fixes.talker[row] === TALKER_GN && than.talker !== TALKER_GN);
}

/** A few talkers, without growing and shrinking an array at every epoch. */
class Talkers {
  count = 0;
  readonly #talkers = new Uint16Array(MOST_TALKERS);

  add(talker: number): void {
    if (this.count === MOST_TALKERS) return;
    this.#talkers[this.count] = talker;
    this.count += 1;
  }

  includes(talker: number): boolean {
    for (let k = 0; k < this.count; k += 1) if (this.#talkers[k] === talker) return true;
    return false;
  }

  list(): number[] {
    return [...this.#talkers.subarray(0, this.count)];
  }
}

/** The sentences of one epoch: those that carry its time and the timeless ones among them. */
export class Burst {
  timeOfDayS = Number.NaN;
  readonly gga = new Fix();
  readonly gns = new Fix();
  /** Talkers of GGA and of GNS that gave positions. */
  readonly ggaTalkers = new Talkers();
  readonly gnsTalkers = new Talkers();
  rmcValid = false;
  rmcVoid = false;
  /** Position of RMC, for a log without any other. */
  readonly rmc = new Fix();
  sigmaEastM = Number.NaN;
  sigmaNorthM = Number.NaN;
  sigmaUpM = Number.NaN;
  dateDays = NO_DATE;
  dateOfRmc = false;
  /** GSA sentences between two that carry this time. */
  readonly inside = new GsaGroup();
  /** GSA sentences behind the last one that carries this time, before another time. */
  readonly trailing = new GsaGroup();
  /** GSA sentences before the first one that carries this time, behind another time. */
  readonly leading = new GsaGroup();
  /** HDOP of the burst that `leading` may belong to instead. */
  hdopBefore = Number.NaN;

  begin(timesOfDayS: Float64Array, row: number): void {
    this.timeOfDayS = timesOfDayS[row] ?? Number.NaN;
    this.gga.clear();
    this.gns.clear();
    this.rmc.clear();
    this.ggaTalkers.count = 0;
    this.gnsTalkers.count = 0;
    this.rmcValid = false;
    this.rmcVoid = false;
    this.sigmaEastM = Number.NaN;
    this.sigmaNorthM = Number.NaN;
    this.sigmaUpM = Number.NaN;
    this.dateDays = NO_DATE;
    this.dateOfRmc = false;
    this.inside.clear();
    this.trailing.clear();
    this.leading.clear();
    this.hdopBefore = Number.NaN;
  }

  /** GGA if it has a position, else GNS: GGA quality outranks GNS modes. */
  get fix(): Fix {
    return this.gga.hasPosition || !this.gns.hasPosition ? this.gga : this.gns;
  }

  /** Whether the sentences of the burst themselves say that there is no valid position. */
  get saysNoFix(): boolean {
    if (this.rmcVoid && !this.rmcValid) return true;
    const {fix} = this;
    return fix.talker !== 0 && (!fix.hasPosition || fix.fixClass === FixClass.none);
  }

  /** Whether several talkers gave a position of this epoch. */
  get repeatedByTalkers(): boolean {
    return this.ggaTalkers.count > 1;
  }

  /** Whether a position of this kind and talker is there already, so that another is a new epoch. */
  holds(isGga: boolean, talker: number): boolean {
    return (isGga ? this.ggaTalkers : this.gnsTalkers).includes(talker);
  }

  takeFix(isGga: boolean, fixes: FixColumns, row: number, lineFeedsBefore: number): void {
    const fix = isGga ? this.gga : this.gns;
    if (!Number.isNaN(fixes.latitudeDeg[row] ?? Number.NaN)) {
      (isGga ? this.ggaTalkers : this.gnsTalkers).add(fixes.talker[row] ?? 0);
    }
    if (isBetter(fixes, row, fix)) fix.take(fixes, row, lineFeedsBefore);
  }

  takeRmc(rmc: RmcColumns, row: number, lineFeedsBefore: number): void {
    const status = rmc.status[row];
    const isVoid = status === SentenceStatus.void || rmc.fixClass[row] === FixClass.none;
    if (isVoid) this.rmcVoid = true;
    else this.rmcValid = true;
    const dateDays = rmc.dateDays[row] ?? NO_DATE;
    if (dateDays !== NO_DATE && (!this.dateOfRmc || !isVoid)) {
      this.dateDays = dateDays;
      this.dateOfRmc = true;
    }
    const hasPlan = !Number.isNaN(rmc.latitudeDeg[row] ?? Number.NaN);
    if (hasPlan && !this.rmc.hasPosition) this.rmc.takePlan(rmc, row, lineFeedsBefore);
  }

  takeGst(gst: GstColumns, row: number): void {
    if (!Number.isNaN(this.sigmaNorthM)) return;
    this.sigmaNorthM = gst.sigmaLatitudeM[row] ?? Number.NaN;
    this.sigmaEastM = gst.sigmaLongitudeM[row] ?? Number.NaN;
    this.sigmaUpM = gst.sigmaAltitudeM[row] ?? Number.NaN;
  }

  /** The date of RMC, which comes from the position, goes before that of ZDA, which may not. */
  takeZda(zda: ZdaColumns, row: number): void {
    const dateDays = zda.dateDays[row] ?? NO_DATE;
    if (dateDays !== NO_DATE && !this.dateOfRmc) this.dateDays = dateDays;
  }
}
