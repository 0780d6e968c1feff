import type {GeoidGrid, ParsedGeoidGrid, RefusedGeoidGrid} from './geoid-grid.ts';

const HEADER_BYTES = 40;
/** The value that marks a node without one, in this format. */
const NO_VALUE = -88.8888;

/**
 * A geoid grid in the GTX format.
 *
 * Layout, big-endian: latitude and longitude of the south-west node and steps in degrees (four
 * 64-bit floats), rows and columns (two 32-bit integers), then 32-bit floats row by row from the
 * south. The size of the file must be exactly what the counts say.
 * Source: the format of NOAA's VDatum as read by PROJ and GDAL; from memory, checked against PROJ.
 */
export function parseGtx(bytes: Uint8Array, name: string): ParsedGeoidGrid | RefusedGeoidGrid {
  if (bytes.length < HEADER_BYTES) {
    return refused(name, `need a header of ${HEADER_BYTES} bytes, found ${bytes.length} bytes`);
  }
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  const southDeg = view.getFloat64(0);
  const westDeg = view.getFloat64(8);
  const latitudeStepDeg = view.getFloat64(16);
  const longitudeStepDeg = view.getFloat64(24);
  const rowCount = view.getInt32(32);
  const columnCount = view.getInt32(36);
  if (!(rowCount >= 2 && columnCount >= 2)) {
    return refused(name, `need at least 2 rows and columns, found ${rowCount} and ${columnCount}`);
  }
  const expected = HEADER_BYTES + 4 * rowCount * columnCount;
  if (bytes.length !== expected) {
    return refused(
      name,
      `need ${expected} bytes for ${rowCount} × ${columnCount} nodes, found ${bytes.length}`,
    );
  }
  const northDeg = southDeg + latitudeStepDeg * (rowCount - 1);
  if (!(latitudeStepDeg > 0 && longitudeStepDeg > 0 && southDeg >= -90.001 && northDeg <= 90.001)) {
    return refused(name, `need bounds on the Earth, found latitudes ${southDeg} to ${northDeg}`);
  }
  const undulationM = new Float32Array(rowCount * columnCount);
  for (let i = 0; i < undulationM.length; i++) {
    const value = view.getFloat32(HEADER_BYTES + 4 * i);
    undulationM[i] = Math.abs(value - NO_VALUE) < 1e-3 ? Number.NaN : value;
  }
  const grid: GeoidGrid = {
    name,
    southDeg,
    westDeg,
    latitudeStepDeg,
    longitudeStepDeg,
    rowCount,
    columnCount,
    undulationM,
  };
  return {kind: 'geoid grid', grid};
}

function refused(name: string, reason: string): RefusedGeoidGrid {
  return {kind: 'refused', message: `${name} is no GTX grid: ${reason}`};
}
