import type {HelmertSet, Vector3} from './helmert.ts';

/** How a frame hangs on its parent: a published set of parameters, or none when they coincide. */
export interface FrameLink {
  readonly parent: string;
  /** null: the two coincide within the uncertainty. */
  readonly set: HelmertSet | null;
  /** Which way the published set leads. */
  readonly direction: 'from parent' | 'to parent';
  /** Systematic, per axis, of the link itself; 0 where the set defines the frame. */
  readonly standardUncertaintyM: number;
  readonly source: string;
}

/** A box of latitudes and longitudes; west exceeds east when it crosses the date line. */
export interface Area {
  readonly southDeg: number;
  readonly northDeg: number;
  readonly westDeg: number;
  readonly eastDeg: number;
}

/**
 * A reference frame.
 *
 * `global`: points on the ground move in it with their plate. `plate-fixed`: it moves with a plate.
 * `fixed epoch`: coordinates are those of a global frame at one epoch, for ever. `grid-based`: tied
 * to a global frame by a national grid of deformation that stillmark does not hold.
 */
export interface Frame {
  readonly name: string;
  readonly kind: 'global' | 'plate-fixed' | 'fixed epoch' | 'grid-based';
  /** null for the hub, ITRF2020, and for frames that hang on nothing simple. */
  readonly parent: FrameLink | null;
  /** null: any epoch. */
  readonly fixedEpoch: number | null;
  /** Where the frame is used; null: everywhere. */
  readonly area: Area | null;
}

/*
 * The tables. One hub (ITRF2020), one convention (position vector), one direction per link; all else
 * is derived. Numbers stand in the units of publication: t0, translation (mm), scale (1e-9), rotation
 * (milliarcseconds), then their rates per year. "from P": the set leads from P to the frame; "to P":
 * it was published the other way. Rotations of sets published in the coordinate-frame convention are
 * reversed here. A set without rates has no reference epoch; 2000 stands in its place.
 *
 * After the 15 numbers: the standard uncertainty of the link in mm, source and area. 2 mm between the
 * ITRFs since 2005, 10 mm to the older ones, 20 mm for a realisation of WGS 84 (common practice, no
 * source); for national frames the accuracy that the EPSG dataset states; 0 where the set defines.
 */

const GLOBAL_FRAMES = `
ITRF2014     from  ITRF2020  2015  -1.4 -0.9 1.4     -0.42    0 0 0                     0 -0.1 0.2       0         0 0 0                     2   TN1:A      World
ITRF2008     from  ITRF2020  2015  0.2 1 3.3         -0.29    0 0 0                     0 -0.1 0.1       0.03      0 0 0                     2   TN1:A      World
ITRF2005     from  ITRF2020  2015  2.7 0.1 -1.4      0.65     0 0 0                     0.3 -0.1 0.1     0.03      0 0 0                     2   TN1:A      World
ITRF2000     from  ITRF2020  2015  -0.2 0.8 -34.2    2.25     0 0 0                     0.1 0 -1.7       0.11      0 0 0                     10  TN1:A      World
ITRF97       from  ITRF2020  2015  6.5 -3.9 -77.9    3.98     0 0 0.36                  0.1 -0.6 -3.1    0.12      0 0 0.02                  10  TN1:A      World
ITRF96       from  ITRF2020  2015  6.5 -3.9 -77.9    3.98     0 0 0.36                  0.1 -0.6 -3.1    0.12      0 0 0.02                  10  TN1:A      World
ITRF94       from  ITRF2020  2015  6.5 -3.9 -77.9    3.98     0 0 0.36                  0.1 -0.6 -3.1    0.12      0 0 0.02                  10  TN1:A      World
ITRF93       from  ITRF2020  2015  -65.8 1.9 -71.3   4.47     -3.36 -4.33 0.75          -2.8 -0.2 -2.3   0.12      -0.11 -0.19 0.07          10  TN1:A      World
ITRF92       from  ITRF2020  2015  14.5 -1.9 -85.9   3.27     0 0 0.36                  0.1 -0.6 -3.1    0.12      0 0 0.02                  10  TN1:A      World
ITRF91       from  ITRF2020  2015  26.5 12.1 -91.9   4.67     0 0 0.36                  0.1 -0.6 -3.1    0.12      0 0 0.02                  10  TN1:A      World
ITRF90       from  ITRF2020  2015  24.5 8.1 -107.9   4.97     0 0 0.36                  0.1 -0.6 -3.1    0.12      0 0 0.02                  10  TN1:A      World
ITRF89       from  ITRF2020  2015  29.5 32.1 -145.9  8.37     0 0 0.36                  0.1 -0.6 -3.1    0.12      0 0 0.02                  10  TN1:A      World
ITRF88       from  ITRF2020  2015  24.5 -3.9 -169.9  11.47    0.1 0 0.36                0.1 -0.6 -3.1    0.12      0 0 0.02                  10  TN1:A      World
ITRF96(IGS)  from  ITRF2014  2000  6.4 3.99 -14.27   1.08901  -0.16508 0.26897 0.11984  0.79 -0.6 -1.44  -0.07201  -0.01347 0.01514 0.01973  10  EPSG:9083  World
`;

const PLATE_FIXED_FRAMES = `
ETRF2020               from  ITRF2020     1989       0 0 0                     0         0 0 0                         0 0 0              0         0.086 0.519 -0.753          0    TN1:1       Europe
ETRF2014               from  ITRF2014     1989       0 0 0                     0         0 0 0                         0 0 0              0         0.085 0.531 -0.77           0    TN1:1       Europe
ETRF2005               from  ITRF2005     1989       56 48 -37                 0         0 0 0                         0 0 0              0         0.054 0.518 -0.781          0    TN1:1       Europe
ETRF2000               from  ITRF2020     2015       53.8 51.8 -82.2           2.25      2.106 12.74 -20.592           0.1 0 -1.7         0.11      0.081 0.49 -0.792           10   TN1:4       Europe
ETRF97                 from  ITRF97       1989       41 41 -49                 0         0 0 0                         0 0 0              0         0.2 0.5 -0.65               0    TN1:1       Europe
ETRF96                 from  ITRF96       1989       41 41 -49                 0         0 0 0                         0 0 0              0         0.2 0.5 -0.65               0    TN1:1       Europe
ETRF94                 from  ITRF94       1989       41 41 -49                 0         0 0 0                         0 0 0              0         0.2 0.5 -0.65               0    TN1:1       Europe
ETRF93                 from  ITRF93       1989       19 53 -21                 0         0 0 0                         0 0 0              0         0.32 0.78 -0.67             0    TN1:1       Europe
ETRF92                 from  ITRF92       1989       38 40 -37                 0         0 0 0                         0 0 0              0         0.21 0.52 -0.68             0    TN1:1       Europe
ETRF91                 from  ITRF91       1989       21 25 -37                 0         0 0 0                         0 0 0              0         0.21 0.52 -0.68             0    TN1:1       Europe
ETRF90                 from  ITRF90       1989       19 28 -23                 0         0 0 0                         0 0 0              0         0.11 0.57 -0.71             0    TN1:1       Europe
ETRF89                 from  ITRF89       1989       0 0 0                     0         0 0 0                         0 0 0              0         0.11 0.57 -0.71             0    TN1:1       Europe
ETRS89-DEU(2025)       from  ITRF2020     2015       41.1393 51.983 -101.1455  7.8918    0.8878 12.7748 -22.2616       0 0 0              0         0.086 0.519 -0.753          0    EPSG:11204  Germany
ETRS89-DEU(2016)       to    ETRF2000     2000       0 0 0                     0         0.658 -0.208 0.755            0 0 0              0         0 0 0                       100  EPSG:10292  Germany
ETRS89-FRA(RGF93v2b)   from  ITRF2020     2015       53.8 51.8 -82.2           2.25      2.106 12.74 -20.592           0.1 0 -1.7         0.11      0.081 0.49 -0.792           100  EPSG:11286  France
ETRS89-GBR(OSNet2009)  to    ETRF2000     2009.756   6.3 11.5536 37.3584       -1.67756  -2.46996 -0.20756 -3.20247    0 0.6 1.4          -0.01     -0.119 -0.01 -0.162         100  EPSG:11153  GreatBritain
ETRS89-CHE(CHTRS95)    to    ETRF2000     1993       57.1 -6.1 1.1             -2.07     1.321 3.75 -5.732             2.9 0.2 0.6        -0.01     -0.129 -0.1 -0.192          10   EPSG:12173  Switzerland
NAD83(2011)            from  ITRF2020     2010       1003.9 -1909.61 -541.17   -0.05109  -26.78138 0.42027 -10.93206   0.79 -0.7 -1.24    -0.07201  -0.06667 0.75744 0.05133    0    EPSG:10334  UnitedStates
NAD83(PA11)            from  ITRF2020     2010       909.5 -2013.3 -585.9      1.7       -22.749 -26.56 25.706         0.1 0 -1.7         0.11      0.384 -1.007 2.186          0    EPSG:10336  Pacific
NAD83(MA11)            from  ITRF2020     2010       909.5 -2013.3 -585.9      1.7       -28.711 -11.785 -4.417        0.1 0 -1.7         0.11      0.02 -0.105 0.347           0    EPSG:10338  Marianas
NAD83(CORS96)          from  ITRF2000     1997       995.6 -1901.3 -521.5      0.62      -25.915 -9.426 -11.599        0.7 -0.7 0.5       -0.18     -0.067 0.757 0.051          0    EPSG:6866   UnitedStates
NAD83(CSRS)v2          from  ITRF96(IGS)  1997       991 -1907.2 -512.9        0         -25.79 -9.65 -11.66           0 0 0              0         -0.0532 0.7423 0.0316       0    EPSG:8259   Canada
NAD83(CSRS)v3          from  ITRF97       1997       988.9 -1907.4 -503        -0.935    -25.915 -9.426 -11.599        0.7 -0.1 1.9       -0.192    -0.067 0.757 0.031          0    EPSG:8260   Canada
NAD83(CSRS)v4          from  ITRF2000     1997       995.6 -1901.3 -521.4      0.615     -25.915 -9.426 -11.599        0.7 -0.7 0.5       -0.182    -0.067 0.757 0.051          0    EPSG:8261   Canada
NAD83(CSRS)v5          from  ITRF2005     1997       996.3 -1902.4 -521.9      0.775     -25.915 -9.426 -11.599        0.5 -0.6 -1.3      -0.102    -0.067 0.757 0.051          0    EPSG:9227   Canada
NAD83(CSRS)v6          from  ITRF2008     1997       993.43 -1903.31 -526.55   1.71504   -25.91467 -9.42645 -11.59935  0.79 -0.6 -1.34    -0.102    -0.06667 0.75744 0.05133    0    EPSG:8264   Canada
NAD83(CSRS)v7          from  ITRF2014     2010       1005.3 -1909.21 -541.57   0.36891   -26.78138 0.42027 -10.93206   0.79 -0.6 -1.44    -0.07201  -0.06667 0.75744 0.05133    0    EPSG:8265   Canada
NAD83(CSRS)v8          from  ITRF2020     2010       1003.9 -1909.61 -541.17   -0.05109  -26.78138 0.42027 -10.93206   0.79 -0.7 -1.24    -0.07201  -0.06667 0.75744 0.05133    0    EPSG:10415  Canada
NATRF2022              from  ITRF2020     2020       0 0 0                     0         0 0 0                         0 0 0              0         -0.046 0.704 0.047          0    EPSG:11485  NorthAmerica
GDA2020                from  ITRF2014     2020       0 0 0                     0         0 0 0                         0 0 0              0         -1.50379 -1.18346 -1.20716  30   EPSG:8049   Australia
GDA94                  to    GDA2020      2000       61.55 -10.87 -40.19       -9.994    39.4924 32.7221 32.8979       0 0 0              0         0 0 0                       10   EPSG:8048   Australia
KSA-GRF17              from  ITRF2014     2017       0 0 0                     0         0 0 0                         0 0 0              0         -1.199 0.107 -1.468         1    EPSG:9334   SaudiArabia
GR96(2021)             from  ITRF2020     2021.6164  -300.31 -1175.12 -306.54  -16.26    -41.614 26.303 11.214         0 0 0              0         -0.045 0.666 0.098          100  EPSG:10960  Greenland
PNG94                  from  ITRF2020     1994       0 0 0                     0         0 0 0                         0 0 0              0         -1.3242 -1.2788 -1.1675     150  EPSG:10853  PapuaNewGuinea
UGRF                   from  ITRF2020     2010       241.7 -373.3 -78.5        1.5       -12.898 -10.814 15.363        -0.67 -0.25 -0.84  -0.03     0.081 0.719 -0.864          30   EPSG:11478  Uganda
LibRef21               from  ITRF2014     2021.112   -47.48 11.76 -0.58        0         0 0 0                         0 0 0              0         -0.099 0.614 -0.733         10   EPSG:10848  Liberia
`;

/** Frames that coincide with another: frame, that one, uncertainty in mm, source, area. */
const COINCIDENT_FRAMES = `
IGS20         ITRF2020  2   EPSG:10179  World
IGb20         ITRF2020  2   memory      World
IGS14         ITRF2014  2   EPSG:9032   World
IGb14         ITRF2014  2   EPSG:9381   World
IGS08         ITRF2008  2   EPSG:9031   World
IGb08         ITRF2008  2   EPSG:9037   World
IGS05         ITRF2005  2   EPSG:9030   World
IGS00         ITRF2000  2   EPSG:9029   World
IGb00         ITRF2000  2   EPSG:9034   World
IGS97         ITRF97    2   EPSG:9028   World
ATRF2014      ITRF2014  2   EPSG:9459   Australia
WGS84(G2296)  ITRF2020  20  EPSG:10608  World
WGS84(G2139)  ITRF2014  20  EPSG:9757   World
WGS84(G1762)  ITRF2008  20  EPSG:7666   World
WGS84(G1674)  ITRF2008  20  EPSG:7669   World
WGS84(G1150)  ITRF2000  20  EPSG:7670   World
WGS84(G873)   ITRF94    20  EPSG:9076   World
WGS84(G730)   ITRF92    20  EPSG:7672   World
`;

/** Frames that are a global frame at one epoch: frame, that one, epoch, mm, source, area. */
const FIXED_EPOCH_FRAMES = `
SIRGAS2000        ITRF2000  2000.4  0   EPSG:9052  LatinAmerica
CGCS2000          ITRF97    2000    10  memory     China
JGD2000           ITRF94    1997    10  GSI45      Japan
Hartebeesthoek94  ITRF91    1994    10  memory     SouthernAfrica
MexicoITRF2008    ITRF2008  2010    0   memory     Mexico
`;

/** As above, but kept up to date by a national grid of deformation. */
const GRID_BASED_FRAMES = `
NZGD2000  ITRF96(IGS)  2000  10  EPSG:9083  NewZealand
`;

/** Areas of use: south, north, west, east in degrees, rounded outward from the EPSG dataset. */
const AREAS: Readonly<Record<string, readonly [number, number, number, number]>> = {
  Australia: [-61, -8, 93, 174],
  Canada: [38, 87, -142, -40],
  China: [16, 54, 73, 135],
  Europe: [32, 85, -32, 45],
  France: [41, 52, -10, 10.5],
  Germany: [47, 56, 3, 15.5],
  GreatBritain: [49, 61.5, -9.5, 2.5],
  Greenland: [56, 87.5, -75, 8],
  Japan: [17, 47, 122, 158],
  LatinAmerica: [-60, 33, -123, -25],
  Liberia: [4, 9, -13.5, -7],
  Marianas: [1, 24, 129, 150],
  Mexico: [12, 33, -123, -84],
  NewZealand: [-56, -25, 160, -171],
  NorthAmerica: [4, 87, 167, -10],
  Pacific: [-18, 32, 157, -151],
  PapuaNewGuinea: [-15, 3, 139, 163],
  SaudiArabia: [16, 33, 34, 56],
  SouthernAfrica: [-51, -22, 13, 43],
  Switzerland: [45.5, 48, 5.5, 11],
  Uganda: [-2, 5, 29, 36],
  UnitedStates: [14, 75, 167, -63],
};

const EUREF_TN1 = 'EUREF Technical Note 1 (Altamimi & Collilieux), 4 March 2024';
const SOURCES: Readonly<Record<string, string>> = {
  'TN1:A': `${EUREF_TN1}, Appendix A, p. 13`,
  'TN1:1': `${EUREF_TN1}, Table 1, p. 9`,
  'TN1:2': `${EUREF_TN1}, Table 2, p. 10`,
  'TN1:3': `${EUREF_TN1}, Table 3, p. 11`,
  'TN1:4': `${EUREF_TN1}, Table 4, p. 12`,
  GSI45: 'Bulletin of the Geographical Survey Institute (Japan), vol. 45, abstract',
  memory: 'from memory, no source read',
};

function sourceOf(code: string): string {
  const named = SOURCES[code];
  if (named !== undefined) return named;
  if (code.startsWith('EPSG:')) return `${code}, EPSG Geodetic Parameter Dataset v13.101 (2026)`;
  throw new RangeError(`frame table: unknown source "${code}"`);
}

function areaOf(name: string): Area | null {
  if (name === 'World') return null;
  const box = AREAS[name];
  if (box === undefined) throw new RangeError(`frame table: unknown area "${name}"`);
  return {southDeg: box[0], northDeg: box[1], westDeg: box[2], eastDeg: box[3]};
}

/** The lines of a table in fields; a line with another number of fields is a misprint. */
function rowsOf(table: string, fieldCount: number): (readonly string[])[] {
  return table
    .trim()
    .split('\n')
    .map((line) => {
      const fields = line.trim().split(/\s+/);
      if (fields.length !== fieldCount) throw new RangeError(`frame table: misprint in "${line}"`);
      return fields;
    });
}

function numberOf(field: string): number {
  const value = Number(field);
  if (!Number.isFinite(value)) throw new RangeError(`frame table: misprint "${field}"`);
  return value;
}

function setOf(numbers: readonly number[]): HelmertSet {
  const three = (from: number): Vector3 => [numbers[from]!, numbers[from + 1]!, numbers[from + 2]!];
  return {
    t0: numbers[0]!,
    translationMm: three(1),
    scalePpb: numbers[4]!,
    rotationMas: three(5),
    translationRate: three(8),
    scaleRate: numbers[11]!,
    rotationRate: three(12),
  };
}

function framesWithSets(table: string, kind: Frame['kind']): Frame[] {
  return rowsOf(table, 21).map((fields) => {
    const [name = '', direction = '', parent = ''] = fields;
    const [uncertainty = '', source = '', area = ''] = fields.slice(18);
    return {
      name,
      kind,
      parent: {
        parent,
        set: setOf(fields.slice(3, 18).map(numberOf)),
        direction: direction === 'to' ? 'to parent' : 'from parent',
        standardUncertaintyM: numberOf(uncertainty) / 1000,
        source: sourceOf(source),
      },
      fixedEpoch: null,
      area: areaOf(area),
    };
  });
}

function coincidentLink(parent: string, uncertainty: string, source: string): FrameLink {
  return {
    parent,
    set: null,
    direction: 'from parent',
    standardUncertaintyM: numberOf(uncertainty) / 1000,
    source: sourceOf(source),
  };
}

function coincidentFrames(table: string): Frame[] {
  return rowsOf(table, 5).map((fields) => {
    const [name = '', parent = '', uncertainty = '', source = '', area = ''] = fields;
    return {
      name,
      kind: 'global',
      parent: coincidentLink(parent, uncertainty, source),
      fixedEpoch: null,
      area: areaOf(area),
    };
  });
}

function framesAtEpoch(table: string, kind: Frame['kind']): Frame[] {
  return rowsOf(table, 6).map((fields) => {
    const [name = '', parent = '', epoch = '', uncertainty = '', source = '', area = ''] = fields;
    return {
      name,
      kind,
      parent: coincidentLink(parent, uncertainty, source),
      fixedEpoch: numberOf(epoch),
      area: areaOf(area),
    };
  });
}

/** A frame that exists only as a grid: no parameters of any epoch lead to it. */
function gridOnly(name: string, area: string): Frame {
  return {name, kind: 'grid-based', parent: null, fixedEpoch: null, area: areaOf(area)};
}

/** The frame through which all others are reached. */
export const HUB = 'ITRF2020';

export const FRAMES: readonly Frame[] = [
  {name: HUB, kind: 'global', parent: null, fixedEpoch: null, area: null},
  ...framesWithSets(GLOBAL_FRAMES, 'global'),
  ...coincidentFrames(COINCIDENT_FRAMES),
  ...framesWithSets(PLATE_FIXED_FRAMES, 'plate-fixed'),
  ...framesAtEpoch(FIXED_EPOCH_FRAMES, 'fixed epoch'),
  ...framesAtEpoch(GRID_BASED_FRAMES, 'grid-based'),
  gridOnly('JGD2011', 'Japan'),
  gridOnly('JGD2024', 'Japan'),
];
