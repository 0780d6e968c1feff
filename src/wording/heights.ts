interface Origin {
  readonly from: 'geoid grid' | 'command line' | 'field sheet' | 'receiver';
  readonly model: string | null;
}

/** What a height above the geoid counts from, in words. */
export function geoidName({from, model}: Origin): string {
  if (from === 'receiver') return "the receiver's own geoid";
  return model === null ? 'the geoid' : `the geoid of ${model}`;
}
