// How far a long run is, on standard error: only where that is a terminal, only after half a second, and gone before the report.
import type { Surroundings } from '../../sampled-answer.js';
import { countWords } from '../../result/number-words.js';
import type { Shell } from '../shell.js';
import { settleForShortWork } from '../short-work.js';

const quietMilliseconds = 500;
const betweenMilliseconds = 100;
const eraseLine = '\r\u001b[K';

export interface ProgressWishes {
  readonly threads?: number;
  readonly noProgress?: true;
  readonly quiet?: true;
}

export interface ProgressLine {
  /** @param words what to show after so many seconds; asked only when it is time to show something. */
  show(words: (seconds: number) => string): void;
  erase(): void;
}

/** Undefined where nothing should be shown. */
export function progressLine({ noProgress, quiet }: ProgressWishes, shell: Shell): ProgressLine | undefined {
  if (noProgress || quiet || !shell.stderrIsTerminal || shell.environment.TERM === 'dumb') return undefined;
  const begin = performance.now();
  let lastShown = begin + quietMilliseconds - betweenMilliseconds;
  let shown = false;
  return {
    show(words) {
      const now = performance.now();
      if (now - lastShown < betweenMilliseconds) return;
      lastShown = now;
      shown = true;
      shell.stderr.write(`${eraseLine}${words((now - begin) / 1000)}`);
    },
    erase() {
      if (shown) shell.stderr.write(eraseLine);
      shown = false;
    },
  };
}

/** Runs `work` with surroundings that show how far it is. */
export async function withProgress<T>(
  wishes: ProgressWishes,
  shell: Shell,
  work: (surroundings: Surroundings) => Promise<T>,
): Promise<T> {
  const used = {
    ...(wishes.threads === undefined ? {} : { threads: wishes.threads }),
    beforeExact: settleForShortWork,
  };
  const line = progressLine(wishes, shell);
  if (line === undefined) return work(used);
  const onProgress = (draws: number, most: number): void =>
    line.show((seconds) => {
      const left = Math.ceil((most - draws) / (draws / seconds));
      return `drawn: ${countWords(draws)} of at most ${countWords(most)} tables, at most ${left} s left`;
    });
  /** Shown although nothing else can run in the middle of exact work: terminals take bytes without a queue. */
  const onWork = (units: number, foreseen: number): void =>
    line.show((seconds) => {
      const share = Math.floor((100 * units) / foreseen);
      const left = Math.ceil(((foreseen - units) * seconds) / units);
      return share < 100
        ? `exact work: ${share}% of what was foreseen, about ${left} s left`
        : `exact work: past what was foreseen, ${share}% of it`;
    });
  try {
    return await work({ ...used, onProgress, onWork });
  } finally {
    line.erase();
  }
}

/** Words for many tables: how many, how fast, and how long the rest will take where the share done is known. */
export function batchWords(tables: number, share: number | undefined, seconds: number): string {
  const rate = `${countWords(tables)} tables, ${countWords(Math.round(tables / seconds))} a second`;
  if (share === undefined || share <= 0) return rate;
  return `${rate}, about ${countWords(Math.ceil((seconds * (1 - share)) / share))} s left`;
}
