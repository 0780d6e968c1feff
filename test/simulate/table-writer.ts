import {type CivilDate, civilTime} from './nmea-fields.ts';
import type {SimulatedOccupation} from './occupation.ts';
import {geocentricNear, type Place} from './place.ts';

export interface TableOptions {
  readonly place: Place;
  readonly date: CivilDate;
  /** Time of day of the first epoch, UTC. */
  readonly startS: number;
  readonly decimals: number;
  readonly claimedSigmaM: {readonly x: number; readonly y: number; readonly z: number};
  readonly satellites: number;
}

/** The lines of a table of geocentric positions, header first, without line ends. */
export function ecefTable(occupation: SimulatedOccupation, options: TableOptions): string[] {
  const {x, y, z} = options.claimedSigmaM;
  const claimed = [x, y, z].map((sigmaM) => sigmaM.toFixed(4)).join(',');
  const rows = Array.from(occupation.elapsedS, (elapsedS, i) => {
    const position = geocentricNear(options.place, {
      eastM: occupation.eastM[i]!,
      northM: occupation.northM[i]!,
      upM: occupation.upM[i]!,
    });
    const printed = position.map((value) => value.toFixed(options.decimals)).join(',');
    const {iso} = civilTime(options.date, options.startS + elapsedS);
    return `${iso},${printed},${claimed},${occupation.fixClass[i]},${options.satellites}`;
  });
  return ['time,x_m,y_m,z_m,sigma_x_m,sigma_y_m,sigma_z_m,quality,satellites', ...rows];
}
