/** Options that contradict each other or ask for something that does not exist; exit status 2. */
export class UsageError extends Error {
  override readonly name = 'UsageError';
}

/** Where in an input the trouble sits. */
export interface InputPlace {
  readonly path: string;
  readonly lineNumber?: number;
  readonly cause?: unknown;
}

/**
 * An input that cannot be used as asked; exit status 2.
 *
 * The message says what was expected, what was found and what to do; the place is kept apart so
 * that every message prints file and line the same way.
 */
export class InputError extends Error {
  override readonly name = 'InputError';
  readonly path: string;
  readonly lineNumber: number | undefined;

  constructor(message: string, place: InputPlace) {
    super(message, place.cause === undefined ? undefined : {cause: place.cause});
    this.path = place.path;
    this.lineNumber = place.lineNumber;
  }
}
