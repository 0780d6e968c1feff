import {CHART_CONFIG, type Chart, pictureHeight, pictureWidth, type Spec} from './charts/chart.ts';
import {textWidthPx} from './charts/text-width.ts';
import {slimSvg} from './svg/slim.ts';

/** Words that stand for a picture where it cannot be seen. */
interface PictureWords {
  readonly id: string;
  readonly title: string;
  readonly description: string;
}

/** Exported by Vega and left out of its types. */
interface TextMetrics {
  canvas(use: boolean): void;
  width(item: {fontSize?: number}, text: unknown): number;
}

/** Draws charts one after the other: Vega counts its ids per process. */
export interface Renderer {
  draw(chart: Chart, words: PictureWords): Promise<string>;
}

/**
 * Loads Vega and makes it independent of the machine.
 *
 * Without a canvas Vega guesses text half as wide again as it is; with one the bytes would depend
 * on its fonts. So both are replaced by one table of widths.
 */
export async function createRenderer(): Promise<Renderer> {
  const [vega, vegaLite] = await Promise.all([import('vega'), import('vega-lite')]);
  const metrics = (vega as unknown as {textMetrics: TextMetrics}).textMetrics;
  metrics.canvas(false);
  metrics.width = (item, text) => textWidthPx(String(text ?? ''), item.fontSize ?? 11);

  const draw = async (chart: Chart, words: PictureWords): Promise<string> => {
    const full = {...chart.spec, config: CHART_CONFIG} as unknown as Parameters<
      typeof vegaLite.compile
    >[0];
    const compiled = vegaLite.compile(full, {logger: silent}).spec as unknown as Spec;
    const sized = {
      ...compiled,
      autosize: {type: 'none'},
      width: chart.widthPx,
      height: chart.heightPx,
      padding: chart.padding,
      background: null,
    };
    vega.resetSVGDefIds();
    const view = new vega.View(vega.parse(sized as never), {renderer: 'none'});
    const svg = await view.toSVG();
    view.finalize();
    return slimSvg(svg, {
      ...words,
      widthPx: pictureWidth(chart),
      heightPx: pictureHeight(chart),
    });
  };
  return {draw};
}

/** Vega-Lite talks to the console; what it could say is checked by the tests of the charts. */
const silent = {
  level: () => silent,
  error: () => silent,
  warn: () => silent,
  info: () => silent,
  debug: () => silent,
} as never;
