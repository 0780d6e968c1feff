import {nmeaSentences} from './nmea-writer.ts';
import {FLOAT, type SimulatedOccupation, selectEpochs} from './occupation.ts';
import {above, HARBOUR_NMEA, harbourScenario} from './quillmere.ts';
import {randomFrom} from './random.ts';
import {addStep} from './signals.ts';
import {simulate} from './simulate.ts';
import {ecefTable} from './table-writer.ts';
import {uglyLog} from './ugly-log.ts';

const HOUR_S = 3600;
const MINUTE_S = 60;

/**
 * The files of sample-logs/ that are simulated, by name. The same bytes every time.
 *
 * A test compares them with the files; `SAMPLE_LOGS=write npx vitest run test/simulate/make-sample-logs`
 * writes them.
 */
export function sampleLogs(): ReadonlyMap<string, Uint8Array> {
  return new Map([
    ['mole-still.nmea', encoded(moleStill(), '\r\n')],
    ['slip-jump.nmea', encoded(slipJump(), '\r\n')],
    ['chapel-ecef.csv', encoded(chapelTable(), '\n')],
    ['quay-ugly.log', uglyLog()],
  ]);
}

/** Forty minutes over MOLE, antenna 1.742 m above it; nothing happens. */
function moleStill(): string[] {
  return nmeaSentences(moleOccupation(), {
    ...HARBOUR_NMEA,
    place: above('MOLE', 1.742),
    startS: 9 * HOUR_S + 12 * MINUTE_S,
  });
}

/** The errors of the occupation of MOLE: what a perfect reader finds in its log. */
export function moleOccupation(): SimulatedOccupation {
  return simulate(harbourScenario('mole', 40 * MINUTE_S, 1), 5);
}

/** Thirty-six minutes over SLIP, antenna 1.655 m above it; the fix is lost half-way. */
function slipJump(): string[] {
  const still = simulate(harbourScenario('slip', 36 * MINUTE_S, 1), 2);
  const lostS = 18 * MINUTE_S;
  const backS = lostS + 20;
  const stepped = addStep(still, {eastM: 0.02, northM: -0.015, upM: 0.009}, backS);
  return nmeaSentences(
    selectEpochs(lostFix(stepped, lostS, backS), (i) => i < lostS + 13 || i >= backS),
    {
      ...HARBOUR_NMEA,
      place: above('SLIP', 1.655),
      startS: 10 * HOUR_S + 20 * MINUTE_S,
    },
  );
}

/** Float from one second to another: the position wanders off by decimetres. */
function lostFix(occupation: SimulatedOccupation, fromS: number, toS: number): SimulatedOccupation {
  const random = randomFrom(3, 'lost fix');
  const toward = [random.normal(), random.normal(), 1.9 * random.normal()].map((x) => 0.02 * x);
  const wandering = (column: Float64Array, axis: number) =>
    column.map((value, i) =>
      i >= fromS && i < toS
        ? value + toward[axis]! * (i - fromS + 2) + 0.01 * random.normal()
        : value,
    );
  return {
    ...occupation,
    eastM: wandering(occupation.eastM, 0),
    northM: wandering(occupation.northM, 1),
    upM: wandering(occupation.upM, 2),
    fixClass: occupation.fixClass.map((quality, i) => (i >= fromS && i < toS ? FLOAT : quality)),
  };
}

/** An hour over CHAPEL every five seconds, antenna 1.502 m above it, as a table. */
function chapelTable(): string[] {
  const occupation = simulate(harbourScenario('chapel', HOUR_S, 5), 4);
  return ecefTable(occupation, {
    place: above('CHAPEL', 1.502),
    date: {year: 2026, month: 5, day: 12},
    startS: 13 * HOUR_S + 5 * MINUTE_S,
    decimals: 4,
    claimedSigmaM: {x: 0.0094, y: 0.0078, z: 0.0091},
    satellites: 27,
  });
}

function encoded(lines: readonly string[], lineEnd: string): Uint8Array {
  return new TextEncoder().encode(lines.map((line) => line + lineEnd).join(''));
}
