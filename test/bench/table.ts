import {mkdirSync, writeFileSync} from 'node:fs';
import {dirname} from 'node:path';
import type {Cost} from './whole-command.ts';

interface Row {
  readonly what: string;
  readonly cost: Cost;
  /** Wall time over that of others in the same run. */
  readonly ratios: Readonly<Record<string, number>>;
}

/** The rows of a bench, printed as a table and kept as JSON. */
export class BenchTable {
  readonly #rows: (Row | string)[] = [];

  remark(text: string): void {
    this.#rows.push(text);
  }

  row(what: string, cost: Cost, versus: Readonly<Record<string, Cost | undefined>> = {}): Cost {
    const ratios = Object.fromEntries(
      Object.entries(versus).flatMap(([name, other]) =>
        other === undefined ? [] : [[name, cost.wallS / other.wallS]],
      ),
    );
    this.#rows.push({what, cost, ratios});
    return cost;
  }

  print(): void {
    process.stdout.write(`\n${this.#rows.map(lineOf).join('\n')}\n`);
  }

  save(path: string): void {
    mkdirSync(dirname(path), {recursive: true});
    const rows = this.#rows.filter((row) => typeof row !== 'string');
    writeFileSync(path, `${JSON.stringify({node: process.version, rows}, null, 2)}\n`);
  }
}

function lineOf(row: Row | string): string {
  if (typeof row === 'string') return row;
  const {what, cost, ratios} = row;
  const cell = (value: number, decimals: number, width: number, unit: string) =>
    `${Number.isNaN(value) ? '-' : value.toFixed(decimals)}`.padStart(width) + unit;
  const versus = Object.entries(ratios).map(([name, ratio]) => `  ${ratio.toFixed(2)} × ${name}`);
  return `${what.padEnd(46)}${cell(cost.wallS, 2, 8, ' s wall')}${cell(cost.cpuS, 2, 8, ' s cpu')}${cell(cost.peakMb, 0, 6, ' MB')}${versus.join('')}`;
}
