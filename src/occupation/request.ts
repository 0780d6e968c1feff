import type {Epochs, Satellites} from '../epochs/epochs.ts';
import type {Mark} from '../fieldbook/mark.ts';
import type {Sheet} from '../fieldbook/sheet.ts';
import type {Ellipsoid} from '../geodesy/ellipsoid.ts';
import type {PointMotion} from '../geodesy/point-motion.ts';
import type {Geodetic} from '../geodesy/types.ts';
import type {Asked} from './compare.ts';
import type {CauseValues} from './diagnosis/hypothesis.ts';
import type {Say} from './notices.ts';
import type {EarlierCheck} from './other-setups.ts';
import type {InputAccount, Position, Result, Setting, Severity} from './result.ts';
import type {ScreenRules} from './screen.ts';
import type {GeoidRequest} from './separation.ts';

/** A finding of the reading stage: a code with values. */
export interface Finding {
  readonly code: string;
  readonly severity: Severity;
  readonly values: Readonly<Record<string, string | number | boolean | null>>;
}

/** What reading the joined logs yielded, as far as the computation needs it. */
export interface LogRead {
  readonly epochs: Epochs;
  readonly satellites: Satellites;
  readonly resolution: {
    readonly latitudeDeg: number;
    readonly longitudeDeg: number;
    readonly heightM: number;
    readonly separationM: number;
  };
  readonly findings: readonly Finding[];
  /** `gps`: the leap-second table was needed to print UTC. */
  readonly timeScale: 'utc' | 'gps';
}

/** Everything that one reduction rests on; every default is already filled in. */
export interface ReduceRequest {
  readonly command: Result['command'];
  readonly program: Result['program'];
  readonly inputs: readonly InputAccount[];
  readonly log: LogRead;
  readonly ellipsoid: Ellipsoid;
  readonly rules: ScreenRules;
  /** Reference that the user named; null: the mark, else the mean. */
  readonly at: Geodetic | null;
  readonly mark: Mark | null;
  /** Name of the mark for the header when there are no coordinates to compare with. */
  readonly markName: string | null;
  /** Empty when no field sheet was given. */
  readonly sheet: Sheet;
  readonly asked: readonly Asked[];
  readonly frame: {readonly name: string; readonly from: NonNullable<Position['frameFrom']>} | null;
  readonly coordinateEpoch: number | null;
  /** How the mark moves between epochs, as the user states it. */
  readonly motion: PointMotion | null;
  readonly geoid: GeoidRequest;
  /** Map grid for the position, as written. */
  readonly grid: string | null;
  readonly movementLimitM: number | null;
  /** Wished 95 % horizontal radius. */
  readonly wantM: number | null;
  readonly settings: Readonly<Record<string, Setting>>;
  /** Results of other checks that this one is set beside. */
  readonly earlier: readonly EarlierCheck[];
  /** All marks of the marks file: one of them may have been occupied by mistake. */
  readonly marks: readonly Mark[];
  readonly say: Say;
  /** Words for what an offset is consistent with. */
  readonly sayCause: {
    title(code: string, values: CauseValues): string;
    advice(code: string, values: CauseValues): string;
    pair(plan: Cause, height: Cause): string;
  };
}

interface Cause {
  readonly code: string;
  readonly values: CauseValues;
}
