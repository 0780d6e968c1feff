import {readFileSync, writeFileSync} from 'node:fs';
import {join} from 'node:path';
import {describe, expect, test} from 'vitest';
import {GRS80} from '../../src/geodesy/ellipsoid.ts';
import {enuFromEcefVector, localFrameAtEcef} from '../../src/geodesy/local.ts';
import type {FrameChange, Result} from '../../src/occupation/result.ts';
import {frameParametersText} from '../../src/wording/frame-steps.ts';
import {emptyFolder, sample, stillmark} from './run.ts';

const folder = emptyFolder();

/** The sample marks, as coordinates of another frame and epoch. */
const marks = join(folder, 'marks.yaml');
writeFileSync(
  marks,
  readFileSync(sample('marks.yaml'), 'utf8')
    .replace('frame: ITRF2020', 'frame: ITRF2014')
    .replace('coordinate epoch: 2025.0', 'coordinate epoch: 2010.0'),
);
const CHECK = [
  'check',
  sample('mole-still.nmea'),
  '--sheet',
  sample('sheet.yaml'),
  '--marks',
  marks,
];

const MAS = Math.PI / (180 * 3600 * 1000);

/** X' = X + T + D X + R × X, or back, with the numbers as they are printed. */
function redone(x: readonly number[], {what, parameters: p}: FrameChange['steps'][number]) {
  const t = [p.translationXMm!, p.translationYMm!, p.translationZMm!].map((mm) => mm / 1000);
  const r = [p.rotationXMas!, p.rotationYMas!, p.rotationZMas!].map((mas) => mas * MAS);
  const d = p.scalePpb! * 1e-9;
  const sign = what.includes('opposite') ? -1 : 1;
  return [
    x[0]! + sign * (t[0]! + d * x[0]! - r[2]! * x[1]! + r[1]! * x[2]!),
    x[1]! + sign * (t[1]! + d * x[1]! + r[2]! * x[0]! - r[0]! * x[2]!),
    x[2]! + sign * (t[2]! + d * x[2]! - r[1]! * x[0]! + r[0]! * x[1]!),
  ];
}

describe('a check of a mark in another frame and at another epoch', () => {
  test('asks how the mark moves', () => {
    const {status, stderr} = stillmark(CHECK);
    expect(status).toBe(2);
    expect(stderr).toContain('need the motion of the point from ITRF2020 at 2025');
  });

  const report = join(folder, 'report.html');
  const {stdout} = stillmark([
    ...CHECK,
    '--motion',
    'plate PCFC',
    '--result',
    '-',
    '--report',
    report,
  ]);
  const result = JSON.parse(stdout) as Result;
  const change = result.comparison!.frameChange!;
  const {x, y, z} = result.position!.ecefM!;

  test('the steps can be redone by hand from what is printed, to 0.01 mm', () => {
    let at = [x, y, z];
    expect(change.steps.map(({what}) => what)).toEqual([
      'motion from 2025 to 2010',
      'similarity, position vector',
    ]);
    for (const step of change.steps) {
      const p = step.parameters;
      at = step.what.startsWith('motion')
        ? [
            at[0]! - 15 * p.velocityXMPerYear!,
            at[1]! - 15 * p.velocityYMPerYear!,
            at[2]! - 15 * p.velocityZMPerYear!,
          ]
        : redone(at, step);
      const after = [step.ecefM.x, step.ecefM.y, step.ecefM.z];
      expect(Math.hypot(...after.map((value, i) => value - at[i]!))).toBeLessThan(1e-5);
    }
  });

  test('the mismatch is what the steps take away', () => {
    const place = localFrameAtEcef({xM: x, yM: y, zM: z}, GRS80);
    const {eastM, northM, upM} = enuFromEcefVector(
      {xM: x - change.ecefM.x, yM: y - change.ecefM.y, zM: z - change.ecefM.z},
      place,
    );
    expect(change.mismatchM.east).toBeCloseTo(eastM, 6);
    expect(change.mismatchM.north).toBeCloseTo(northM, 6);
    expect(change.mismatchM.up).toBeCloseTo(upM, 6);
    // The Pacific plate moves some 7 cm a year to the north-west: about a metre in 15 years.
    expect(Math.hypot(eastM, northM)).toBeGreaterThan(0.5);
  });

  test('the budget has what the steps are worth', () => {
    const rows = result.budget.filter(({source}) => /frame/i.test(source));
    expect(rows.length).toBeGreaterThan(0);
    expect(rows[0]?.standardUncertaintyM?.east ?? 0).toBeGreaterThan(0);
  });

  test('the report prints every parameter and the mismatch', () => {
    const page = readFileSync(report, 'utf8');
    for (const step of change.steps) {
      expect(page.includes(frameParametersText(step.parameters)), step.what).toBe(true);
    }
    const mismatch = change.mismatchM.north.toFixed(4);
    const sentence = /Compared without these steps, the offset would be wrong by ([^.]|\.\d)+ m\./;
    expect(sentence.exec(page)?.[0]).toContain(mismatch);
  });
});
