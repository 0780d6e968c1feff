import {FixClass} from '../epochs/epochs.ts';

/**
 * The class that a mode indicator of GNS, RMC or GLL stands for; `unknown` for other letters.
 *
 * Source: NMEA 0183 v2.3 and later, as described in "NMEA Revealed" of the gpsd project
 * (www/NMEA.adoc), section GNS.
 */
export function classOfMode(letter: number): FixClass {
  switch (letter) {
    case 0x41: // A
      return FixClass.autonomous;
    case 0x44: // D
      return FixClass.differential;
    case 0x46: // F
      return FixClass.float;
    case 0x52: // R
      return FixClass.fixed;
    case 0x50: // P
      return FixClass.precise;
    case 0x4e: // N
      return FixClass.none;
    case 0x45: // E
    case 0x4d: // M
    case 0x53: // S
      return FixClass.notMeasured;
    default:
      return FixClass.unknown;
  }
}

/**
 * Order of the classes from no measurement to fixed, where one has to be preferred: among systems
 * of one GNS sentence the least, among talkers that repeat an epoch the greatest.
 */
export function rankOfClass(fixClass: number): number {
  switch (fixClass) {
    case FixClass.fixed:
      return 7;
    case FixClass.float:
      return 6;
    case FixClass.precise:
      return 5;
    case FixClass.differential:
      return 4;
    case FixClass.autonomous:
      return 3;
    case FixClass.unknown:
      return 2;
    case FixClass.notMeasured:
      return 1;
    default:
      return 0;
  }
}
