// From the columns of a day to the page, imports included, log reading left out; beside the least
// that Vega can do: its import and one chart. Prints the seconds of each.
import {readFileSync} from 'node:fs';
import {WGS84} from '../../dist/geodesy/ellipsoid.js';
import {enuColumns, localFrame} from '../../dist/geodesy/local.js';
import {createLogReader} from '../../dist/log/reader.js';

const [what, log, resultPath] = process.argv.slice(2);

async function oneChart() {
  const startedMs = performance.now();
  const vega = await import('vega');
  const {compile} = await import('vega-lite');
  const values = Array.from({length: 360}, (_, i) => ({t: i, v: Math.sin(i / 30)}));
  const {spec} = compile({
    data: {values},
    mark: 'line',
    encoding: {x: {field: 't', type: 'quantitative'}, y: {field: 'v', type: 'quantitative'}},
  });
  await new vega.View(vega.parse(spec), {renderer: 'none'}).toSVG();
  return (performance.now() - startedMs) / 1000;
}

async function page() {
  const reader = createLogReader({
    name: 'day',
    date: null,
    trustAbsentChecksum: false,
    table: {
      columns: null,
      timeScale: null,
      startGpsSeconds: null,
      semiMajorAxisM: WGS84.semiMajorAxisM,
      inverseFlattening: WGS84.inverseFlattening,
    },
  });
  reader.add(readFileSync(log));
  const {epochs, satellites} = reader.finish();
  const result = JSON.parse(readFileSync(resultPath, 'utf8'));
  const {latitudeDeg, longitudeDeg, ellipsoidalHeightM} = result.reference.geodetic;
  const frame = localFrame({latitudeDeg, longitudeDeg, ellipsoidalHeightM}, WGS84);
  const columns = enuColumns(epochs, frame);
  const startedMs = performance.now();
  const {buildSeries} = await import('../../dist/occupation/series.js');
  const {renderReport} = await import('../../dist/report/report.js');
  const series = buildSeries({
    epochs,
    ...columns,
    used: new Uint8Array(epochs.count).fill(1),
    satellites,
    intervalS: result.epochs.intervalS,
    resolutionM: result.epochs.resolutionM,
    parts: result.segments,
    settlingHalfWidthM: null,
  });
  const html = await renderReport(result, series);
  if (html.length < 1e5) throw new Error('the page is not whole');
  return (performance.now() - startedMs) / 1000;
}

process.stdout.write(String(await (what === 'page' ? page() : oneChart())));
