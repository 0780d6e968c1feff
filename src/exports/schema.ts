import {
  COUNT,
  type DocumentSchema,
  FLAG,
  LENGTH_M,
  listOf,
  mapOf,
  NOTICE,
  NUMBER,
  object,
  oneOf,
  orNull,
  PROGRAM,
  perAxis,
  SCALAR,
  type Schema,
  TEXT,
  UTC,
  XYZ,
} from './schema-parts.ts';

const DEGREES: Schema = {type: 'number', description: 'degrees'};
const PER_AXIS_OR_NULL = perAxis(orNull(LENGTH_M));
const COUNTS = mapOf(COUNT);
const INPUT = object({
  name: TEXT,
  bytes: COUNT,
  sha256: TEXT,
  kind: oneOf('nmea', 'table'),
  lines: object({total: COUNT, used: COUNT, ignored: COUNTS, rejected: COUNTS}),
  betweenBytes: COUNT,
  sentences: COUNTS,
  firstUtc: orNull(UTC),
  lastUtc: orNull(UTC),
});

const EPOCHS = object({
  read: COUNT,
  used: COUNT,
  screened: COUNTS,
  firstUtc: orNull(UTC),
  lastUtc: orNull(UTC),
  intervalS: orNull(NUMBER),
  gaps: listOf(object({fromUtc: UTC, toUtc: UTC, durationS: NUMBER})),
  resolutionM: PER_AXIS_OR_NULL,
  fixClasses: COUNTS,
});

const GEODETIC = object({
  latitudeDeg: DEGREES,
  longitudeDeg: DEGREES,
  ellipsoidalHeightM: orNull(LENGTH_M),
});

const REFERENCE = object({
  from: oneOf('mark', 'option', 'mean'),
  name: orNull(TEXT),
  geodetic: GEODETIC,
  ecefM: orNull(XYZ),
});

const GRID = object({
  name: TEXT,
  eastingM: LENGTH_M,
  northingM: LENGTH_M,
  convergenceDeg: DEGREES,
  pointScale: orNull(NUMBER),
  elevationFactor: orNull(NUMBER),
  combinedFactor: orNull(NUMBER),
});

const ELLIPSE = object({semiMajorM: LENGTH_M, semiMinorM: LENGTH_M, azimuthDeg: DEGREES});

const POSITION = object({
  of: oneOf('mark', 'antenna reference point', 'phase centre', 'antenna, point not stated'),
  frame: orNull(TEXT),
  frameFrom: oneOf('sheet', 'option', 'assumed', null),
  coordinateEpoch: orNull({type: 'number', description: 'decimal year'}),
  observedUtc: UTC,
  ecefM: orNull(XYZ),
  geodetic: GEODETIC,
  orthometricHeightM: orNull(LENGTH_M),
  separation: orNull(
    object({
      separationM: LENGTH_M,
      from: oneOf('geoid grid', 'command line', 'field sheet', 'receiver'),
      model: orNull(TEXT),
      receiverM: orNull(LENGTH_M),
    }),
  ),
  grid: orNull(GRID),
  originEcefM: XYZ,
  standardUncertaintyM: orNull(PER_AXIS_OR_NULL),
  uncertainty95M: orNull(
    object({...PER_AXIS_OR_NULL.properties, horizontalRadius: orNull(LENGTH_M)}),
  ),
  ellipse95: orNull(ELLIPSE),
  covarianceEnuM2: orNull(
    listOf(listOf(orNull({type: 'number', description: 'square metres'}), 3), 3),
  ),
  independentLooks: orNull(perAxis(orNull(NUMBER))),
  correlationTimeS: orNull(perAxis(orNull(NUMBER))),
});

const BUDGET_ROW = object({
  source: TEXT,
  standardUncertaintyM: orNull(PER_AXIS_OR_NULL),
  sharedBy: oneOf('base', 'service', 'antenna', 'frame', 'geoid', 'mark', 'site', null),
  id: orNull(TEXT),
  from: TEXT,
});

const SCATTER_MEASURES = object({
  standardDeviationM: PER_AXIS_OR_NULL,
  drmsM: orNull(LENGTH_M),
  cepM: orNull(LENGTH_M),
  r95M: orNull(LENGTH_M),
  ellipse: orNull(ELLIPSE),
});
const SCATTER = object({observed: SCATTER_MEASURES, normalTheory: SCATTER_MEASURES});

const SCREENING = object({
  fixClassKept: orNull(TEXT),
  withoutScreening: orNull(object({offsetFromResultM: PER_AXIS_OR_NULL, epochs: COUNT})),
  receiverSigmaM: orNull(PER_AXIS_OR_NULL),
});

const DRIFT = object({
  rateMPerHour: NUMBER,
  interval95MPerHour: listOf(NUMBER, 2),
  detectableMPerHour: NUMBER,
  material: FLAG,
});

const STABILITY = object({
  verdict: oneOf('still', 'drifting', 'stepped', 'settling', 'travelling', 'cannot tell'),
  drift: perAxis(orNull(DRIFT)),
  steps: listOf(
    object({
      utc: UTC,
      interval95Utc: listOf(UTC, 2),
      eastM: LENGTH_M,
      northM: LENGTH_M,
      upM: orNull(LENGTH_M),
      material: FLAG,
      beside: listOf(TEXT),
    }),
  ),
  settling: orNull(
    object({
      timeConstantS: NUMBER,
      eastM: LENGTH_M,
      northM: LENGTH_M,
      upM: orNull(LENGTH_M),
      material: FLAG,
    }),
  ),
  movementLimitM: object({horizontal: orNull(LENGTH_M), up: orNull(LENGTH_M)}),
});

const FRAME_CHANGE = object({
  fromFrame: TEXT,
  fromEpoch: orNull(NUMBER),
  toFrame: TEXT,
  toEpoch: orNull(NUMBER),
  steps: listOf(
    object({
      what: TEXT,
      from: TEXT,
      to: TEXT,
      epoch: NUMBER,
      parameters: mapOf(NUMBER),
      ecefM: XYZ,
      source: TEXT,
    }),
  ),
  ecefM: XYZ,
  mismatchM: perAxis(LENGTH_M),
  standardUncertaintyM: perAxis(LENGTH_M),
});

const DIAGNOSIS = object({
  asked: oneOf('the offset is more than noise', 'a tolerance is exceeded'),
  pairs: listOf(
    object({codes: listOf(TEXT, 2), title: TEXT, predictedM: PER_AXIS_OR_NULL, misfit: NUMBER}),
  ),
  accidentalMatches: NUMBER,
  accidentalWithinM: LENGTH_M,
  accidentalOf: oneOf('plan', 'height', 'plan and height', null),
  tested: listOf(TEXT),
  notTested: listOf(object({code: TEXT, because: TEXT})),
});

const SHEET_ITEM = object({section: TEXT, item: TEXT, value: orNull(TEXT)});

const COMPARISON = object({
  mark: TEXT,
  offsetM: object({...PER_AXIS_OR_NULL.properties, horizontal: orNull(LENGTH_M)}),
  azimuthDeg: orNull(DEGREES),
  requirements: listOf(
    object({
      of: oneOf('horizontal', 'east', 'north', 'up'),
      toleranceM: LENGTH_M,
      reason: orNull(TEXT),
      probabilityWithin: orNull(NUMBER),
      decision: oneOf('accept', 'reject', 'cannot tell'),
    }),
  ),
  normalisedError: object({
    ...perAxis(orNull(NUMBER)).properties,
    horizontal: orNull(NUMBER),
  }),
  agreement: oneOf('agrees', 'disagrees', 'not tested'),
  assumptions: listOf(TEXT),
  frameChange: orNull(FRAME_CHANGE),
  otherSetups: listOf(
    object({
      name: TEXT,
      setUpId: orNull(TEXT),
      startUtc: orNull(UTC),
      endUtc: orNull(UTC),
      hoursEarlier: NUMBER,
      differenceM: object({...PER_AXIS_OR_NULL.properties, horizontal: orNull(LENGTH_M)}),
      uncertainty95M: orNull(
        object({...PER_AXIS_OR_NULL.properties, horizontalRadius: orNull(LENGTH_M)}),
      ),
      normalisedError: object({
        ...perAxis(orNull(NUMBER)).properties,
        horizontal: orNull(NUMBER),
      }),
      agreement: oneOf('agrees', 'disagrees', 'not tested'),
      cancels: listOf(TEXT),
    }),
  ),
  candidates: listOf(
    object({
      code: TEXT,
      title: TEXT,
      predictedM: PER_AXIS_OR_NULL,
      misfit: NUMBER,
      group: COUNT,
      advice: TEXT,
    }),
  ),
  diagnosis: orNull(DIAGNOSIS),
});

/** `stillmark.result/1`: what `reduce` and `check` write with `--result`. */
export const RESULT_SCHEMA: DocumentSchema = {
  $schema: 'https://json-schema.org/draft/2020-12/schema',
  title: 'stillmark.result/1',
  ...object({
    schema: {const: 'stillmark.result/1'},
    program: PROGRAM,
    command: oneOf('reduce', 'check'),
    inputs: listOf(INPUT),
    occupation: object({
      mark: orNull(TEXT),
      setUpId: orNull(TEXT),
      startUtc: orNull(UTC),
      endUtc: orNull(UTC),
      antennaHeightM: orNull(LENGTH_M),
      heightUsed: oneOf('opening', 'mean', 'interpolated', null),
    }),
    fieldSheet: listOf(SHEET_ITEM),
    markRecord: listOf(SHEET_ITEM),
    epochs: EPOCHS,
    reference: orNull(REFERENCE),
    position: orNull(POSITION),
    segments: listOf(object({fromUtc: UTC, toUtc: UTC, epochs: COUNT, position: POSITION})),
    budget: listOf(BUDGET_ROW),
    scatter: orNull(object({aboutMean: SCATTER, aboutReference: SCATTER})),
    screening: SCREENING,
    stability: STABILITY,
    comparison: orNull(COMPARISON),
    verdict: oneOf('holds', 'off', 'moving', 'cannot tell', null),
    settings: mapOf(object({value: SCALAR, from: oneOf('command line', 'field sheet', 'default')})),
    notices: listOf(NOTICE),
  }),
};

/** `stillmark.contents/1`: what `contents` writes with `--result`. */
export const CONTENTS_SCHEMA: DocumentSchema = {
  $schema: 'https://json-schema.org/draft/2020-12/schema',
  title: 'stillmark.contents/1',
  ...object({
    schema: {const: 'stillmark.contents/1'},
    program: PROGRAM,
    inputs: listOf(INPUT),
    epochs: EPOCHS,
    standing: listOf(
      object({
        number: COUNT,
        fromUtc: UTC,
        toUtc: UTC,
        durationS: NUMBER,
        epochs: COUNT,
        mean: GEODETIC,
        scatterM: PER_AXIS_OR_NULL,
      }),
    ),
    satellites: listOf(
      object({system: TEXT, satellites: COUNT, medianCarrierToNoiseDbHz: orNull(NUMBER)}),
    ),
    rejectedLines: listOf(object({input: TEXT, lineNumber: COUNT, reason: TEXT, excerpt: TEXT})),
    notices: listOf(NOTICE),
  }),
};
