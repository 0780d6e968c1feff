import {SECONDS_PER_DAY} from '../time/calendar.ts';
import {Burst, Fix, GsaGroup} from './burst.ts';
import type {NmeaBatch} from './decode.ts';
import {EpochTrack} from './epoch-track.ts';
import {LogAccount} from './log-account.ts';
import {SatelliteSampler} from './satellite-sampler.ts';
import {
  noDecimals,
  type PrintedDecimals,
  SENTENCE_KINDS,
  type SentenceColumns,
  SentenceKind,
} from './sentence-columns.ts';
import {NO_DATE} from './sentence-fields.ts';
import {SentenceStatus} from './status.ts';

/**
 * Bursts that may be open at a time. Sentences of one epoch need not stand together: the error
 * estimate of an epoch may follow the next position, a clock sentence with a time of its own may
 * stand among them.
 */
const OPEN_BURSTS = 3;

/** A GGA sentence of old says at most this many satellites. */
const MOST_IN_GGA = 12;
const NO_SATELLITES = 255;

/** System × 1024 + number of a satellite is below this. */
const SATELLITE_IDS = 65_536;

/** Which sentences gave the positions. */
export type PositionSource = 'fixes' | 'rmc' | 'gll';

/** What the assembler hands over at the end. */
export interface AssembledLog {
  readonly track: EpochTrack;
  readonly source: PositionSource;
  readonly account: LogAccount;
  readonly sampler: SatelliteSampler;
  /** Most decimals printed in the sentences of the source. */
  readonly decimals: PrintedDecimals;
  /** In order of their first occurrence. */
  readonly datums: readonly string[];
  /** GGA and GNS sentences without a position. */
  readonly withoutPosition: number;
  /** Epochs that several talkers gave, and those talkers. */
  readonly repeatedByTalkers: number;
  readonly talkers: readonly string[];
  /** Whether GGA counts go beyond twelve, so that twelve means twelve. */
  readonly countsBeyondTwelve: boolean;
  readonly leapSeconds: number;
}

/**
 * Joins decoded sentences into epochs: the second pass, over columns, in the order of the log.
 *
 * Sentences that carry the same time form a burst, and a burst with a position is an epoch. A second
 * position of the same time from another talker is the same epoch, of which the better one is kept;
 * from the same talker it is an epoch of its own, which the flags will call repeated.
 *
 * GSA carries no time. Between two sentences of one time it belongs to that time. Between different
 * times it trails the one or leads the other, as receivers differ: where the HDOP changes, that of
 * GSA equals one of its neighbours, and the majority of such cases decides. Until the HDOP changes
 * for the first time both neighbours carry the same, and the beginning of the log decides.
 */
export class NmeaAssembler {
  readonly #account = new LogAccount();
  readonly #fixes: EpochTrack;
  /** Plan positions, gathered as long as there is no position of GGA or GNS. */
  readonly #rmc: EpochTrack;
  readonly #gll: EpochTrack;
  readonly #open: Burst[] = [];
  readonly #free: Burst[] = [];
  /** The last of the open bursts. */
  #newest: Burst | undefined;
  #lastTimeS = Number.NaN;
  /** Rows taken from each of the columns of the batch. */
  readonly #rows = new Uint32Array(SENTENCE_KINDS);
  /** Number of the newest burst, from 2 on. */
  #serial = 1;
  /** Where in the batch the satellites of the next GSA row begin. */
  #idAt = 0;
  /** GSA sentences behind the newest sentence with a time. */
  readonly #pending = new GsaGroup();
  /** For each satellite the serial of the burst that it was last counted in. */
  readonly #countedIn = new Uint32Array(SATELLITE_IDS);
  #trailingVotes = 0;
  #leadingVotes = 0;
  #startsWithGsa = false;
  readonly #sampler = new SatelliteSampler();
  readonly #plan = new Fix();
  readonly #decimals = {fixes: noDecimals(), rmc: noDecimals(), gll: noDecimals()};
  readonly #datums: string[] = [];
  readonly #talkers = new Set<number>();
  #withoutPosition = 0;
  #repeatedByTalkers = 0;
  #countsBeyondTwelve = false;
  #leapSeconds = 0;

  /** @param mostEpochs how many the log may hold, if its size is known */
  constructor(mostEpochs?: number) {
    this.#fixes = new EpochTrack(mostEpochs);
    this.#rmc = new EpochTrack(mostEpochs);
    this.#gll = new EpochTrack(mostEpochs);
  }

  /** Takes the next batch; nothing of it is kept but what has been assembled. */
  add({columns, account, datums}: NmeaBatch): void {
    const {order} = columns;
    this.#rows.fill(0);
    this.#idAt = 0;
    this.#sampler.beginBatch();
    for (let k = 0; k < order.count; k += 1) {
      const kind = order.kind[k] ?? 0;
      // GGA and GNS share their columns.
      const rowsOf = kind === SentenceKind.gns ? SentenceKind.gga : kind;
      const row = this.#rows[rowsOf] ?? 0;
      this.#rows[rowsOf] = row + 1;
      this.#take(kind, columns, row);
    }
    this.#account.add(account);
    for (const source of ['fixes', 'rmc', 'gll'] as const) {
      keepMost(this.#decimals[source], columns.decimals[source]);
    }
    for (const datum of datums) if (!this.#datums.includes(datum)) this.#datums.push(datum);
  }

  finish(): AssembledLog {
    this.#newest?.trailing.add(this.#pending);
    while (this.#open.length > 0) this.#flushOldest();
    this.#sampler.finish();
    const source = this.#source();
    return {
      track: {fixes: this.#fixes, rmc: this.#rmc, gll: this.#gll}[source],
      source,
      account: this.#account,
      sampler: this.#sampler,
      decimals: this.#decimals[source],
      datums: this.#datums,
      withoutPosition: this.#withoutPosition,
      repeatedByTalkers: this.#repeatedByTalkers,
      talkers: [...this.#talkers].map(talkerName).sort(),
      countsBeyondTwelve: this.#countsBeyondTwelve,
      leapSeconds: this.#leapSeconds,
    };
  }

  #source(): PositionSource {
    if (this.#fixes.builder.count > 0) return 'fixes';
    if (this.#rmc.builder.count > 0) return 'rmc';
    return this.#gll.builder.count > 0 ? 'gll' : 'fixes';
  }

  get #noFixYet(): boolean {
    return this.#fixes.builder.count === 0;
  }

  #take(kind: number, columns: SentenceColumns, row: number): void {
    switch (kind) {
      case SentenceKind.gga:
      case SentenceKind.gns:
        this.#takeFix(kind === SentenceKind.gga, columns, row);
        return;
      case SentenceKind.rmc: {
        const {rmc} = columns;
        const burst = this.#burstOf(rmc.timeOfDayS, row);
        if (burst === undefined) return;
        burst.takeRmc(rmc, row, this.#account.lineFeeds);
        if (this.#noFixYet) this.#datePlan(burst, rmc.dateDays, row);
        return;
      }
      case SentenceKind.gst:
        this.#burstOf(columns.gst.timeOfDayS, row)?.takeGst(columns.gst, row);
        return;
      case SentenceKind.zda: {
        const {zda} = columns;
        const burst = this.#burstOf(zda.timeOfDayS, row);
        if (burst === undefined) return;
        burst.takeZda(zda, row);
        if (this.#noFixYet) this.#datePlan(burst, zda.dateDays, row);
        return;
      }
      case SentenceKind.gsa:
        this.#takeGsa(columns, row);
        return;
      case SentenceKind.gsv:
        this.#sampler.take(columns, row, this.#account);
        return;
      case SentenceKind.gll:
        if (this.#noFixYet) this.#takeGll(columns, row);
        return;
      default:
        return;
    }
  }

  #takeFix(isGga: boolean, {fixes}: SentenceColumns, row: number): void {
    const hasPosition = !Number.isNaN(fixes.latitudeDeg[row] ?? Number.NaN);
    if (!hasPosition) this.#withoutPosition += 1;
    const satellites = fixes.satellites[row] ?? NO_SATELLITES;
    if (isGga && satellites > MOST_IN_GGA && satellites !== NO_SATELLITES) {
      this.#countsBeyondTwelve = true;
    }
    let burst = this.#burstOf(fixes.timeOfDayS, row);
    if (burst === undefined) return;
    if (hasPosition && burst.holds(isGga, fixes.talker[row] ?? 0)) {
      burst = this.#newBurst(fixes.timeOfDayS, row);
    }
    burst.takeFix(isGga, fixes, row, this.#account.lineFeeds);
  }

  #takeGsa({gsa, gsaIds}: SentenceColumns, row: number): void {
    const end = this.#idAt + (gsa.ids[row] ?? 0);
    let newSatellites = 0;
    for (let k = this.#idAt; k < end; k += 1) {
      const id = gsaIds.id[k] ?? 0;
      if (this.#countedIn[id] === this.#serial) continue;
      this.#countedIn[id] = this.#serial;
      newSatellites += 1;
    }
    this.#idAt = end;
    if (this.#serial === 1) this.#startsWithGsa = true;
    this.#pending.take(gsa, row, newSatellites);
  }

  /** GLL stands alone: what the other sentences yield must not depend on it. */
  #takeGll({gll}: SentenceColumns, row: number): void {
    const timeOfDayS = gll.timeOfDayS[row] ?? Number.NaN;
    if (Number.isNaN(timeOfDayS) || Number.isNaN(gll.latitudeDeg[row])) return;
    this.#gll.days.advance(timeOfDayS, this.#gll.builder.count);
    this.#plan.takePlan(gll, row, this.#account.lineFeeds);
    this.#gll.addPlan(timeOfDayS, this.#plan, gll.status[row] === SentenceStatus.void);
  }

  #datePlan({timeOfDayS}: Burst, dateDays: Int32Array, row: number): void {
    const day = dateDays[row] ?? NO_DATE;
    if (day === NO_DATE) return;
    const {days, builder} = this.#gll;
    days.advance(timeOfDayS, builder.count);
    days.seeDate(day, builder.count, true);
  }

  /**
   * The open burst of a time, the newest if there are several, or a new one; undefined for a
   * sentence without a time. Columns are passed, as a double that is passed may be put on the heap.
   */
  #burstOf(timesOfDayS: Float64Array, row: number): Burst | undefined {
    const timeOfDayS = timesOfDayS[row] ?? Number.NaN;
    if (Number.isNaN(timeOfDayS)) return undefined;
    if (timeOfDayS !== this.#lastTimeS) {
      this.#lastTimeS = timeOfDayS;
      if (timeOfDayS >= SECONDS_PER_DAY) this.#leapSeconds += 1;
      this.#sampler.seeTime(timeOfDayS, this.#fixes.days, this.#fixes.builder.count);
    }
    const newest = this.#newest;
    if (newest?.timeOfDayS === timeOfDayS) {
      if (this.#pending.count > 0) {
        newest.inside.add(this.#pending);
        this.#pending.clear();
      }
      return newest;
    }
    for (let k = this.#open.length - 2; k >= 0; k -= 1) {
      const burst = this.#open[k];
      if (burst?.timeOfDayS === timeOfDayS) return burst;
    }
    return this.#newBurst(timesOfDayS, row);
  }

  #newBurst(timesOfDayS: Float64Array, row: number): Burst {
    if (this.#open.length === OPEN_BURSTS) this.#flushOldest();
    const before = this.#newest;
    const burst = this.#free.pop() ?? new Burst();
    this.#serial += 1;
    burst.begin(timesOfDayS, row);
    if (this.#pending.count > 0) {
      before?.trailing.add(this.#pending);
      burst.leading.add(this.#pending);
      burst.hdopBefore = before?.fix.hdop ?? Number.NaN;
      this.#pending.clear();
    }
    this.#open.push(burst);
    this.#newest = burst;
    return burst;
  }

  #flushOldest(): void {
    const burst = this.#open.shift();
    if (burst === undefined) return;
    this.#free.push(burst);
    this.#dateBurst(this.#fixes, burst);
    if (this.#noFixYet) this.#dateBurst(this.#rmc, burst);
    this.#vote(burst);
    if (burst.fix.hasPosition) {
      this.#fixes.addFix(burst, this.#groupOf(burst));
      if (burst.repeatedByTalkers) this.#countTalkers(burst);
    } else if (this.#noFixYet && burst.rmc.hasPosition) {
      this.#rmc.addPlan(burst.timeOfDayS, burst.rmc, burst.rmcVoid);
    }
  }

  #dateBurst({days, builder}: EpochTrack, burst: Burst): void {
    days.advance(burst.timeOfDayS, builder.count);
    if (burst.dateDays === NO_DATE) return;
    days.seeDate(burst.dateDays, builder.count, !burst.saysNoFix);
  }

  /** Learns from a change of HDOP which of its neighbours a group of GSA sentences belongs to. */
  #vote({leading, fix, hdopBefore}: Burst): void {
    const toThis = Math.abs(leading.hdop - fix.hdop);
    const toBefore = Math.abs(leading.hdop - hdopBefore);
    if (toThis < toBefore) this.#leadingVotes += 1;
    else if (toBefore < toThis) this.#trailingVotes += 1;
  }

  #groupOf({inside, leading, trailing}: Burst): GsaGroup {
    if (inside.count > 0) return inside;
    const votes = this.#leadingVotes - this.#trailingVotes;
    return votes > 0 || (votes === 0 && this.#startsWithGsa) ? leading : trailing;
  }

  #countTalkers(burst: Burst): void {
    this.#repeatedByTalkers += 1;
    for (const talker of burst.ggaTalkers.list()) this.#talkers.add(talker);
  }
}

function keepMost(most: PrintedDecimals, other: PrintedDecimals): void {
  most.latitude = Math.max(most.latitude, other.latitude);
  most.longitude = Math.max(most.longitude, other.longitude);
  most.altitude = Math.max(most.altitude, other.altitude);
  most.separation = Math.max(most.separation, other.separation);
}

function talkerName(talker: number): string {
  return String.fromCharCode(talker >> 8, talker & 0xff);
}
