/** A field sheet in which everything is filled in, of an invented occupation. */
export function fullSheet(): string {
  return `project: Harbour wall 2026
title: Opening check of pillar 4
purpose: check before setting out
location: north quay
client: Harbour board
organisation: Survey office
address: 1 Quay Road
responsible: chief surveyor
registration: 12345
specification: "site specification, clause 4"
departures: none
accuracy risk: two occupations
deliverables: "report, raw log"
conclusions: the pillar may be used
mark: PILLAR 4
identification: stamping read, photo 12
set-up: A
occupation of this mark: 1 of 2
observer: the second crew
date: 2026-05-04
start: 2026-05-04 10:00 +02:00
stop: 2026-05-04T09:30:00Z
weather: overcast, gusts, dry
space weather: quiet
obstructions: crane to the south
satellites: 18 to 22
problems: none
photographs: 12 to 19
remarks: |
  A lorry passed at 10:20.
  It did not stop.
receiver:
  type: invented receiver
  serial: 004711
  firmware: 2.31
  software: 5.0
  reduced to mark: no
  height entered: 0 m
antenna:
  type: invented antenna
  code: XXXXXXXXXXXXXXX NONE
  serial: 000815
  measured: slant
  measured to: slant mark
  plate radius: 0.1905 m
  slant mark above reference point: 0.0350 m
  phase centre above reference point: 0.0712 m
  before:
    readings: [1.8527 m, 1.853 m]
    check readings: [6.08 ft]
    at: 2026-05-04T07:55:00Z
  after:
    readings:
      - 1.8525 m
      - 1852 mm
    check readings: [6.08 ft]
    at: 2026-05-04T09:35:00Z
  height used: interpolated
tribrach:
  type: invented tribrach
  serial: 42
  checked: 2026-04-01
  orientation: index to north
log point: antenna reference point
eccentricity:
  distance: 1.234 m
  bearing: 123 45 10
  bearing from: magnetic north
  declination: 3.5
  up: 0 m
corrections:
  source: national network service
  mode: network
  base: BASE 1
  distance to base: 4 km
  local fit: none
  limits: PDOP 4
frame: ITRF2020
coordinate epoch: 2020.0
vertical datum: EVRF2019
geoid model: EGM2008
geoid grid: geoid.gtx
separation: 44.667 m
projection: UTM 33 N
units: m
standard uncertainties:
  - {of: centring, plan: 1 mm, id: tribrach 42, from: check of 2026-04-01}
  - {of: base, east: 5 mm, north: 5 mm, up: 10 mm, id: BASE 1, from: data sheet}
tolerance:
  horizontal: 20 mm
  east: 20 mm
  north: 20 mm
  up: 30 mm
  reason: "site specification, clause 4"
settings:
  fix: fixed
  min-satellites: 6
  max-hdop: 2.0
  max-pdop: 4
  max-age: 5 s
  max-sigma: 30 mm
  from-utc: 2026-05-04T08:05:00Z
  to-utc: 2026-05-04T09:25:00Z
  settle: 5 min
  stand: 1
  want: 10 mm
  movement-limit: 5 mm
  date: 2026-05-04
  columns: time,x,y,z
  time-scale: utc
  start: 2026-05-04T08:00:00
  ellipsoid: GRS80
`;
}
