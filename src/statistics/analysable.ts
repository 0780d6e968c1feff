import type {ModelFit, Pooling} from './model-fits.ts';
import type {SessionInput} from './session-analysis.ts';
import type {Spread} from './spread.ts';
import type {TimeCells} from './time-cells.ts';

/** A record long and varied enough to be analysed. */
export interface Analysable {
  readonly input: SessionInput;
  readonly known: readonly Spread[];
  /** Numbers of the components that vary: the components of `cells`, in this order. */
  readonly varying: readonly number[];
  readonly cells: TimeCells;
  readonly spacingS: number;
}

/** The part of a record that can be tested for movement: components spread over enough digits. */
export interface Testable {
  readonly record: Analysable;
  /** Numbers of the components of `cells` and `fits`, in their order. */
  readonly numbers: readonly number[];
  readonly columns: readonly Float64Array[];
  readonly cells: TimeCells;
  readonly fits: readonly ModelFit[];
  readonly pooling: Pooling;
}

/** The components whose noise spreads over enough digits. */
export function testablePart(record: Analysable, fits: readonly ModelFit[]): Testable {
  const {varying, known, cells, input} = record;
  const at = varying.flatMap((c, i) => (known[c]!.dithered ? [i] : []));
  const numbers = at.map((i) => varying[i]!);
  return {
    record,
    numbers,
    columns: numbers.map((c) => input.components[c]!),
    cells: {...cells, means: at.map((i) => cells.means[i]!)},
    fits: fits.map((fit) => ({...fit, components: at.map((i) => fit.components[i]!)})),
    pooling: numbers[0] === 0 && numbers[1] === 1 ? 'plan' : 'none',
  };
}
