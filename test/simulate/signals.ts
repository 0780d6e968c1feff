import type {SimulatedOccupation} from './occupation.ts';
import type {Random} from './random.ts';

/** A displacement of the antenna, or of what the receiver prints, as a vector in metres. */
export interface Displacement {
  readonly eastM: number;
  readonly northM: number;
  readonly upM: number;
}

/** A displacement of given horizontal size in a random direction, up −0.3 of it (METHODS 3.2). */
export function knock(horizontalM: number, random: Random): Displacement {
  const azimuth = random.between(0, 2 * Math.PI);
  return {
    eastM: horizontalM * Math.sin(azimuth),
    northM: horizontalM * Math.cos(azimuth),
    upM: -0.3 * horizontalM,
  };
}

/** Adds a displacement times a course over time; the occupation given stays as it was. */
export function addCourse(
  occupation: SimulatedOccupation,
  by: Displacement,
  course: (elapsedS: number) => number,
): SimulatedOccupation {
  const factor = occupation.elapsedS.map(course);
  return {
    ...occupation,
    eastM: occupation.eastM.map((value, i) => value + by.eastM * factor[i]!),
    northM: occupation.northM.map((value, i) => value + by.northM * factor[i]!),
    upM: occupation.upM.map((value, i) => value + by.upM * factor[i]!),
  };
}

/** A knock: from `atS` on everything stands elsewhere. */
export function addStep(
  occupation: SimulatedOccupation,
  by: Displacement,
  atS: number,
): SimulatedOccupation {
  return addCourse(occupation, by, (t) => (t >= atS ? 1 : 0));
}

/** A drift that grows linearly from zero to the displacement over the record. */
export function addDrift(occupation: SimulatedOccupation, by: Displacement): SimulatedOccupation {
  const lastS = occupation.elapsedS[occupation.elapsedS.length - 1]!;
  return addCourse(occupation, by, (t) => t / lastS);
}

/** A setup that settles: displaced at first, at rest after a few `kappaS`. */
export function addSettling(
  occupation: SimulatedOccupation,
  by: Displacement,
  kappaS: number,
): SimulatedOccupation {
  return addCourse(occupation, by, (t) => Math.exp(-t / kappaS));
}

export interface PassOptions {
  /** Rises and settings within the record, two for each pass. */
  readonly jumps: number;
  readonly smallestM: number;
  readonly largestM: number;
  readonly shortestS: number;
  readonly longestS: number;
}

/**
 * Satellites rising and setting: each biases the position a little while it is used, so that the
 * position jumps when it comes and jumps back when it goes. Directions are random in space, up
 * stretched like the noise.
 */
export function addSatellitePasses(
  occupation: SimulatedOccupation,
  options: PassOptions,
  random: Random,
): SimulatedOccupation {
  const lastS = occupation.elapsedS[occupation.elapsedS.length - 1]!;
  let jumped = occupation;
  for (let pass = 0; pass < options.jumps / 2; pass++) {
    const lengthS = random.between(options.shortestS, options.longestS);
    const riseS = random.between(0, lastS - lengthS);
    const by = vectorOfLength(random.between(options.smallestM, options.largestM), random);
    jumped = addCourse(jumped, by, (t) => (t >= riseS && t < riseS + lengthS ? 1 : 0));
  }
  return jumped;
}

/** A vector of given length in a random direction; the direction leans up as heights are noisier. */
function vectorOfLength(lengthM: number, random: Random): Displacement {
  const east = random.normal();
  const north = random.normal();
  const up = 1.9 * random.normal();
  const factor = lengthM / Math.hypot(east, north, up);
  return {eastM: east * factor, northM: north * factor, upM: up * factor};
}
