import {expect, test} from 'vitest';
import {FRAMES, HUB} from '../../src/geodesy/frame-table.ts';

test('every frame hangs on the hub, but for those that exist only as a grid', () => {
  const byName = new Map(FRAMES.map((frame) => [frame.name, frame]));
  for (const start of FRAMES) {
    let frame = start;
    for (let links = 0; frame.parent !== null && links < 10; links++) {
      const parent = byName.get(frame.parent.parent);
      if (parent === undefined) throw new Error(`${frame.name} hangs on nothing`);
      frame = parent;
    }
    if (start.kind === 'grid-based' && start.parent === null) continue;
    expect(frame.name, start.name).toBe(HUB);
  }
});

test('every link names its source and every set has 15 finite numbers', () => {
  for (const {name, parent} of FRAMES) {
    if (parent === null) continue;
    expect(parent.source, name).toMatch(/EUREF|EPSG|Bulletin|memory/);
    expect(parent.standardUncertaintyM, name).toBeGreaterThanOrEqual(0);
    if (parent.set === null) continue;
    const numbers = Object.values(parent.set).flat();
    expect(numbers, name).toHaveLength(15);
    expect(numbers.every(Number.isFinite), name).toBe(true);
  }
});
