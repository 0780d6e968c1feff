/** A number to a tenth of a pixel, as short as it can be written. */
export function shortNumber(value: number): string {
  const tenths = Math.round(value * 10) / 10;
  if (tenths === 0) return '0';
  return String(tenths).replace(/^(-?)0\./, '$1.');
}

type Point = readonly [number, number];

/**
 * The same path with relative steps of tenths of a pixel.
 *
 * Each step is taken from where the rounded path stands, so that errors do not add up: no point is
 * more than 0.05 px from its place. Commands other than M, L, H, V, C, Z keep their long form, and
 * so does the whole path then.
 */
export function shortPath(d: string): string {
  const commands = commandsOf(d);
  if (commands === null) return d;
  let text = '';
  let last = '';
  let here: Point = [0, 0];
  let start: Point = [0, 0];
  let exact: Point = [0, 0];
  for (const {letter, numbers} of commands) {
    if (letter === 'Z') {
      text += 'Z';
      last = 'Z';
      here = start;
      exact = start;
      continue;
    }
    const points = pointsOf(letter, numbers, exact);
    const end = points[points.length - 1];
    if (end === undefined) return d;
    exact = end;
    const rounded = points.map(([x, y]): Point => [tenth(x), tenth(y)]);
    const target = rounded[rounded.length - 1] ?? here;
    const step = stepText(letter, rounded, here);
    if (step !== null) {
      text +=
        step.letter === last && step.letter !== 'M'
          ? joined(step.numbers)
          : step.letter + compact(step.numbers);
      last = step.letter;
    }
    here = target;
    if (letter === 'M') start = here;
  }
  return text;
}

function tenth(value: number): number {
  return Math.round(value * 10) / 10;
}

interface Command {
  readonly letter: string;
  readonly numbers: readonly number[];
}

const ARGUMENTS: Readonly<Record<string, number>> = {M: 2, L: 2, H: 1, V: 1, C: 6, Z: 0};

/** Commands in capital letters with absolute numbers; null when there is one we do not know. */
function commandsOf(d: string): Command[] | null {
  const commands: Command[] = [];
  let here: Point = [0, 0];
  let start: Point = [0, 0];
  for (const match of d.matchAll(/([a-zA-Z])([^a-zA-Z]*)/g)) {
    const [, written = '', rest = ''] = match;
    const letter = written.toUpperCase();
    const count = ARGUMENTS[letter];
    if (count === undefined) return null;
    const numbers = [...rest.matchAll(/-?\d*\.?\d+(?:e-?\d+)?/g)].map(([text]) => Number(text));
    if (count === 0) {
      commands.push({letter, numbers});
      here = start;
      continue;
    }
    for (let i = 0; i < numbers.length; i += count) {
      const group = numbers.slice(i, i + count);
      const absolute = written === letter ? group : absoluteOf(letter, group, here);
      const name = letter === 'M' && i > 0 ? 'L' : letter;
      commands.push({letter: name, numbers: absolute});
      const points = pointsOf(name, absolute, here);
      here = points[points.length - 1] ?? here;
      if (name === 'M') start = here;
    }
  }
  return commands;
}

function absoluteOf(letter: string, numbers: readonly number[], [x, y]: Point): number[] {
  if (letter === 'H') return numbers.map((value) => value + x);
  if (letter === 'V') return numbers.map((value) => value + y);
  return numbers.map((value, i) => value + (i % 2 === 0 ? x : y));
}

function pointsOf(letter: string, numbers: readonly number[], [x, y]: Point): Point[] {
  if (letter === 'H') return [[numbers[0] ?? x, y]];
  if (letter === 'V') return [[x, numbers[0] ?? y]];
  const points: Point[] = [];
  for (let i = 0; i + 1 < numbers.length; i += 2)
    points.push([numbers[i] ?? 0, numbers[i + 1] ?? 0]);
  return points;
}

function stepText(letter: string, points: readonly Point[], here: Point) {
  const relative = points.flatMap(([x, y]) => [tenth(x - here[0]), tenth(y - here[1])]);
  if (letter === 'M') return {letter: 'M', numbers: points.flat()};
  if (letter === 'C') return {letter: 'c', numbers: relative};
  const [dx = 0, dy = 0] = relative;
  if (dx === 0 && dy === 0) return null;
  if (dy === 0) return {letter: 'h', numbers: [dx]};
  if (dx === 0) return {letter: 'v', numbers: [dy]};
  return {letter: 'l', numbers: [dx, dy]};
}

/** Numbers after a command letter: a minus sign, or a point after a decimal one, separates. */
function compact(numbers: readonly number[]): string {
  let text = '';
  let previous = '';
  for (const value of numbers) {
    const number = shortNumber(value);
    const joins =
      previous === '' ||
      number.startsWith('-') ||
      (number.startsWith('.') && previous.includes('.'));
    text += joins ? number : ` ${number}`;
    previous = number;
  }
  return text;
}

/** Numbers that go on with the command before them. */
function joined(numbers: readonly number[]): string {
  const text = compact(numbers);
  return text.startsWith('-') ? text : ` ${text}`;
}
