import {SatelliteSystem} from '../epochs/epochs.ts';

/** The `SatelliteSystem` that a talker stands for, or `unknown`: GN speaks for several. */
export function systemOfTalker(talker: number): number {
  switch (talker) {
    case 0x4750: // GP
      return SatelliteSystem.gps;
    case 0x474c: // GL
      return SatelliteSystem.glonass;
    case 0x4741: // GA
      return SatelliteSystem.galileo;
    case 0x4742: // GB
    case 0x4244: // BD
      return SatelliteSystem.beidou;
    case 0x4751: // GQ
    case 0x515a: // QZ
      return SatelliteSystem.qzss;
    case 0x4749: // GI
      return SatelliteSystem.navic;
    default:
      return SatelliteSystem.unknown;
  }
}

/**
 * The `SatelliteSystem` of a satellite by its number, where neither talker nor system id says it.
 *
 * Source: NMEA 0183 numbers 1–32 GPS, 33–64 satellite augmentation (counted with GPS, as system id
 * 1 does), 65–99 GLONASS; 193–202 QZSS, 201–237 BeiDou and 301–336 Galileo are common practice
 * without source ("NMEA Revealed" of the gpsd project lists them as seen).
 */
export function systemOfNumber(satellite: number): number {
  if (satellite <= 64) return SatelliteSystem.gps;
  if (satellite <= 99) return SatelliteSystem.glonass;
  if (satellite >= 193 && satellite <= 200) return SatelliteSystem.qzss;
  if (satellite > 200 && satellite <= 237) return SatelliteSystem.beidou;
  return satellite > 300 && satellite <= 336 ? SatelliteSystem.galileo : SatelliteSystem.unknown;
}
