import {baseWrong} from './hypotheses/b01-base-wrong.ts';
import {wrongMark} from './hypotheses/b02-wrong-mark.ts';
import {referenceWrong} from './hypotheses/b03-reference-wrong.ts';
import {plummetOut} from './hypotheses/c01-plummet-out.ts';
import {poleTilted} from './hypotheses/c02-pole-tilted.ts';
import {frameMismatch} from './hypotheses/f01-frame-mismatch.ts';
import {epochMismatch} from './hypotheses/f02-epoch-mismatch.ts';
import {groundDistance} from './hypotheses/g01-ground-distance.ts';
import {surveyFoot} from './hypotheses/h01-survey-foot.ts';
import {latitudeSign} from './hypotheses/h02-latitude-sign.ts';
import {longitudeSign} from './hypotheses/h03-longitude-sign.ts';
import {latitudeLongitudeSwapped} from './hypotheses/h04-latitude-longitude-swapped.ts';
import {minutesAsDecimals} from './hypotheses/h05-minutes-as-decimals.ts';
import {decimalsAsMinutes} from './hypotheses/h06-decimals-as-minutes.ts';
import {packedAsDecimals} from './hypotheses/h07-packed-as-decimals.ts';
import {neighbouringZone} from './hypotheses/h08-neighbouring-zone.ts';
import {otherHemisphere} from './hypotheses/h08b-other-hemisphere.ts';
import {otherEllipsoid} from './hypotheses/h09-other-ellipsoid.ts';
import {geocentricLatitude} from './hypotheses/h10-geocentric-latitude.ts';
import {eastNorthExchanged} from './hypotheses/h11-east-north-exchanged.ts';
import {leadingDigits} from './hypotheses/h12-leading-digits.ts';
import {oceanLoading} from './hypotheses/l01-ocean-loading.ts';
import {magneticBearing} from './hypotheses/o01-magnetic-bearing.ts';
import {gridBearing} from './hypotheses/o02-grid-bearing.ts';
import {offsetPointNotApplied} from './hypotheses/o03-offset-point-not-applied.ts';
import {wrongFix} from './hypotheses/q01-wrong-fix.ts';
import {digitsCutOff} from './hypotheses/r01-digits-cut-off.ts';
import {weekRollover} from './hypotheses/t02-week-rollover.ts';
import {slantAsVertical} from './hypotheses/v01-slant-as-vertical.ts';
import {verticalAsSlant} from './hypotheses/v02-vertical-as-slant.ts';
import {heightNotApplied} from './hypotheses/v03-height-not-applied.ts';
import {heightAppliedTwice} from './hypotheses/v04-height-applied-twice.ts';
import {heightWrongSign} from './hypotheses/v05-height-wrong-sign.ts';
import {otherPointOfAntenna} from './hypotheses/v06-other-point-of-antenna.ts';
import {feetAsMetres} from './hypotheses/v07-feet-as-metres.ts';
import {metresAsFeet} from './hypotheses/v08-metres-as-feet.ts';
import {metresAsCentimetres} from './hypotheses/v09-metres-as-centimetres.ts';
import {orthometricReference} from './hypotheses/v10-orthometric-reference.ts';
import {orthometricMeasured} from './hypotheses/v11-orthometric-measured.ts';
import {separationRemovedTwice} from './hypotheses/v12-separation-removed-twice.ts';
import {separationWrongSign} from './hypotheses/v13-separation-wrong-sign.ts';
import {defaultHeight} from './hypotheses/v14-default-height.ts';
import {digitsSwapped} from './hypotheses/v15-digits-swapped.ts';
import {digitWrong} from './hypotheses/v16-digit-wrong.ts';
import {otherGeoidModel} from './hypotheses/v17-other-geoid-model.ts';
import {otherVerticalDatum} from './hypotheses/v18-other-vertical-datum.ts';
import {settled} from './hypotheses/v19-settled.ts';
import {separationMissing} from './hypotheses/v20-separation-missing.ts';
import type {Hypothesis} from './hypothesis.ts';
import {LEAVES_NO_OFFSET} from './leaves-no-offset.ts';

/** Every blunder of the catalogue, in its order: a new one is one module and one line here. */
export const HYPOTHESES: readonly Hypothesis[] = [
  slantAsVertical,
  verticalAsSlant,
  heightNotApplied,
  heightAppliedTwice,
  heightWrongSign,
  otherPointOfAntenna,
  feetAsMetres,
  metresAsFeet,
  metresAsCentimetres,
  orthometricReference,
  orthometricMeasured,
  separationRemovedTwice,
  separationWrongSign,
  defaultHeight,
  digitsSwapped,
  digitWrong,
  otherGeoidModel,
  otherVerticalDatum,
  settled,
  separationMissing,
  surveyFoot,
  latitudeSign,
  longitudeSign,
  latitudeLongitudeSwapped,
  minutesAsDecimals,
  decimalsAsMinutes,
  packedAsDecimals,
  neighbouringZone,
  otherHemisphere,
  otherEllipsoid,
  geocentricLatitude,
  eastNorthExchanged,
  leadingDigits,
  frameMismatch,
  epochMismatch,
  baseWrong,
  wrongMark,
  referenceWrong,
  plummetOut,
  poleTilted,
  magneticBearing,
  gridBearing,
  offsetPointNotApplied,
  groundDistance,
  weekRollover,
  wrongFix,
  digitsCutOff,
  oceanLoading,
  ...LEAVES_NO_OFFSET,
];
