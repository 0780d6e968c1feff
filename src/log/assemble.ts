import {SECONDS_PER_DAY} from '../time/calendar.ts';
import {Burst, Fix, GsaGroup} from './burst.ts';
import type {NmeaBatch} from './decode.ts';
import {EpochTrack} from './epoch-track.ts';
import {NO_DATE} from './field-reader.ts';
import {LogAccount} from './log-account.ts';
import {SatelliteSampler} from './satellite-sampler.ts';
import {
  noDecimals,
  type PrintedDecimals,
  SENTENCE_KINDS,
  type SentenceColumns,
  SentenceKind,
} from './sentence-columns.ts';
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
  readonly #fixes = new EpochTrack();
  /** Plan positions, gathered as long as there is no position of GGA or GNS. */
  readonly #rmc = new EpochTrack();
  readonly #gll = new EpochTrack();
  readonly #open: Burst[] = [];
  readonly #free: Burst[] = [];
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

  /** Takes the next batch; nothing of it is kept but what has been assembled. */
  add({columns, account, datums}: NmeaBatch): void {
    const rows = new Uint32Array(SENTENCE_KINDS);
    this.#idAt = 0;
    this.#sampler.beginBatch();
    const {order} = columns;
    for (let k = 0; k < order.count; k += 1) {
      const kind = (order.kind[k] ?? 0) as SentenceKind;
      const isFix = kind === SentenceKind.gga || kind === SentenceKind.gns;
      const counter = isFix ? SentenceKind.gga : kind;
      const row = rows[counter] ?? 0;
      rows[counter] = row + 1;
      this.#take(kind, columns, row);
    }
    this.#account.add(account);
    for (const source of ['fixes', 'rmc', 'gll'] as const) {
      keepMost(this.#decimals[source], columns.decimals[source]);
    }
    for (const datum of datums) if (!this.#datums.includes(datum)) this.#datums.push(datum);
  }

  finish(): AssembledLog {
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

  #take(kind: SentenceKind, columns: SentenceColumns, row: number): void {
    switch (kind) {
      case SentenceKind.gga:
      case SentenceKind.gns:
        this.#takeFix(kind === SentenceKind.gga, columns, row);
        return;
      case SentenceKind.rmc: {
        const timeOfDayS = columns.rmc.timeOfDayS[row] ?? Number.NaN;
        if (Number.isNaN(timeOfDayS)) return;
        this.#seeTime(timeOfDayS);
        this.#burstAt(timeOfDayS).takeRmc(columns.rmc, row, this.#account.lineFeeds);
        this.#seeDateOfPlan(timeOfDayS, columns.rmc.dateDays[row] ?? NO_DATE);
        return;
      }
      case SentenceKind.gst: {
        const timeOfDayS = columns.gst.timeOfDayS[row] ?? Number.NaN;
        if (Number.isNaN(timeOfDayS)) return;
        this.#seeTime(timeOfDayS);
        this.#burstAt(timeOfDayS).takeGst(columns.gst, row);
        return;
      }
      case SentenceKind.zda: {
        const timeOfDayS = columns.zda.timeOfDayS[row] ?? Number.NaN;
        if (Number.isNaN(timeOfDayS)) return;
        this.#seeTime(timeOfDayS);
        this.#burstAt(timeOfDayS).takeZda(columns.zda, row);
        this.#seeDateOfPlan(timeOfDayS, columns.zda.dateDays[row] ?? NO_DATE);
        return;
      }
      case SentenceKind.gsa:
        this.#takeGsa(columns, row);
        return;
      case SentenceKind.gsv:
        this.#sampler.take(columns, row, this.#account);
        return;
      case SentenceKind.gll:
        this.#takeGll(columns, row);
        return;
      default:
        return;
    }
  }

  #takeFix(isGga: boolean, columns: SentenceColumns, row: number): void {
    const {fixes} = columns;
    const hasPosition = !Number.isNaN(fixes.latitudeDeg[row] ?? Number.NaN);
    if (!hasPosition) this.#withoutPosition += 1;
    const timeOfDayS = fixes.timeOfDayS[row] ?? Number.NaN;
    if (Number.isNaN(timeOfDayS)) return;
    const satellites = fixes.satellites[row] ?? NO_SATELLITES;
    if (isGga && satellites > MOST_IN_GGA && satellites !== NO_SATELLITES) {
      this.#countsBeyondTwelve = true;
    }
    this.#seeTime(timeOfDayS);
    const talker = fixes.talker[row] ?? 0;
    let burst = this.#burstAt(timeOfDayS);
    if (hasPosition && burst.holds(isGga, talker)) burst = this.#newBurst(timeOfDayS);
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
    if (!this.#noFixYet || Number.isNaN(timeOfDayS) || Number.isNaN(gll.latitudeDeg[row])) return;
    this.#gll.days.advance(timeOfDayS, this.#gll.builder.count);
    this.#plan.takePlan(gll, row, this.#account.lineFeeds);
    this.#gll.addPlan(timeOfDayS, this.#plan, gll.status[row] === SentenceStatus.void);
  }

  #seeTime(timeOfDayS: number): void {
    if (timeOfDayS >= SECONDS_PER_DAY) this.#leapSeconds += 1;
    this.#sampler.seeTime(timeOfDayS, this.#fixes.days, this.#fixes.builder.count);
  }

  #seeDateOfPlan(timeOfDayS: number, dateDays: number): void {
    if (!this.#noFixYet || dateDays === NO_DATE) return;
    const {days, builder} = this.#gll;
    days.advance(timeOfDayS, builder.count);
    days.seeDate(dateDays, builder.count, true);
  }

  /** The open burst of that time, the newest if there are several, or a new one. */
  #burstAt(timeOfDayS: number): Burst {
    for (let k = this.#open.length - 1; k >= 0; k -= 1) {
      const burst = this.#open[k];
      if (burst?.timeOfDayS !== timeOfDayS) continue;
      if (k === this.#open.length - 1 && this.#pending.count > 0) {
        burst.inside.add(this.#pending);
        this.#pending.clear();
      }
      return burst;
    }
    return this.#newBurst(timeOfDayS);
  }

  #newBurst(timeOfDayS: number): Burst {
    if (this.#open.length === OPEN_BURSTS) this.#flushOldest();
    const before = this.#open.at(-1);
    const burst = this.#free.pop() ?? new Burst();
    this.#serial += 1;
    burst.begin(timeOfDayS);
    if (this.#pending.count > 0) {
      before?.trailing.add(this.#pending);
      burst.leading.add(this.#pending);
      burst.hdopBefore = before?.fix.hdop ?? Number.NaN;
      this.#pending.clear();
    }
    this.#open.push(burst);
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
    for (const talker of burst.ggaTalkers) this.#talkers.add(talker);
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
