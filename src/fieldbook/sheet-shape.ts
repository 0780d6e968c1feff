import {toleranceFields} from './mark-shape.ts';
import {
  bearing,
  choice,
  coordinateEpoch,
  date,
  duration,
  length,
  lengthReading,
  lengthText,
  moment,
  number,
  text,
  yesNo,
} from './scalars.ts';
import {type Fields, list, mapping, optional, required} from './shape.ts';

/*
 * The keys of a field sheet, section by section: what the trade writes down about one occupation.
 * They serve the reader, the blank sheet and the JSON Schema.
 */

/** Antennas stand on pillars, tripods and masts. */
const ANTENNA_M = {least: 0, most: 100};
const PLATE_M = {least: 0, most: 1};
const OFFSET_M = {least: -1, most: 1};
const SIGMA_M = {least: 0, most: 1000};
const ECCENTRIC_M = {least: -1000, most: 1000};

const POINTS = ['mark', 'antenna reference point', 'phase centre', 'not stated'] as const;
const MEASURED_TO = ['antenna reference point', 'slant mark', 'phase centre'] as const;
const HEIGHT_USED = ['opening', 'mean', 'interpolated'] as const;
const STATED_SOURCES = [
  'antenna height',
  'centring',
  'base',
  'network',
  'service',
  'separation',
  'geoid',
  'frame',
  'site',
] as const;

const projectFields = {
  title: optional('title', text('Opening check of pillar 4'), 'title of the report'),
  project: optional('project', text('Harbour wall 2026'), 'name or number of the project'),
  purpose: optional('purpose', text('check before setting out'), 'what the occupation is for'),
  location: optional('location', text('north quay'), 'place and background'),
  client: optional('client', text('Harbour board'), 'who asked for the work'),
  organisation: optional('organisation', text('Survey office'), 'who does the work'),
  address: optional('address', text('1 Quay Road'), 'address of the organisation'),
  responsible: optional('responsible', text('chief surveyor'), 'who answers for it'),
  registration: optional('registration', text('12345'), 'registration of that person'),
  specification: optional('specification', text('site specification, clause 4'), 'what it follows'),
  departures: optional('departures', text('none'), 'departures from it, and who approved'),
  riskManaged: optional(
    'accuracy risk',
    text('two occupations'),
    'how the accuracy risk is managed',
  ),
  deliverables: optional(
    'deliverables',
    text('report, raw log, result file'),
    'what is handed over',
  ),
  conclusions: optional(
    'conclusions',
    text('pillar 4 may be used'),
    'conclusions and recommendations of the one responsible',
  ),
};

const occupationFields = {
  mark: optional('mark', text('PILLAR 4'), 'name of the mark, as in the marks file'),
  identification: optional(
    'identification',
    text('stamping read, photo 12'),
    'how the mark was identified: stamping, rubbing, photo, sketch',
  ),
  setUpId: optional('set-up', text('A'), 'name of this set-up, a new one after each re-levelling'),
  repeat: optional(
    'occupation of this mark',
    text('2 of 2, the first on 3 May'),
    'single, or which of several occupations of this mark',
  ),
  observer: optional('observer', text('who stood there'), 'who observed'),
  date: optional('date', date(), 'day of the field work'),
  start: optional('start', moment(), 'start of the session, with Z or the offset from UTC'),
  stop: optional('stop', moment(), 'end of the session'),
  weather: optional('weather', text('overcast, gusts, dry'), 'weather and changes in it'),
  spaceWeather: optional('space weather', text('quiet, Kp 2'), 'state of the ionosphere'),
  obstructions: optional('obstructions', text('crane to the south'), 'horizon and reflectors'),
  satellites: optional('satellites', text('GPS and Galileo, 18 to 22'), 'satellites in short'),
  problems: optional('problems', text('none'), 'problems met'),
  photographs: optional('photographs', text('12 to 19'), 'photographs and sketches'),
  remarks: optional('remarks', text('none'), 'anything else'),
};

const receiverFields = {
  type: optional('type', text('make and model'), 'make and model'),
  serial: optional('serial', text('004711'), 'serial number'),
  firmware: optional('firmware', text('2.31'), 'version of the firmware'),
  software: optional('software', text('controller 5.0'), 'version of the controller software'),
  reducedToMark: optional(
    'reduced to mark',
    yesNo(),
    'did the receiver take off the antenna height before it wrote the log',
  ),
  heightEnteredM: optional(
    'height entered',
    length(ANTENNA_M, '1.808 m'),
    'antenna height that was typed into the receiver',
  ),
};

const readingFields = {
  readings: optional(
    'readings',
    list(lengthReading(ANTENNA_M, '1.853 m'), {most: 50}),
    'readings to 1 mm, from several sides',
  ),
  checkReadings: optional(
    'check readings',
    list(lengthReading(ANTENNA_M, '6.08 ft'), {most: 50}),
    'the same height read in another unit',
  ),
  at: optional('at', moment(), 'when it was measured'),
};

const antennaFields = {
  type: optional('type', text('make and model'), 'make and model'),
  code: optional('code', text('XXXXXXXXXXXXXXX NONE'), 'international code of antenna and dome'),
  serial: optional('serial', text('000815'), 'serial number'),
  measured: optional(
    'measured',
    choice(['vertical', 'slant']),
    'was the height measured plumb, or along the slope to the rim',
  ),
  measuredTo: optional('measured to', choice(MEASURED_TO), 'which point of the antenna'),
  plateRadiusM: optional(
    'plate radius',
    length(PLATE_M, '0.1905 m'),
    'slant only: radius of the circle on which the slant mark lies',
  ),
  slantMarkAboveArpM: optional(
    'slant mark above reference point',
    length(OFFSET_M, '0.0350 m'),
    'height of the slant mark above the antenna reference point',
  ),
  phaseCentreAboveArpM: optional(
    'phase centre above reference point',
    length(OFFSET_M, '0.0712 m'),
    'from the calibration of this antenna type',
  ),
  before: optional('before', mapping(readingFields, '{readings: [1.853 m]}'), 'before the session'),
  after: optional('after', mapping(readingFields, '{readings: [1.853 m]}'), 'after the session'),
  heightUsed: optional(
    'height used',
    choice(HEIGHT_USED),
    'which height counts when it changed (mean, if both are measured and nothing is said)',
  ),
};

const tribrachFields = {
  type: optional('type', text('make and model'), 'make and model, or fixed-height pole'),
  serial: optional('serial', text('42'), 'serial number'),
  checked: optional('checked', date(), 'last check of its plummet and bubble'),
  orientation: optional('orientation', text('turned by 180 degrees'), 'how it is turned'),
};

const eccentricityFields = {
  eastM: optional('east', length(ECCENTRIC_M, '0.012 m'), 'antenna east of the mark'),
  northM: optional('north', length(ECCENTRIC_M, '-0.034 m'), 'antenna north of the mark'),
  upM: optional('up', length(ECCENTRIC_M, '0.5 m'), 'point under the antenna above the mark'),
  distanceM: optional('distance', length({least: 0, most: 1000}, '1.234 m'), 'plan distance'),
  bearingDeg: optional('bearing', bearing(), 'from the mark to the antenna, clockwise'),
  bearingFrom: optional(
    'bearing from',
    choice(['true north', 'grid north', 'magnetic north']),
    'which north',
  ),
  declinationDeg: optional(
    'declination',
    number({least: -180, most: 180}, '3.5'),
    'magnetic declination in degrees, east positive; for a magnetic bearing',
  ),
};

const equipmentFields = {
  receiver: optional('receiver', mapping(receiverFields, '{type: make and model}'), 'the receiver'),
  antenna: optional(
    'antenna',
    mapping(antennaFields, '{type: make and model}'),
    'the antenna, and how its height was measured',
  ),
  tribrach: optional(
    'tribrach',
    mapping(tribrachFields, '{type: make and model}'),
    'tribrach or pole',
  ),
  logPoint: optional('log point', choice(POINTS), 'which point the positions in the log are of'),
  eccentricity: optional(
    'eccentricity',
    mapping(eccentricityFields, '{east: 0.012 m, north: -0.034 m}'),
    'set-up that does not stand over the mark: from the mark to the antenna',
  ),
};

const correctionFields = {
  source: optional('source', text('national network service'), 'who sends the corrections'),
  mode: optional(
    'mode',
    choice(['single base', 'network', 'precise point positioning', 'satellite-augmented', 'none']),
    'kind of corrections',
  ),
  base: optional('base', text('BASE 1'), 'base station or mount point'),
  distance: optional('distance to base', text('4 km'), 'distance to the base'),
  localFit: optional('local fit', text('none'), 'local transformation in the receiver, residuals'),
  limits: optional('limits', text('PDOP 4, mask 10 degrees'), 'limits set in the receiver'),
};

const frameFields = {
  corrections: optional(
    'corrections',
    mapping(correctionFields, '{source: network}'),
    'corrections',
  ),
  frame: optional('frame', text('ITRF2020'), 'frame of the positions in the log'),
  coordinateEpoch: optional(
    'coordinate epoch',
    coordinateEpoch(),
    'decimal year of the base or network coordinates, not the day of the survey',
  ),
  verticalDatum: optional('vertical datum', text('EVRF2019'), 'system of the orthometric heights'),
  geoidModel: optional('geoid model', text('EGM2008'), 'name of the geoid model'),
  geoidGrid: optional('geoid grid', text('geoid.gtx'), 'file of the geoid model, GTX or ISG'),
  separationM: optional(
    'separation',
    length({least: -120, most: 120}, '44.667 m'),
    'ellipsoidal minus orthometric height, from the model and not from the receiver',
  ),
  projection: optional('projection', text('UTM 33 N'), 'map projection and zone'),
  units: optional('units', choice(['m', 'ft', 'us-ft']), 'units of the report'),
};

const statedFields = {
  of: required('of', choice(STATED_SOURCES), 'what the uncertainty belongs to'),
  planM: optional('plan', length(SIGMA_M, '1 mm'), 'the same east and north'),
  eastM: optional('east', length(SIGMA_M, '1 mm'), 'east'),
  northM: optional('north', length(SIGMA_M, '1 mm'), 'north'),
  upM: optional('up', length(SIGMA_M, '1 mm'), 'up'),
  id: optional('id', text('tape 3'), 'name of what is shared with other occupations'),
  from: optional('from', text('calibration of 2025'), 'where the number comes from'),
};

const accuracyFields = {
  standardUncertainties: optional(
    'standard uncertainties',
    list(mapping(statedFields, '{of: centring, plan: 1 mm}'), {most: 30}),
    'one standard uncertainty (68 %) each, of what the record cannot see',
  ),
  tolerance: optional(
    'tolerance',
    mapping(toleranceFields, '{horizontal: 20 mm, reason: site specification}'),
    'what a check must hold',
  ),
};

const settingFields = {
  fix: optional(
    'fix',
    choice(['best', 'fixed', 'float', 'differential', 'autonomous', 'precise', 'any']),
    'fix class to use',
  ),
  minSatellites: optional(
    'min-satellites',
    number({least: 0, most: 100}, '6'),
    'fewest satellites',
  ),
  maxHdop: optional('max-hdop', number({least: 0, most: 100}, '2.0'), 'largest horizontal DOP'),
  maxPdop: optional('max-pdop', number({least: 0, most: 100}, '4.0'), 'largest position DOP'),
  maxAge: optional('max-age', duration('5 s'), 'largest correction age'),
  maxSigma: optional('max-sigma', lengthText('30 mm'), 'largest sigma the receiver states'),
  fromUtc: optional('from-utc', text('2026-05-04T08:05:00Z'), 'leave out what is earlier'),
  toUtc: optional('to-utc', text('2026-05-04T09:00:00Z'), 'leave out what is later'),
  settle: optional('settle', duration('5 min'), 'leave out the start'),
  stand: optional('stand', number({least: 1, most: 10_000}, '2'), 'number of the standing period'),
  want: optional('want', lengthText('10 mm'), 'wished 95 % radius'),
  movementLimit: optional('movement-limit', lengthText('5 mm'), 'movement that matters'),
  date: optional('date', date(), 'date of the first epoch, when the log has none'),
  columns: optional('columns', text('time,x,y,z'), 'columns of a table without a header'),
  timeScale: optional('time-scale', choice(['utc', 'gps']), 'scale of the times in a table'),
  start: optional('start', text('2026-05-04T08:00:00'), 'UTC that a table counts seconds from'),
  ellipsoid: optional('ellipsoid', text('GRS80'), 'ellipsoid of the log'),
};

const settingsSection = {
  settings: optional(
    'settings',
    mapping(settingFields, '{min-satellites: 6}'),
    'options of the command line; what is typed there comes first',
  ),
};

export const sheetFields = {
  ...projectFields,
  ...occupationFields,
  ...equipmentFields,
  ...frameFields,
  ...accuracyFields,
  ...settingsSection,
};

export const sheetShape = mapping(sheetFields, '"mark: PILLAR 4"');

/** The sections in the order of the blank sheet. */
export const sheetSections: readonly {readonly title: string; readonly fields: Fields}[] = [
  {title: 'The work', fields: projectFields},
  {title: 'The occupation', fields: occupationFields},
  {title: 'The equipment, and the height of the antenna', fields: equipmentFields},
  {title: 'Where the positions come from', fields: frameFields},
  {title: 'What is known about accuracy, and what is asked', fields: accuracyFields},
  {title: 'Settings', fields: settingsSection},
];
