import type {Chart} from '../charts/chart.ts';

/** How a key of a legend is drawn in the style sheet. */
type KeyShape =
  | 'line-data'
  | 'line-third'
  | 'line-ink'
  | 'dot-ink'
  | 'dash-estimate'
  | 'line-estimate'
  | 'dash-flagged'
  | 'block-mid'
  | 'block-pale'
  | 'block-flagged'
  | 'block-hole'
  | 'block-data'
  | 'block-estimate'
  | 'dash-third'
  | `ramp-${number}`
  | `width-${number}`;

export interface LegendKey {
  readonly shape: KeyShape;
  readonly text: string;
}

/** One bin that a pointer can read; `share` is its part of the width. */
export interface ReadoutBin {
  readonly text: string;
  readonly share: number;
}

export interface Figure {
  readonly kind: 'figure';
  readonly id: string;
  /** Name for those who do not see the picture. */
  readonly title: string;
  /** What the figure shows, from the result. */
  readonly finding: string;
  /** How to read it. */
  readonly note: string;
  readonly wide: Chart;
  /** null: the wide form fits a phone. */
  readonly narrow: Chart | null;
  readonly legend: readonly LegendKey[];
  readonly readout: readonly ReadoutBin[];
}

/** A figure that the record has no data for. */
export interface AbsentFigure {
  readonly kind: 'absent';
  readonly title: string;
  readonly why: string;
}

export type FigureOrReason = Figure | AbsentFigure;

export function absent(title: string, why: string): AbsentFigure {
  return {kind: 'absent', title, why};
}
