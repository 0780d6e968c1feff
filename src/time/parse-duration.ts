const SECONDS_PER: Readonly<Record<string, number>> = {s: 1, min: 60, h: 3600, d: 86_400};

/** Seconds of a time with its unit, such as 90s, 5min, 1.5h or 2d; undefined for anything else. */
export function parseDurationS(text: string): number | undefined {
  const parts = /^(\d+(?:\.\d+)?)\s*(s|min|h|d)$/.exec(text.trim());
  return parts === null
    ? undefined
    : Number(parts[1]) * (SECONDS_PER[parts[2] ?? ''] ?? Number.NaN);
}
