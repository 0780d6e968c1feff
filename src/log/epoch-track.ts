import {EpochsBuilder} from '../epochs/builder.ts';
import {EpochFlag, FixClass} from '../epochs/epochs.ts';
import type {Burst, Fix, GsaGroup} from './burst.ts';
import {DayTrack} from './day-track.ts';

/** A GGA sentence without room for more says "12" for twelve and for every larger number. */
const MOST_IN_GGA = 12;
const NO_SATELLITES = 255;

/**
 * Epochs in the order of the log, from one source of positions. Until the days are known at the end,
 * `gpsSeconds` holds the time of day.
 */
export class EpochTrack {
  readonly builder: EpochsBuilder;
  readonly days = new DayTrack();

  /** @param mostEpochs how many the log may hold, if its size is known */
  constructor(mostEpochs: number | undefined) {
    this.builder = new EpochsBuilder(mostEpochs);
  }

  /** Adds the epoch of a burst with its best position; `group` holds the GSA sentences of it. */
  addFix(burst: Burst, group: GsaGroup): void {
    const {fix, gns} = burst;
    const row = this.builder.add();
    const {block} = this.builder;
    block.gpsSeconds[row] = burst.timeOfDayS;
    block.latitudeDeg[row] = fix.latitudeDeg;
    block.longitudeDeg[row] = fix.longitudeDeg;
    block.altitudeM[row] = fix.altitudeM;
    block.separationM[row] = fix.separationM;
    block.ellipsoidalHeightM[row] = fix.altitudeM + fix.separationM;
    block.fixClass[row] = fix.fixClass;
    block.hdop[row] = Number.isNaN(fix.hdop) ? group.hdop : fix.hdop;
    block.pdop[row] = group.pdop;
    block.vdop[row] = group.vdop;
    block.correctionAgeS[row] = fix.correctionAgeS;
    block.stationId[row] = fix.stationId;
    block.sigmaEastM[row] = burst.sigmaEastM;
    block.sigmaNorthM[row] = burst.sigmaNorthM;
    block.sigmaUpM[row] = burst.sigmaUpM;
    block.lineNumber[row] = fix.lineNumber;
    let flags: number = isInvalid(burst, fix) ? EpochFlag.invalid : 0;
    if (Number.isNaN(fix.altitudeM)) flags |= EpochFlag.planOnly;
    let {satellites} = fix;
    if (group.satellites > 0) satellites = Math.min(group.satellites, NO_SATELLITES - 1);
    else if (satellites === MOST_IN_GGA && fix !== gns) {
      if (gns.hasPosition && gns.satellites !== NO_SATELLITES) satellites = gns.satellites;
      else flags |= EpochFlag.satellitesAtLeast;
    }
    block.satellites[row] = satellites;
    block.flags[row] = flags;
  }

  /** Adds an epoch of which only latitude and longitude are known. */
  addPlan(timeOfDayS: number, plan: Fix, isVoid: boolean): void {
    const row = this.builder.add();
    const {block} = this.builder;
    block.gpsSeconds[row] = timeOfDayS;
    block.latitudeDeg[row] = plan.latitudeDeg;
    block.longitudeDeg[row] = plan.longitudeDeg;
    block.fixClass[row] = plan.fixClass;
    block.lineNumber[row] = plan.lineNumber;
    const isInvalidPlan = isVoid || plan.fixClass === FixClass.none;
    block.flags[row] = EpochFlag.planOnly | (isInvalidPlan ? EpochFlag.invalid : 0);
  }
}

/** The navigational status V of RMC and GNS is not meant here: it says "not provided". */
function isInvalid(burst: Burst, fix: Fix): boolean {
  return fix.fixClass === FixClass.none || (burst.rmcVoid && !burst.rmcValid);
}
