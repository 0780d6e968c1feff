import {UsageError} from '../../errors.ts';
import {WGS84} from '../../geodesy/ellipsoid.ts';
import {enuFromEcef, localFrameAtEcef} from '../../geodesy/local.ts';
import {NORMAL_95} from '../../statistics/distribution.ts';
import type {MarkDistance} from '../combination.ts';
import {planeOf} from '../covariance.ts';
import type {PerAxis} from '../result.ts';
import {cancelsBetweenMarks, sourceOf} from './shared-errors.ts';
import type {SolvedMark} from './solved-mark.ts';
import {varianceOfDifference} from './weighted-axis.ts';

/** From one mark to another, with what both share left out of the uncertainty. */
export function distance(from: SolvedMark, to: SolvedMark): MarkDistance {
  if (from.mark.frame !== to.mark.frame || from.mark.coordinateEpoch !== to.mark.coordinateEpoch) {
    throw new UsageError(
      `${from.mark.name} and ${to.mark.name} stand in different frames or epochs; reduce all alike, ` +
        'with --frame and --coordinate-epoch',
    );
  }
  const {eastM, northM, upM} = enuFromEcef(to.ecef, localFrameAtEcef(from.ecef, WGS84));
  const spatialM = Math.hypot(eastM, northM, upM);
  const variance = (axis: keyof PerAxis) => varianceOfDifference(from.axes[axis], to.axes[axis]);
  const [east, north, up] = [variance('east'), variance('north'), variance('up')];
  const eastNorthM2 = [from, to]
    .map(({mark}) => planeOf(mark.covarianceEnuM2).eastNorth)
    .reduce((sum, one) => sum + one);
  const crossM4 = 2 * eastM * northM * eastNorthM2;
  const along = (eastM ** 2 * east + northM ** 2 * north + upM ** 2 * up + crossM4) / spatialM ** 2;
  const azimuth = (Math.atan2(eastM, northM) * 180) / Math.PI;
  const cancels = [...from.axes.up.sharedM.keys()].filter(
    (key) => cancelsBetweenMarks(key) && to.axes.up.sharedM.has(key),
  );
  return {
    from: from.mark.name,
    to: to.mark.name,
    eastM,
    northM,
    upM,
    heightDifferenceM: to.mark.geodetic.ellipsoidalHeightM - from.mark.geodetic.ellipsoidalHeightM,
    spatialM,
    azimuthDeg: azimuth < 0 ? azimuth + 360 : azimuth,
    uncertainty95M: {
      spatial: NORMAL_95 * Math.sqrt(along),
      height: NORMAL_95 * Math.sqrt(up),
    },
    cancels: cancels.map(sourceOf).sort(),
  };
}
