import {describe, expect, test} from 'vitest';
import {EpochFlag, type Epochs, FixClass} from '../../src/epochs/epochs.ts';
import {
  countReasons,
  countUsed,
  type ScreenRules,
  screenByRules,
} from '../../src/occupation/screen.ts';

const NO_RULES: ScreenRules = {
  fix: 'best',
  minSatellites: null,
  maxHdop: null,
  maxPdop: null,
  maxAgeS: null,
  maxSigmaM: null,
  fromGpsSeconds: null,
  toGpsSeconds: null,
  settleS: 0,
};

/** Epochs at 1 Hz with one fix class each; everything else plain. */
function epochsOf(fixClasses: readonly number[]): Epochs {
  const count = fixClasses.length;
  return {
    count,
    gpsSeconds: Float64Array.from({length: count}, (_, i) => 1.4e9 + i),
    latitudeDeg: new Float64Array(count).fill(50),
    longitudeDeg: new Float64Array(count).fill(10),
    ellipsoidalHeightM: new Float64Array(count).fill(100),
    altitudeM: new Float64Array(count).fill(55),
    separationM: new Float32Array(count).fill(45),
    fixClass: Uint8Array.from(fixClasses),
    satellites: new Uint8Array(count).fill(12),
    hdop: new Float32Array(count).fill(0.8),
    pdop: new Float32Array(count).fill(1.6),
    vdop: new Float32Array(count).fill(1.4),
    correctionAgeS: new Float32Array(count).fill(1),
    stationId: new Uint16Array(count).fill(1),
    sigmaEastM: new Float32Array(count).fill(0.01),
    sigmaNorthM: new Float32Array(count).fill(0.01),
    sigmaUpM: new Float32Array(count).fill(0.02),
    flags: new Uint16Array(count),
    inputIndex: new Uint8Array(count),
    lineNumber: Uint32Array.from({length: count}, (_, i) => i + 1),
  };
}

function repeated(fixClass: number, count: number): number[] {
  return new Array<number>(count).fill(fixClass);
}

describe('fix classes', () => {
  test('fixed wins over a longer float part when it lasts two minutes and a tenth', () => {
    const epochs = epochsOf([...repeated(FixClass.float, 900), ...repeated(FixClass.fixed, 130)]);
    const {reason, fixClassKept, fixClassShare} = screenByRules(epochs, NO_RULES);
    expect(fixClassKept).toBe('fixed');
    expect(countReasons(reason)).toEqual({'fix class': 900});
    expect(fixClassShare).toBeCloseTo(130 / 1030, 12);
  });

  test('a class that lasts less than two minutes does not win', () => {
    const epochs = epochsOf([...repeated(FixClass.float, 500), ...repeated(FixClass.fixed, 100)]);
    expect(screenByRules(epochs, NO_RULES).fixClassKept).toBe('float');
  });

  test('the commonest is kept when no class lasts', () => {
    const epochs = epochsOf([
      ...repeated(FixClass.fixed, 20),
      ...repeated(FixClass.differential, 60),
    ]);
    expect(screenByRules(epochs, NO_RULES).fixClassKept).toBe('differential');
  });

  test('precise is a class apart: kept when commonest, never chosen as the better one', () => {
    const mostly = epochsOf([
      ...repeated(FixClass.autonomous, 200),
      ...repeated(FixClass.precise, 900),
    ]);
    expect(screenByRules(mostly, NO_RULES).fixClassKept).toBe('precise');
    const rarely = epochsOf([
      ...repeated(FixClass.precise, 200),
      ...repeated(FixClass.autonomous, 900),
    ]);
    expect(screenByRules(rarely, NO_RULES).fixClassKept).toBe('autonomous');
  });

  test('no fix, simulated and dead-reckoned epochs are never used, whatever is asked', () => {
    const epochs = epochsOf([FixClass.none, FixClass.notMeasured, FixClass.fixed]);
    const {reason} = screenByRules(epochs, {...NO_RULES, fix: 'any'});
    expect([...reason].map((code) => code === 0)).toEqual([false, false, true]);
  });
});

describe('declared rules', () => {
  test('each limit removes what breaks it, and the first broken rule is the reason', () => {
    const epochs = epochsOf(repeated(FixClass.fixed, 300));
    epochs.satellites[10] = 4;
    epochs.hdop[11] = 3;
    epochs.pdop[12] = 9;
    epochs.correctionAgeS[13] = 30;
    epochs.sigmaEastM[14] = 0.5;
    epochs.flags[15] = EpochFlag.invalid;
    epochs.flags[16] = EpochFlag.repeated;
    epochs.hdop[15] = 9;
    const {reason} = screenByRules(epochs, {
      ...NO_RULES,
      minSatellites: 5,
      maxHdop: 2,
      maxPdop: 4,
      maxAgeS: 5,
      maxSigmaM: 0.1,
    });
    expect(countReasons(reason)).toEqual({
      'invalid fix': 1,
      'repeated time': 1,
      'few satellites': 1,
      hdop: 1,
      pdop: 1,
      'correction age': 1,
      'receiver sigma': 1,
    });
    expect(countUsed(reason)).toBe(293);
  });

  test('an epoch that does not give the quantity cannot meet a limit on it', () => {
    const epochs = epochsOf(repeated(FixClass.fixed, 200));
    epochs.hdop.fill(Number.NaN);
    epochs.satellites.fill(255);
    expect(countReasons(screenByRules(epochs, {...NO_RULES, maxHdop: 2}).reason)).toEqual({
      hdop: 200,
    });
    expect(countReasons(screenByRules(epochs, {...NO_RULES, minSatellites: 4}).reason)).toEqual({
      'few satellites': 200,
    });
  });

  test('the time window and the settling time, counted from the first epoch inside it', () => {
    const epochs = epochsOf(repeated(FixClass.fixed, 600));
    const {reason} = screenByRules(epochs, {
      ...NO_RULES,
      fromGpsSeconds: 1.4e9 + 100,
      toGpsSeconds: 1.4e9 + 499,
      settleS: 60,
    });
    expect(countReasons(reason)).toEqual({'outside time window': 200, 'settling time': 60});
    expect(reason.indexOf(0)).toBe(160);
  });
});
