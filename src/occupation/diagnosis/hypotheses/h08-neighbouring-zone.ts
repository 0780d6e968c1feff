import {utmZoneOf} from '../../../geodesy/transverse-mercator.ts';
import {type Hypothesis, notTested, predicted} from '../hypothesis.ts';
import {recomputed} from '../recomputed.ts';

/** Degrees from one zone to the next. */
const ZONE_DEG = 6;

/**
 * UTM coordinates read in a neighbouring zone: the longitude is off by exactly one zone, two on
 * Svalbard where every other zone is left out.
 */
export const neighbouringZone: Hypothesis = {
  code: 'H08',
  predict: (input) => {
    const {markPlan} = input;
    if (markPlan === null) return notTested('no-plan');
    const own = utmZoneOf(markPlan);
    if (own === undefined) return notTested('no-grid');
    const {latitudeDeg, longitudeDeg} = markPlan;
    return predicted(
      recomputed(
        input,
        [-2, -1, 1, 2]
          .filter((zones) => Math.abs(zones) === 1 || latitudeDeg >= 72)
          .map((zones) => ({
            latitudeDeg,
            longitudeDeg: longitudeDeg + zones * ZONE_DEG,
            upM: 0,
            values: {zone: own.zone, readAs: ((own.zone - 1 + zones + 60) % 60) + 1},
          })),
      ),
    );
  },
};
