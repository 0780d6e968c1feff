import {
  COUNT,
  type DocumentSchema,
  LENGTH_M,
  listOf,
  NOTICE,
  NUMBER,
  object,
  oneOf,
  orNull,
  PROGRAM,
  perAxis,
  TEXT,
  UTC,
  XYZ,
} from './schema-parts.ts';

const POINT = oneOf('mark', 'antenna reference point', 'phase centre', 'antenna, point not stated');

const OCCUPATION = object({
  name: TEXT,
  setUpId: orNull(TEXT),
  startUtc: UTC,
  endUtc: UTC,
  epochs: COUNT,
  differenceM: object({...perAxis(LENGTH_M).properties, horizontal: LENGTH_M}),
  weight: perAxis(NUMBER),
  normalisedError: perAxis(orNull(NUMBER)),
});

/** `stillmark.combination/1`: what `combine` writes with `--result`. */
export const COMBINATION_SCHEMA: DocumentSchema = {
  $schema: 'https://json-schema.org/draft/2020-12/schema',
  title: 'stillmark.combination/1',
  ...object({
    schema: {const: 'stillmark.combination/1'},
    program: PROGRAM,
    marks: listOf(
      object({
        name: TEXT,
        of: POINT,
        frame: orNull(TEXT),
        coordinateEpoch: orNull(NUMBER),
        geodetic: object({
          latitudeDeg: NUMBER,
          longitudeDeg: NUMBER,
          ellipsoidalHeightM: LENGTH_M,
        }),
        ecefM: XYZ,
        standardUncertaintyM: perAxis(LENGTH_M),
        uncertainty95M: object({...perAxis(LENGTH_M).properties, horizontalRadius: LENGTH_M}),
        covarianceEnuM2: listOf(listOf({type: 'number', description: 'square metres'}, 3), 3),
        agreement: oneOf('agrees', 'disagrees', 'not tested'),
        accident: object({plan: orNull(NUMBER), up: orNull(NUMBER)}),
        enlargedBy: object({plan: NUMBER, up: NUMBER}),
        shared: listOf(TEXT),
        occupations: listOf(OCCUPATION),
      }),
    ),
    distances: listOf(
      object({
        from: TEXT,
        to: TEXT,
        eastM: LENGTH_M,
        northM: LENGTH_M,
        upM: LENGTH_M,
        heightDifferenceM: LENGTH_M,
        spatialM: LENGTH_M,
        azimuthDeg: NUMBER,
        uncertainty95M: object({spatial: LENGTH_M, height: LENGTH_M}),
        cancels: listOf(TEXT),
      }),
    ),
    leftOut: listOf(object({name: TEXT, because: TEXT})),
    notices: listOf(NOTICE),
  }),
};
