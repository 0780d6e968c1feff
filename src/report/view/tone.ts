import type {Tone} from '../../wording/verdict.ts';

export type {Tone};

/** Each tone has a shape and a word; colour only repeats them. */
export const TONE_SHAPES: Readonly<Record<Tone, string>> = {
  within: '●',
  look: '▲',
  outside: '■',
  'not tested': '○',
};
