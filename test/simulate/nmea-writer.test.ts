import {parseNmeaSentence} from 'nmea-simple';
import {describe, expect, test} from 'vitest';
import {dilutionOf, satellitesInView} from './constellation.ts';
import {latitudeFields, longitudeFields, sentence} from './nmea-fields.ts';
import {nmeaSentences} from './nmea-writer.ts';
import {FLOAT} from './occupation.ts';
import {placeNear} from './place.ts';
import {above, HARBOUR_NMEA, harbourScenario, QUILLMERE} from './quillmere.ts';
import {simulate} from './simulate.ts';

const occupation = simulate(harbourScenario('writer', 120, 1), 1);
const options = {...HARBOUR_NMEA, place: above('SLIP', 1.5), startS: 86_350};

describe('NMEA writer', () => {
  // The sentence of NMEA 0183 tutorials everywhere; its checksum is 47.
  test('reference: checksum of the classical GGA sentence', () => {
    const body = 'GPGGA,123519,4807.038,N,01131.000,E,1,08,0.9,545.4,M,46.9,M,,';
    expect(sentence(body)).toBe(`$${body}*47`);
  });

  test('reference: nmea-simple reads every sentence that it knows, and the same numbers', () => {
    const all = [...options.sentences, ['GNS', 1], ['VTG', 1], ['GLL', 1], ['DTM', 60]] as const;
    const texts = nmeaSentences(occupation, {...options, sentences: all});
    let compared = 0;
    for (const text of texts) {
      const packet = parseNmeaSentence(text);
      if (packet.sentenceId !== 'GGA') continue;
      const place = placeNear(options.place, {
        eastM: occupation.eastM[compared]!,
        northM: occupation.northM[compared]!,
        upM: occupation.upM[compared]!,
      });
      expect(packet.fixType).toBe('rtk');
      expect(Math.abs(packet.latitude - place.latitudeDeg)).toBeLessThan(1e-10);
      expect(Math.abs(packet.longitude - place.longitudeDeg)).toBeLessThan(1e-10);
      const heightM = packet.altitudeMeters + packet.geoidalSeperation;
      expect(Math.abs(heightM - place.ellipsoidalHeightM)).toBeLessThan(0.000051);
      compared += 1;
    }
    expect(compared).toBe(120);
  });

  test('property: time and date cross midnight together', () => {
    const dated = nmeaSentences(occupation, {...options, sentences: [['RMC', 1]]});
    expect(dated[49]).toContain('GNRMC,235959.00,');
    expect(dated[49]).toContain(',120526,');
    expect(dated[50]).toContain('GNRMC,000000.00,');
    expect(dated[50]).toContain(',130526,');
  });

  test('property: quality, mode and the receiver’s own sigma follow the fix class', () => {
    const floating = {...occupation, fixClass: occupation.fixClass.map(() => FLOAT)};
    const [gga, rmc, gst] = nmeaSentences(floating, options);
    expect(gga!.split(',')[6]).toBe('5');
    expect(rmc).toContain(',F,V*');
    expect(gst).toContain(',0.1360,0.1220,0.2460*');
  });
});

describe('angles as fields', () => {
  test.each([
    [41.5, 4, '4130.0000,N'],
    [-0.99999999999, 7, '0100.0000000,S'],
    [89.999, 0, '9000,N'],
    [7.00001, 5, '0700.00060,N'],
  ])('property: latitude %f with %i decimals', (deg, decimals, text) => {
    expect(latitudeFields(deg, decimals)).toBe(text);
  });

  test('property: longitude has three digits of degrees', () => {
    expect(longitudeFields(-152.25, 3)).toBe('15215.000,W');
    expect(longitudeFields(9.9999999999, 4)).toBe('01000.0000,E');
  });
});

describe('invented constellation', () => {
  test('property: satellites rise and set, and the geometry is that of four systems', () => {
    const systems = new Map<string, Set<number>>();
    for (let hour = 0; hour < 24; hour++) {
      const inView = satellitesInView(QUILLMERE.QUAY, hour * 3600, 5);
      expect(inView.length).toBeGreaterThan(20);
      expect(inView.length).toBeLessThan(60);
      const {pdop, hdop, vdop} = dilutionOf(inView.filter(({elevationDeg}) => elevationDeg > 12));
      expect(pdop).toBeGreaterThan(0.5);
      expect(pdop).toBeLessThan(2.5);
      expect(Math.hypot(hdop, vdop)).toBeCloseTo(pdop, 10);
      for (const {system, id} of inView) {
        systems.set(system, (systems.get(system) ?? new Set()).add(id));
      }
    }
    expect([...systems.keys()].sort()).toEqual(['beidou', 'galileo', 'glonass', 'gps']);
    for (const ids of systems.values()) expect(ids.size).toBeGreaterThan(20);
  });

  test('property: a satellite overhead and three level ones give the DOP of that geometry', () => {
    const satellite = {system: 'gps', id: 1, carrierToNoiseDbHz: 45} as const;
    const {hdop, vdop} = dilutionOf([
      {...satellite, elevationDeg: 90, azimuthDeg: 0},
      ...[0, 120, 240].map((azimuthDeg) => ({...satellite, elevationDeg: 0, azimuthDeg})),
    ]);
    // Level satellites fix east and north with 3/2 each and the clock with 1/3; up is 1 + 1/3.
    expect(hdop).toBeCloseTo(Math.sqrt(4 / 3), 12);
    expect(vdop).toBeCloseTo(Math.sqrt(4 / 3), 12);
  });
});
