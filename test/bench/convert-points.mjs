// Geocentric to geodetic, a million points at a time: ours beside proj4js, in one process.
import proj4 from 'proj4';
import {WGS84} from '../../dist/geodesy/ellipsoid.js';
import {ecefFromGeodetic, geodeticFromEcef} from '../../dist/geodesy/geocentric.js';

const POINTS = 1_000_000;
const points = Array.from({length: 1000}, (_, i) =>
  ecefFromGeodetic(
    {
      latitudeDeg: -89 + (178 * i) / 999,
      longitudeDeg: (i * 137.5) % 360,
      ellipsoidalHeightM: (i * 7.3) % 4000,
    },
    WGS84,
  ),
);
const library = proj4('+proj=geocent +datum=WGS84 +units=m', '+proj=longlat +datum=WGS84');
let sum = 0;

function timeS(convert) {
  const startedMs = performance.now();
  for (let i = 0; i < POINTS; i++) convert(points[i % points.length]);
  return (performance.now() - startedMs) / 1000;
}

const ours = (point) => {
  sum += geodeticFromEcef(point, WGS84).latitudeDeg;
};
const theirs = ({xM, yM, zM}) => {
  sum += library.forward([xM, yM, zM])[1];
};
// Once to warm up, then the middle of five.
const median = (convert) =>
  Array.from({length: 6}, () => timeS(convert))
    .slice(1)
    .sort()[2];
const result = {oursS: median(ours), proj4jsS: median(theirs)};
if (!Number.isFinite(sum)) throw new Error('a point was lost');
process.stdout.write(JSON.stringify(result));
