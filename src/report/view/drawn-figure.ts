import {type Chart, pictureWidth} from '../charts/chart.ts';
import type {FigureOrReason, LegendKey, ReadoutBin} from '../figures/figure.ts';
import type {Renderer} from '../render.ts';

/** A figure with its pictures drawn, or the reason why there is none. */
export interface DrawnFigure {
  readonly absent: string | null;
  readonly id: string;
  readonly number: string;
  readonly finding: string;
  readonly note: string;
  readonly wide: string;
  readonly narrow: string | null;
  readonly legend: readonly LegendKey[];
  readonly readout: ReadoutView | null;
}

interface ReadoutView {
  /** Where the plots stand in the picture, in percent of its width. */
  readonly left: string;
  readonly width: string;
  readonly bins: readonly {readonly text: string; readonly flex: string | null}[];
}

/** Draws figures in page order and numbers those that exist. */
export function figurePainter(renderer: Renderer) {
  let count = 0;
  return async (draft: FigureOrReason): Promise<DrawnFigure> => {
    if (draft.kind === 'absent') {
      return {
        absent: `${draft.title}: not drawn, ${draft.why}.`,
        id: '',
        number: '',
        finding: '',
        note: '',
        wide: '',
        narrow: null,
        legend: [],
        readout: null,
      };
    }
    count++;
    const {id, title, finding, note, legend} = draft;
    const words = {title, description: `${finding} ${note}`};
    const wide = await renderer.draw(draft.wide, {...words, id: `${id}-w`});
    const narrow =
      draft.narrow === null ? null : await renderer.draw(draft.narrow, {...words, id: `${id}-n`});
    return {
      absent: null,
      id,
      number: String(count),
      finding,
      note,
      wide,
      narrow,
      legend,
      readout: readoutView(draft.readout, draft.wide),
    };
  };
}

function readoutView(bins: readonly ReadoutBin[], chart: Chart): ReadoutView | null {
  if (bins.length === 0) return null;
  const percent = (px: number) => `${((100 * px) / pictureWidth(chart)).toFixed(2)}%`;
  return {
    left: percent(chart.padding.left),
    width: percent(chart.widthPx),
    bins: bins.map(({text, share}) => ({text, flex: share === 1 ? null : String(share)})),
  };
}
