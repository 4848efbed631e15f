const WIDTH = 30;
const REDRAW_MS = 100;

/** A progress bar on stderr, only where that is a terminal. `update` takes a fraction of 0..1. */
export function progressBar(label: string, stream: NodeJS.WriteStream = process.stderr) {
  let last = 0;
  let shown = false;
  return {
    update(fraction: number): void {
      const now = Date.now();
      if (!stream.isTTY || now - last < REDRAW_MS) return;
      last = now;
      shown = true;
      const part = Math.max(0, Math.min(1, fraction));
      const full = Math.round(part * WIDTH);
      stream.write(
        `\r${label} [${'='.repeat(full)}${' '.repeat(WIDTH - full)}] ${String(Math.floor(part * 100)).padStart(3)} %`,
      );
    },
    /** Takes the bar away again, so that results stand alone. */
    end(): void {
      if (shown) stream.write(`\r${' '.repeat(label.length + WIDTH + 10)}\r`);
    },
  };
}
