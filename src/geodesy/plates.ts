import {UsageError} from '../errors.ts';
import {GRS80} from './ellipsoid.ts';
import {RADIANS_PER_MAS, type Vector3} from './helmert.ts';
import {ecefVectorFromEnu, enuFromEcefVector, localFrameAtEcef} from './local.ts';
import type {Ecef} from './types.ts';

/** A model of plate motion: one rotation per plate, in the frame of the model. */
export interface PlateMotionModel {
  readonly name: string;
  /** The frame in which the velocities hold. */
  readonly frame: string;
  /** Added to the horizontal part of every prediction. */
  readonly originRateBiasMPerYear: Vector3;
  /** Systematic, horizontal, per axis: the scatter of the model's own residuals. */
  readonly standardUncertaintyMPerYear: number;
  readonly source: string;
  readonly plates: readonly Plate[];
}

export interface Plate {
  readonly code: string;
  readonly name: string;
  /** Rotation about the geocentric axes, milliarcseconds per year. */
  readonly rotationMasPerYear: Vector3;
}

function plate(code: string, name: string, rotationMasPerYear: Vector3): Plate {
  return {code, name, rotationMasPerYear};
}

/**
 * Source: Altamimi, Métivier, Rebischung, Collilieux, Chanard & Barnéoud (2023), ITRF2020 plate
 * motion model, Geophys. Res. Lett. 50, e2023GL106373; doi:10.1029/2023GL106373. Poles as in the
 * file data/ITRF2020 of OSGeo/PROJ; the bias is added to horizontal predictions only (abstract).
 */
export const ITRF2020_PMM: PlateMotionModel = {
  name: 'ITRF2020-PMM',
  frame: 'ITRF2020',
  originRateBiasMPerYear: [0.00037, 0.00035, 0.00074],
  standardUncertaintyMPerYear: 0.00025,
  source: 'Altamimi et al. (2023), doi:10.1029/2023GL106373',
  plates: [
    plate('AMUR', 'Amurian', [-0.131, -0.551, 0.837]),
    plate('ANTA', 'Antarctica', [-0.269, -0.312, 0.678]),
    plate('ARAB', 'Arabia', [1.129, -0.146, 1.438]),
    plate('AUST', 'Australia', [1.487, 1.175, 1.223]),
    plate('CARB', 'Caribbean', [0.207, -1.422, 0.726]),
    plate('EURA', 'Eurasia', [-0.085, -0.519, 0.753]),
    plate('INDI', 'India', [1.137, 0.013, 1.444]),
    plate('NAZC', 'Nazca', [-0.327, -1.561, 1.605]),
    plate('NOAM', 'North America', [0.045, -0.666, -0.098]),
    plate('NUBI', 'Nubia', [0.09, -0.585, 0.717]),
    plate('PCFC', 'Pacific', [-0.404, 1.021, -2.154]),
    plate('SOAM', 'South America', [-0.261, -0.282, -0.157]),
    plate('SOMA', 'Somalia', [-0.081, -0.719, 0.864]),
  ],
};

/**
 * Source: Altamimi, Métivier, Rebischung, Rouby & Collilieux (2017), ITRF2014 plate motion model,
 * Geophys. J. Int. 209, 1906–1912; doi:10.1093/gji/ggx136. Poles as in the file data/ITRF2014 of
 * OSGeo/PROJ; the bias is not significant and was not estimated (abstract).
 */
export const ITRF2014_PMM: PlateMotionModel = {
  name: 'ITRF2014-PMM',
  frame: 'ITRF2014',
  originRateBiasMPerYear: [0, 0, 0],
  standardUncertaintyMPerYear: 0.0003,
  source: 'Altamimi et al. (2017), doi:10.1093/gji/ggx136',
  plates: [
    plate('ANTA', 'Antarctica', [-0.248, -0.324, 0.675]),
    plate('ARAB', 'Arabia', [1.154, -0.136, 1.444]),
    plate('AUST', 'Australia', [1.51, 1.182, 1.215]),
    plate('EURA', 'Eurasia', [-0.085, -0.531, 0.77]),
    plate('INDI', 'India', [1.154, -0.005, 1.454]),
    plate('NAZC', 'Nazca', [-0.333, -1.544, 1.623]),
    plate('NOAM', 'North America', [0.024, -0.694, -0.063]),
    plate('NUBI', 'Nubia', [0.099, -0.614, 0.733]),
    plate('PCFC', 'Pacific', [-0.409, 1.047, -2.169]),
    plate('SOAM', 'South America', [-0.27, -0.301, -0.14]),
    plate('SOMA', 'Somalia', [-0.121, -0.794, 0.884]),
  ],
};

const MODELS: readonly PlateMotionModel[] = [ITRF2020_PMM, ITRF2014_PMM];

/** @throws UsageError for a model that stillmark does not hold */
export function plateMotionModelNamed(text: string): PlateMotionModel {
  const name = text.toUpperCase().replace(/[\s_-]/g, '');
  const found = MODELS.find((model) => model.name.replace('-', '') === name);
  if (found !== undefined) return found;
  throw new UsageError(`unknown plate motion model "${text}"; write ITRF2020-PMM or ITRF2014-PMM`);
}

/** Common spellings beside code and name of the models. */
const SYNONYMS: Readonly<Record<string, string>> = {
  EURASIAN: 'EURA',
  EUROPE: 'EURA',
  AFRICA: 'NUBI',
  AFRICAN: 'NUBI',
  NUBIAN: 'NUBI',
  SOMALIAN: 'SOMA',
  AMUR: 'AMUR',
  AMURIA: 'AMUR',
  AUSTRALIAN: 'AUST',
  INDIAN: 'INDI',
  ARABIAN: 'ARAB',
  ANTARCTIC: 'ANTA',
  NORTHAMERICAN: 'NOAM',
  SOUTHAMERICAN: 'SOAM',
};

/**
 * The plate that a name means in a model.
 *
 * @throws UsageError for plates without a rotation pole, with what to write instead
 */
export function plateNamed(text: string, model: PlateMotionModel): Plate {
  const name = text.toUpperCase().replace(/[\s_-]|PLATE$/g, '');
  const code = SYNONYMS[name] ?? name;
  const found = model.plates.find(
    (candidate) =>
      candidate.code === code || candidate.name.toUpperCase().replace(/ /g, '') === code,
  );
  if (found !== undefined) return found;
  const names = model.plates.map((candidate) => candidate.code).join(', ');
  throw new UsageError(
    `${model.name} has no rotation pole for the plate "${text}"; write one of ${names}, or the ` +
      'velocity of the mark, or a plate-fixed frame in which it is at rest',
  );
}

/**
 * Velocity of a point on a plate, in metres per year in the frame of the model.
 *
 * Method: omega × X, plus the horizontal part of the origin rate bias.
 * Accuracy: `standardUncertaintyMPerYear` in the plate's stable interior; nothing near its edges.
 */
export function plateVelocity(
  point: Ecef,
  {rotationMasPerYear}: Plate,
  model: PlateMotionModel,
): Ecef {
  const [wx, wy, wz] = rotationMasPerYear;
  const {xM, yM, zM} = point;
  const frame = localFrameAtEcef(point, GRS80);
  const [biasX, biasY, biasZ] = model.originRateBiasMPerYear;
  const bias = enuFromEcefVector({xM: biasX, yM: biasY, zM: biasZ}, frame);
  const horizontalBias = ecefVectorFromEnu({...bias, upM: 0}, frame);
  return {
    xM: (wy * zM - wz * yM) * RADIANS_PER_MAS + horizontalBias.xM,
    yM: (wz * xM - wx * zM) * RADIANS_PER_MAS + horizontalBias.yM,
    zM: (wx * yM - wy * xM) * RADIANS_PER_MAS + horizontalBias.zM,
  };
}
