import type {LocalColumns} from './local-columns.ts';
import type {NoticeList} from './notices.ts';
import type {ReduceRequest} from './request.ts';
import type {Result} from './result.ts';

const HEIGHT = ['orthometricHeightM', 'separation'].flatMap((name) => [
  `position.${name}`,
  `segments[].position.${name}`,
]);

/** What the user must know about the geoid behind the heights. */
export function noticeHeights(
  {segments}: Result,
  {geoid}: ReduceRequest,
  {heightKind}: LocalColumns,
  comparesAboveGeoid: boolean,
  notices: NoticeList,
): void {
  const separation = segments[0]?.position.separation ?? null;
  if (heightKind !== 'ellipsoidal') {
    const asked = geoid.grid !== null || geoid.stated !== null;
    if (asked && heightKind !== 'none') notices.add('caution', 'geoid-not-applied', HEIGHT);
    return;
  }
  if (geoid.grid !== null && separation === null) {
    const {grid} = geoid.grid;
    notices.add('concern', 'geoid-outside', HEIGHT, {
      model: grid.name,
      southDeg: grid.southDeg,
      northDeg: grid.southDeg + (grid.rowCount - 1) * grid.latitudeStepDeg,
      westDeg: grid.westDeg,
      eastDeg: grid.westDeg + (grid.columnCount - 1) * grid.longitudeStepDeg,
    });
  }
  if (separation === null) return;
  const {from, receiverM, separationM, model} = separation;
  if (from !== 'receiver' && receiverM !== null) {
    notices.add('note', 'separations-compared', ['position.separation'], {
      from,
      model,
      separationM,
      receiverM,
      differenceM: separationM - receiverM,
    });
  }
  if (from === 'receiver' && comparesAboveGeoid) {
    notices.add('caution', 'receiver-geoid-compared', ['comparison.offsetM']);
  }
}
