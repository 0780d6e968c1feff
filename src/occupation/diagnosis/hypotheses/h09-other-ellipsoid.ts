import {ellipsoid} from '../../../geodesy/ellipsoid.ts';
import {ecefFromGeodetic, geodeticFromEcef} from '../../../geodesy/geocentric.ts';
import {type Hypothesis, notTested, predicted} from '../hypothesis.ts';
import {recomputed} from '../recomputed.ts';

/**
 * Source: EPSG Geodetic Parameter Dataset, ellipsoids 7022, 7004, 7008, 7012, 7001, 7024, 7043; the
 * modified one of 1880 as PROJ 9 has it under clrk80.
 */
const OTHERS = [
  ellipsoid(6378388, 297, 'International 1924'),
  ellipsoid(6377397.155, 299.1528128, 'Bessel 1841'),
  ellipsoid(6378206.4, 294.978698213898, 'Clarke 1866'),
  ellipsoid(6378249.145, 293.465, 'Clarke 1880 (RGS)'),
  ellipsoid(6378249.145, 293.4663, 'Clarke 1880 (modified)'),
  ellipsoid(6377563.396, 299.3249646, 'Airy 1830'),
  ellipsoid(6378245, 298.3, 'Krassowsky 1940'),
  ellipsoid(6378135, 298.26, 'WGS 72'),
];

/**
 * Geocentric coordinates turned to latitude, longitude and height on another ellipsoid, of the
 * measured position or of the mark.
 */
export const otherEllipsoid: Hypothesis = {
  code: 'H09',
  predict: (input) => {
    const {markPlan, ellipsoidalHeightM} = input;
    if (markPlan === null) return notTested('no-plan');
    if (ellipsoidalHeightM === null) return notTested('no-ellipsoidal-height');
    const mark = {...markPlan, ellipsoidalHeightM};
    return predicted(
      recomputed(
        input,
        OTHERS.flatMap((other) =>
          [
            {from: input.ellipsoid, to: other, side: 'measured'},
            {from: other, to: input.ellipsoid, side: 'mark'},
          ].map(({from, to, side}) => {
            const read = geodeticFromEcef(ecefFromGeodetic(mark, from), to);
            return {
              ...read,
              upM: read.ellipsoidalHeightM - ellipsoidalHeightM,
              values: {ellipsoid: other.name, side},
            };
          }),
        ),
      ),
    );
  },
};
