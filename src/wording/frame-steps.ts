import {fixed} from './numbers.ts';

/** How many decimals each kind of parameter is published with, and one more. */
const DECIMALS: readonly (readonly [RegExp, number])[] = [
  [/Mm$/, 3],
  [/Ppb$/, 4],
  [/Mas$/, 5],
  [/MPerYear$/, 6],
];

/** Rotations follow this convention in every step that is printed. */
export const ROTATION_CONVENTION = "position vector convention: X' = X + T + D X + R × X";

/** The parameters of one step between frames, such as "Tx mm −1.400; …; D ppb 0.6700". */
export function frameParametersText(parameters: Readonly<Record<string, number>>): string {
  return Object.entries(parameters)
    .sort(([a], [b]) => rank(a) - rank(b))
    .map(([name, value]) => `${parameterName(name)} ${fixed(value, decimalsOf(name))}`)
    .join('; ');
}

/** A frame with its epoch, such as "ITRF2014 at 2010.000". */
export function framePlaceText(frame: string, epoch: number | null): string {
  return epoch === null ? frame : `${frame} at ${epoch.toFixed(3)}`;
}

/** Translations, scale, rotations, velocity: the order of the publications. */
const ORDER = [
  ...['translationX', 'translationY', 'translationZ', 'scale'],
  ...['rotationX', 'rotationY', 'rotationZ', 'velocityX', 'velocityY', 'velocityZ'],
];

function rank(name: string): number {
  return ORDER.findIndex((beginning) => name.startsWith(beginning));
}

function decimalsOf(name: string): number {
  return DECIMALS.find(([pattern]) => pattern.test(name))?.[1] ?? 6;
}

/** `translationXMm` is "TX mm", as the tables of the frames print it. */
function parameterName(name: string): string {
  return name
    .replace(/^translation([XYZ])Mm$/, 'T$1 mm')
    .replace(/^rotation([XYZ])Mas$/, 'R$1 mas')
    .replace(/^scalePpb$/, 'D ppb')
    .replace(/^velocity([XYZ])MPerYear$/, 'V$1 m/yr');
}
