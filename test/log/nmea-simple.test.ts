import {type Packet, parseNmeaSentence} from 'nmea-simple';
import {describe, expect, test} from 'vitest';
import {FixClass} from '../../src/epochs/epochs.ts';
import {SatellitesBuilder} from '../../src/epochs/satellites-builder.ts';
import {SatelliteSample} from '../../src/log/gsv.ts';
import {SentenceFields} from '../../src/log/sentence-fields.ts';
import {daysFromCivil} from '../../src/time/calendar.ts';
import {decoded} from './decoded.ts';
import {bytesOf, REAL_NMEA_LOGS, realLog} from './nmea-text.ts';

/**
 * Our decoders beside nmea-simple, an independent program, over all real recordings: every field
 * that is not empty must have the same value. What nmea-simple says of empty fields is not looked at,
 * as it turns them into zero.
 */

const CLASSES: Readonly<Record<string, number>> = {
  none: FixClass.none,
  fix: FixClass.autonomous,
  delta: FixClass.differential,
  pps: FixClass.precise,
  rtk: FixClass.fixed,
  frtk: FixClass.float,
  estimated: FixClass.notMeasured,
  manual: FixClass.notMeasured,
  simulation: FixClass.notMeasured,
};

interface Line {
  readonly fields: readonly string[];
  readonly packet: Packet;
}

/** The sentences of one type that nmea-simple accepts, in their order. */
function sentencesOf(bytes: Uint8Array, type: string): Line[] {
  const text = Buffer.from(bytes).toString('latin1');
  const pattern = new RegExp(`\\$(?!P)[A-Z]{2}${type},[ -#%-)+-~]*\\*[0-9A-F]{2}`, 'g');
  return [...text.matchAll(pattern)].flatMap(([sentence]) => {
    try {
      const packet = parseNmeaSentence(sentence);
      return [{fields: sentence.slice(0, sentence.indexOf('*')).split(','), packet}];
    } catch {
      // A wrong checksum: not a sentence for either program.
      return [];
    }
  });
}

function timeOfDayS(date: Date): number {
  return (
    date.getUTCHours() * 3600 +
    date.getUTCMinutes() * 60 +
    date.getUTCSeconds() +
    date.getUTCMilliseconds() / 1000
  );
}

function daysOf(date: Date): number {
  return daysFromCivil({
    year: date.getUTCFullYear(),
    month: date.getUTCMonth() + 1,
    day: date.getUTCDate(),
  });
}

/** Compares a value with that of the library when the field is printed, else expects absence. */
function agree(field: string | undefined, ours: number | undefined, theirs: number): number {
  if (field === undefined || field === '') {
    expect(ours).toBeNaN();
    return 0;
  }
  expect(ours).toBe(theirs);
  return 1;
}

/** Milliseconds: finer than that the library does not read. */
function agreeInTime(field: string | undefined, ours: number | undefined, theirs: Date): number {
  if (field === undefined || field === '') {
    expect(ours).toBeNaN();
    return 0;
  }
  expect(Math.abs((ours ?? Number.NaN) - timeOfDayS(theirs))).toBeLessThan(0.0011);
  return 1;
}

let compared = 0;

describe('decoders agree with nmea-simple on every non-empty field', () => {
  test.each(REAL_NMEA_LOGS)('reference: nmea-simple 3.3.0, %s', (file) => {
    const bytes = realLog(file);
    const {columns} = decoded(bytes);
    const before = compared;

    // Rows of GGA and GNS stand in the order of their sentences.
    const kinds = [...columns.order.kind.subarray(0, columns.order.count)].filter((k) => k < 3);
    const rowsOf = (kind: number) => kinds.flatMap((k, row) => (k === kind ? [row] : []));
    for (const [type, kind] of [
      ['GGA', 1],
      ['GNS', 2],
    ] as const) {
      const lines = sentencesOf(bytes, type);
      const rows = rowsOf(kind);
      expect(rows).toHaveLength(lines.length);
      const at = type === 'GGA' ? {sep: 11, age: 13, station: 14} : {sep: 10, age: 11, station: 12};
      lines.forEach(({fields, packet}, k) => {
        if (packet.sentenceId !== 'GGA' && packet.sentenceId !== 'GNS') throw new Error(type);
        const {fixes} = columns;
        const row = rows[k]!;
        const zero = packet.latitude === 0 && packet.longitude === 0;
        compared += agreeInTime(fields[1], fixes.timeOfDayS[row], packet.time);
        if (!zero) {
          compared += agree(fields[2], fixes.latitudeDeg[row], packet.latitude);
          compared += agree(fields[4], fixes.longitudeDeg[row], packet.longitude);
        }
        if (packet.sentenceId === 'GGA') {
          expect(fixes.fixClass[row]).toBe(CLASSES[packet.fixType]);
        }
        if (fields[7] !== '') expect(fixes.satellites[row]).toBe(packet.satellitesInView);
        compared += agree(fields[8], fixes.hdop[row], packet.horizontalDilution);
        compared += agree(fields[9], fixes.altitudeM[row], packet.altitudeMeters);
        compared += agree(fields[at.sep], fixes.separationM[row], packet.geoidalSeperation);
        compared += agree(fields[at.age], fixes.correctionAgeS[row], packet.differentialAge!);
        if ((fields[at.station] ?? '') !== '') {
          expect(fixes.stationId[row]).toBe(Number(packet.differentialRefStn));
        }
      });
    }

    const gst = sentencesOf(bytes, 'GST');
    expect(columns.gst.count).toBe(gst.length);
    gst.forEach(({fields, packet}, row) => {
      if (packet.sentenceId !== 'GST') throw new Error('GST');
      compared += agreeInTime(fields[1], columns.gst.timeOfDayS[row], packet.time);
      compared += agree(fields[6], columns.gst.sigmaLatitudeM[row], packet.latitudeError);
      compared += agree(fields[7], columns.gst.sigmaLongitudeM[row], packet.longitudeError);
      compared += agree(fields[8], columns.gst.sigmaAltitudeM[row], packet.altitudeError);
    });

    const rmc = sentencesOf(bytes, 'RMC');
    expect(columns.rmc.count).toBe(rmc.length);
    rmc.forEach(({fields, packet}, row) => {
      if (packet.sentenceId !== 'RMC') throw new Error('RMC');
      if (fields[9] !== '') expect(columns.rmc.dateDays[row]).toBe(daysOf(packet.datetime));
      const wholeSecondS = Math.floor(columns.rmc.timeOfDayS[row]!);
      if (fields[1] !== '') expect(wholeSecondS).toBe(Math.floor(timeOfDayS(packet.datetime)));
      expect(columns.rmc.status[row]).toBe(packet.status === 'valid' ? 1 : 2);
      compared += 3;
    });

    const zda = sentencesOf(bytes, 'ZDA');
    expect(columns.zda.count).toBe(zda.length);
    zda.forEach(({fields, packet}, row) => {
      if (packet.sentenceId !== 'ZDA') throw new Error('ZDA');
      compared += agreeInTime(fields[1], columns.zda.timeOfDayS[row], packet.datetime);
      if (fields[2] !== '') expect(columns.zda.dateDays[row]).toBe(daysOf(packet.datetime));
    });

    const gsa = sentencesOf(bytes, 'GSA');
    expect(columns.gsa.count).toBe(gsa.length);
    let id = 0;
    gsa.forEach(({fields, packet}, row) => {
      if (packet.sentenceId !== 'GSA') throw new Error('GSA');
      const ids = columns.gsaIds.id.subarray(id, id + columns.gsa.ids[row]!);
      id += ids.length;
      const theirs = packet.satellites.filter((one) => one !== 0 && !Number.isNaN(one));
      expect([...ids].map((one) => one % 1024)).toEqual(theirs);
      compared += agree(fields[15], columns.gsa.pdop[row], packet.PDOP) + ids.length;
      compared += agree(fields[16], columns.gsa.hdop[row], packet.HDOP);
      compared += agree(fields[17], columns.gsa.vdop[row], packet.VDOP);
    });

    const gll = sentencesOf(bytes, 'GLL');
    expect(columns.gll.count).toBe(gll.length);
    const hasFixes = columns.fixes.latitudeDeg
      .subarray(0, columns.fixes.count)
      .some((value) => !Number.isNaN(value));
    gll.forEach(({fields, packet}, row) => {
      if (packet.sentenceId !== 'GLL') throw new Error('GLL');
      // Looked at only where there are no better positions, and only latitudes that exist.
      if (hasFixes || packet.latitude > 90) return;
      compared += agree(fields[1], columns.gll.latitudeDeg[row], packet.latitude);
      compared += agree(fields[3], columns.gll.longitudeDeg[row], packet.longitude);
      compared += agreeInTime(fields[5], columns.gll.timeOfDayS[row], packet.time);
    });

    for (const {fields, packet} of sentencesOf(bytes, 'GSV')) {
      if (packet.sentenceId !== 'GSV') throw new Error('GSV');
      const own = satellitesOf(fields);
      packet.satellites.forEach((theirs, k) => {
        const [number, elevation, azimuth, ratio] = fields.slice(4 + 4 * k, 8 + 4 * k);
        // Places without a satellite, and the signal id behind the last one.
        if (number === '' || azimuth === undefined) return;
        const row = own.satelliteId.indexOf(theirs.prnNumber);
        expect(row).toBeGreaterThanOrEqual(0);
        compared += agree(elevation, own.elevationDeg[row], theirs.elevationDegrees);
        compared += agree(azimuth, own.azimuthDeg[row], theirs.azimuthTrue);
        // A ratio of zero is "not tracked".
        if (theirs.SNRdB > 0) compared += agree(ratio, own.carrierToNoiseDbHz[row], theirs.SNRdB);
      });
    }
    if (!/s15|s24/.test(file)) expect(compared - before).toBeGreaterThan(20);
  });

  test('many fields have been compared', () => {
    expect(compared).toBeGreaterThan(100_000);
  });
});

function satellitesOf(fields: readonly string[]) {
  const split = new SentenceFields();
  const text = fields.join(',');
  split.begin(bytesOf(`${text}*`), 7, text.length, 7);
  const sample = new SatelliteSample();
  expect(sample.take(split, 0x4750)).toBe(0);
  const builder = new SatellitesBuilder();
  sample.moveTo(builder, 0);
  return builder.finish();
}
