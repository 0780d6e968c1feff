import {formatLength, proseNumber} from './numbers.ts';
import {type NoticeValues, numberIn, type Sentence, textIn} from './sentence.ts';

/** How a cause is told: a phrase after "Consistent with:", and what to measure. */
export interface CauseWords {
  readonly title: Sentence;
  readonly advice: Sentence;
}

const MEASURE_HEIGHT =
  'Set up again and measure the antenna height anew, vertically and in a second unit, before any value is changed.';
const LOOK_AT_LOG =
  'Compare altitude and separation in the log (GGA fields 9 and 11) with a geoid model of the place, and check a second mark with a levelled height.';
const CHECK_COORDINATES =
  'Read the coordinates of the mark again from their source, and check a second mark.';
const OCCUPY_AGAIN =
  'Occupy the mark again with a new set-up and a fresh initialisation, at least half an hour later.';

const HEIGHTS: Readonly<Record<string, CauseWords>> = {
  V01: {
    title: (v) => `the slope of ${m(v, 'readingM')} entered as a vertical height`,
    advice: () =>
      'Measure the height again at three places of the plate and once vertically; reduce it with radius and slant mark offset.',
  },
  V02: {
    title: (v) => `the vertical height of ${m(v, 'readingM')} reduced as if it were a slope`,
    advice: () =>
      'Measure the height again at three places of the plate and once vertically, and book which is which.',
  },
  V03: {
    title: (v) =>
      v.by === 'nobody'
        ? `an antenna height of ${m(v, 'heightM')} not taken off: none was given`
        : `the antenna height of ${m(v, 'heightM')} (${by(v)}) not taken off`,
    advice: (v) =>
      v.by === 'nobody'
        ? 'State in a field sheet which point the log is of, and the antenna readings from the booking; compare the height with this one.'
        : `Find out which point the log is of. ${MEASURE_HEIGHT}`,
  },
  V04: {
    title: (v) => `the antenna height of ${m(v, 'heightM')} (${by(v)}) taken off twice`,
    advice: () =>
      `Find out whether the receiver took it off before it wrote the log. ${MEASURE_HEIGHT}`,
  },
  V05: {
    title: (v) => `the antenna height of ${m(v, 'heightM')} (${by(v)}) added instead of taken off`,
    advice: () => `Look at the sign of the height in the receiver. ${MEASURE_HEIGHT}`,
  },
  V06: {
    title: (v) =>
      `the ${textIn(v, 'point')}, ${m(v, 'aboveM')} above the antenna reference point, ${v.leftOut === true ? 'taken for it' : 'allowed for twice'}`,
    advice: () =>
      'Look the antenna up in its calibration, and measure the height to the antenna reference point, vertically.',
  },
  V07: {title: (v) => unit(v, 'feet', 'metres'), advice: () => MEASURE_HEIGHT},
  V08: {title: (v) => unit(v, 'metres', 'feet'), advice: () => MEASURE_HEIGHT},
  V09: {title: (v) => unit(v, 'metres', 'centimetres'), advice: () => MEASURE_HEIGHT},
  V10: {
    title: (v) =>
      `an orthometric height of the mark against an ellipsoidal one measured (separation ${m(v, 'separationM')}, ${source(v)})`,
    advice: () =>
      `Ask for the height system and geoid model of the mark. Check a second mark that has both heights.`,
  },
  V11: {
    title: (v) =>
      `an ellipsoidal height of the mark against one above the geoid measured (separation ${m(v, 'separationM')}, ${source(v)})`,
    advice: () => LOOK_AT_LOG,
  },
  V12: {
    title: (v) => `the geoid separation of ${m(v, 'separationM')} (${source(v)}) taken off twice`,
    advice: () => LOOK_AT_LOG,
  },
  V13: {
    title: (v) =>
      `the geoid separation of ${m(v, 'separationM')} (${source(v)}) with the wrong sign, an ${textIn(v, 'wanted')} height being wanted`,
    advice: () => LOOK_AT_LOG,
  },
  V14: {
    title: (v) =>
      `a usual pole length of ${m(v, 'takenM')} taken for a height of ${m(v, 'trueM')} (${by(v)})`,
    advice: () =>
      'Look at the stop of the pole and the default of the receiver, and measure the height with a tape.',
  },
  V15: {
    title: (v) => `two digits swapped: ${m(v, 'takenM', 3)} for ${m(v, 'trueM', 3)} (${by(v)})`,
    advice: () =>
      'Read the height on the photograph of the booking, and measure it anew in a second unit.',
  },
  V16: {
    title: (v) => `the tape read wrong by a whole mark of ${m(v, 'byM')}`,
    advice: () => `Measure the height anew in a second unit: it shows such a misreading.`,
  },
  V17: {
    title: (v) =>
      `two geoid models in one comparison (${textIn(v, 'first')} and ${textIn(v, 'second')}, ${m(v, 'differenceM')} apart)`,
    advice: () =>
      'Name the geoid model of the mark, and check a second mark with a levelled height.',
  },
  V18: {
    title: (v) =>
      v.mark === null
        ? 'another realisation of the vertical datum'
        : `another realisation of the vertical datum, as the check of ${textIn(v, 'mark')} shows it`,
    advice: () =>
      'Ask for the realisation of the vertical datum, and check two more marks with levelled heights.',
  },
  V19: {
    title: (v) =>
      `a set-up whose height changed by ${m(v, 'changeM')} ${v.course === 'early' ? 'early in the session' : 'evenly over the session'}, the opening height being used`,
    advice: () =>
      'Set the tripod up anew on firm ground, and measure the height before, in the middle and after.',
  },
  V20: {
    title: (v) =>
      `an empty separation field taken as zero (${m(v, 'separationM')} from the ${textIn(v, 'source')})`,
    advice: () =>
      'Have the receiver print the separation, or name a geoid model; check a second mark with a levelled height.',
  },
};

const PLANS: Readonly<Record<string, CauseWords>> = {
  H01: {
    title: (v) =>
      `coordinates of ${textIn(v, 'grid')} in ${v.taken === 'survey' ? 'international feet taken as survey feet' : 'survey feet taken as international feet'}`,
    advice: () =>
      'Ask which foot the coordinates are in, and check a second mark far from the first: the offset grows with the coordinates.',
  },
  H02: {
    title: () => 'the sign of the latitude lost',
    advice: () => `Look at the hemisphere letters of log and mark. ${CHECK_COORDINATES}`,
  },
  H03: {
    title: () => 'the sign of the longitude lost',
    advice: () => `Look at the hemisphere letters of log and mark. ${CHECK_COORDINATES}`,
  },
  H04: {
    title: () => 'latitude and longitude swapped',
    advice: () => `Look at the order of the columns. ${CHECK_COORDINATES}`,
  },
  H05: {
    title: (v) => `degrees and minutes read as decimal degrees in the ${angle(v)}`,
    advice: () => CHECK_COORDINATES,
  },
  H06: {
    title: (v) => `decimal degrees read as degrees and minutes in the ${angle(v)}`,
    advice: () => CHECK_COORDINATES,
  },
  H07: {
    title: (v) =>
      `degrees, minutes and seconds packed as dd.mmss read as decimal degrees in the ${angle(v)}`,
    advice: () => CHECK_COORDINATES,
  },
  H08: {
    title: (v) =>
      `coordinates of UTM zone ${numberIn(v, 'zone')} read in zone ${numberIn(v, 'readAs')}, or the reverse`,
    advice: () => `Ask for the zone of the coordinates. ${CHECK_COORDINATES}`,
  },
  H08b: {
    title: (v) => `coordinates of UTM zone ${numberIn(v, 'zone')} read in the other hemisphere`,
    advice: () => `Ask for the hemisphere of the coordinates. ${CHECK_COORDINATES}`,
  },
  H09: {
    title: (v) =>
      `geocentric coordinates turned into degrees on ${textIn(v, 'ellipsoid')} (${side(v)})`,
    advice: () => `Ask for the ellipsoid of the conversion. ${CHECK_COORDINATES}`,
  },
  H10: {
    title: (v) => `a geocentric latitude used as a geodetic one (${side(v)})`,
    advice: () => `Ask which latitude the software writes. ${CHECK_COORDINATES}`,
  },
  H11: {
    title: (v) =>
      v.of === 'grid'
        ? `easting and northing exchanged (${textIn(v, 'grid')})`
        : 'east and north of the offset point exchanged',
    advice: (v) =>
      v.of === 'grid'
        ? `Look at the order of the columns. ${CHECK_COORDINATES}`
        : 'Lay the offset point off anew, with distance and bearing from the mark.',
  },
  H12: {
    title: (v) =>
      `leading digits or the false origin of ${textIn(v, 'grid')} left out (${dropped(v)}; ${side(v)})`,
    advice: () => `Read the coordinates with all their digits. ${CHECK_COORDINATES}`,
  },
  O01: {
    title: (v) =>
      `the offset point laid off from the wrong north, magnetic or true (${degrees(v)} over ${m(v, 'distanceM')})`,
    advice: () =>
      'Lay the point off anew from a bearing to a known mark, or occupy the mark itself.',
  },
  O02: {
    title: (v) =>
      `the offset point laid off from the wrong north, grid or true (${degrees(v)} over ${m(v, 'distanceM')})`,
    advice: () =>
      'Lay the point off anew from a bearing to a known mark, or occupy the mark itself.',
  },
  O03: {
    title: (v) => `the vector to the offset point applied ${textIn(v, 'how')}`,
    advice: () => 'Make a sketch of mark and antenna, and tape their distance on the spot.',
  },
};

const FRAMES_AND_MARKS: Readonly<Record<string, CauseWords>> = {
  F01: {
    title: (v) =>
      v.side === 'both'
        ? `positions in ${textIn(v, 'frame')} compared with ${textIn(v, 'other')} as they stand`
        : `${v.side === 'measured' ? 'positions of the log' : 'coordinates of the mark'} in ${textIn(v, 'frame')} taken as ${textIn(v, 'other')}`,
    advice: () =>
      'Ask the correction service and the owner of the mark for frame and epoch, and check a second mark some kilometres away: it shows the same offset. Transform; never shift by hand.',
  },
  F02: {
    title: (v) =>
      `coordinates whose epochs lie ${proseNumber(Math.abs(numberIn(v, 'years')), 1)} years apart${v.known === true ? '' : ' (years taken from the offset)'}`,
    advice: () =>
      'Ask for the coordinate epoch of the base or network and of the mark, and check a second mark: it shows the same offset.',
  },
  T02: {
    title: () => 'a date wrong by 1024 weeks, by which positions were moved to another epoch',
    advice: () => 'Compare the dates in the log with the calendar, and log again with a set clock.',
  },
  B01: {
    title: (v) =>
      v.mark === null
        ? 'a base on wrong coordinates'
        : `a base on wrong coordinates, as the check of ${textIn(v, 'mark')} shows it`,
    advice: () =>
      'Check another mark under the same base, then this one under another base or service.',
  },
  B02: {
    title: (v) =>
      v.name === null
        ? `another mark or nail ${m(v, 'distanceM')} away, occupied instead`
        : `${textIn(v, 'name')}, ${m(v, 'distanceM')} from the mark, occupied instead or described by these coordinates`,
    advice: () =>
      'Go back, read or rub the stamping, photograph it, and tape the distances to the witness marks.',
  },
  B03: {
    title: () => 'wrong coordinates of the mark, or a mark disturbed since they were made',
    advice: () =>
      'Check two other marks of the same network, and tape or level this one to its witness marks.',
  },
  C01: {
    title: (v) => `plummet or tribrach out by ${m(v, 'eccentricityM')}`,
    advice: (v) =>
      v.turnedDeg === null
        ? 'Occupy again with the tribrach turned by half a turn: the offset turns with it.'
        : 'Check the plummet against a plumb line, adjust it, and occupy anew in two opposite positions.',
  },
  C02: {
    title: (v) =>
      `a pole of ${m(v, 'heightM')} tilted by ${proseNumber(numberIn(v, 'tiltMinutes'), 0)}′`,
    advice: (v) =>
      v.turnedDeg === null
        ? 'Occupy again with the pole turned by half a turn: the offset turns with it.'
        : 'Check the bubble by turning the pole in a bipod, adjust it, and occupy anew in two opposite positions.',
  },
  G01: {
    title: (v) =>
      `ground distances taken as grid distances, or the reverse, from ${textIn(v, 'mark')} (${proseNumber(numberIn(v, 'perKilometreM') * 1000, 0, true)} mm per kilometre)`,
    advice: () =>
      'Measure the distance between both marks, and compare it with grid, ellipsoid and ground distance.',
  },
  Q01: {
    title: () => 'a position fixed on wrong whole wavelengths',
    advice: () => OCCUPY_AGAIN,
  },
  R01: {
    title: () => 'digits of the log cut off instead of rounded',
    advice: () => 'Log again with more decimals.',
  },
  L01: {
    title: (v) =>
      `loading by the ocean tide, the other session lying ${proseNumber(Math.abs(numberIn(v, 'hours')), 1)} h away`,
    advice: () => 'Occupy twice, 6 to 6½ hours apart, and take the mean.',
  },
};

/** One entry per code of the catalogue that leaves an offset. */
export const CAUSES: Readonly<Record<string, CauseWords>> = {
  ...HEIGHTS,
  ...PLANS,
  ...FRAMES_AND_MARKS,
};

/** A length; digits of a reading are shown as they are booked. */
function m(values: NoticeValues, name: string, decimals?: number): string {
  const value = numberIn(values, name);
  return decimals === undefined ? formatLength(value) : `${proseNumber(value, decimals)}\u00a0m`;
}

function by(values: NoticeValues): string {
  return textIn(values, 'by') === 'receiver' ? 'receiver' : 'field sheet';
}

function unit(values: NoticeValues, written: string, taken: string): string {
  const where = values.misread === 'as booked' ? 'as booked' : 'in the receiver';
  return `an antenna height in ${written} taken as ${taken} ${where}: ${m(values, 'takenM')} for ${m(values, 'trueM')}`;
}

function source(values: NoticeValues): string {
  return `from the ${textIn(values, 'source')}`;
}

function side(values: NoticeValues): string {
  return textIn(values, 'side') === 'measured' ? 'of the log' : 'of the mark';
}

function angle(values: NoticeValues): string {
  return `${textIn(values, 'of')} ${side(values)}`;
}

function degrees(values: NoticeValues): string {
  return `${proseNumber(Math.abs(numberIn(values, 'angleDeg')), 2)}°`;
}

function dropped(values: NoticeValues): string {
  const parts = [
    ['east', numberIn(values, 'droppedEastM')],
    ['north', numberIn(values, 'droppedNorthM')],
  ] as const;
  return parts
    .filter(([, lostM]) => lostM !== 0)
    .map(([axis, lostM]) => `${axis} ${proseNumber(lostM, 0)}\u00a0m`)
    .join(', ');
}
