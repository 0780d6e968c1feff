import {transverseMercator, utmGrid, utmZoneOf} from '../../../geodesy/transverse-mercator.ts';
import {type Hypothesis, notTested, predicted} from '../hypothesis.ts';
import {recomputed} from '../recomputed.ts';

/** UTM coordinates read in the other hemisphere: the northing is off by 10 000 000 m. */
export const otherHemisphere: Hypothesis = {
  code: 'H08b',
  predict: (input) => {
    const {markPlan, ellipsoid} = input;
    if (markPlan === null) return notTested('no-plan');
    const own = utmZoneOf(markPlan);
    if (own === undefined) return notTested('no-grid');
    const other = own.hemisphere === 'N' ? 'S' : 'N';
    const coordinates = transverseMercator(utmGrid(own, ellipsoid)).forward(markPlan);
    const read = transverseMercator(utmGrid({...own, hemisphere: other}, ellipsoid)).inverse(
      coordinates,
    );
    return predicted(
      recomputed(input, [{...read, upM: 0, values: {zone: own.zone, readAs: other}}]),
    );
  },
};
