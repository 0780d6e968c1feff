/** Shows how far a long reading has come, on a terminal only, and leaves nothing behind. */
export interface Progress {
  start(name: string, bytes: number | undefined): void;
  at(bytes: number): void;
  done(): void;
}

const SILENT: Progress = {
  start: () => undefined,
  at: () => undefined,
  done: () => undefined,
};

/** Nothing is shown before this long: short readings need no word. */
const PATIENCE_MS = 700;
const REFRESH_MS = 120;

/** A progress line on the stream; silent when it is no terminal or the user wants quiet. */
export function progressOn(
  stream: {readonly isTTY?: boolean; write(text: string): unknown},
  quiet: boolean,
  nowMs: () => number,
): Progress {
  if (stream.isTTY !== true || quiet) return SILENT;
  let name = '';
  let total: number | undefined;
  let startedMs = 0;
  let shownMs = 0;
  let shown = false;
  const clear = () => {
    if (shown) stream.write('\r\u001b[K');
    shown = false;
  };
  return {
    start(file, bytes) {
      clear();
      name = file;
      total = bytes;
      startedMs = nowMs();
      shownMs = startedMs;
    },
    at(bytes) {
      const now = nowMs();
      if (now - startedMs < PATIENCE_MS || now - shownMs < REFRESH_MS) return;
      shownMs = now;
      shown = true;
      stream.write(`\r\u001b[K${progressLine(name, bytes, total, (now - startedMs) / 1000)}`);
    },
    done: clear,
  };
}

function progressLine(
  name: string,
  bytes: number,
  total: number | undefined,
  elapsedS: number,
): string {
  const rate = bytes / elapsedS;
  const speed = `${(rate / 1e6).toFixed(0)} MB/s`;
  if (total === undefined || total < bytes)
    return `${name}: ${(bytes / 1e6).toFixed(0)} MB, ${speed}`;
  const left = Math.max(0, (total - bytes) / rate).toFixed(0);
  return `${name}: ${Math.floor((100 * bytes) / total)} %, ${speed}, ${left} s left`;
}
