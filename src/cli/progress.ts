/** Progress for people: one moving line on a terminal, plain lines at the start, about every half minute and at the end elsewhere. */
import { count, durationText, shareText } from './figure-text.ts';
import { movingAllowed, say, terminalWidth } from './terminal.ts';

/** How far a run is. */
export interface Standing {
  readonly done: number;
  readonly total: number;
  /** Designs that met every requirement, among those done. */
  readonly feasible: number;
  /** Designs on the front so far. */
  readonly front: number;
}

/** Something that shows progress until it is told to stop. */
export interface Progress {
  update(standing: Standing): void;
  /** Takes the moving line away and says how it ended. */
  end(): void;
  /** Takes the moving line away, so that a message starts on a line of its own. */
  abandon(): void;
}

const movingEveryMs = 100;
const plainEveryMs = 30_000;

/** One line for files and pipes: `12 000 of 62 400 designs, 8300/s, 6 s left, 31 % feasible, 48 on the front`. */
export function progressText(standing: Standing, elapsedMs: number): string {
  return [`${count(standing.done)} of ${count(standing.total)} designs`, ...pace(standing, elapsedMs), ...yieldSoFar(standing)].join(', ');
}

/** The moving line: a bar, and the rest as short as it fits 80 columns; cut to the width of the terminal. */
export function progressLine(standing: Standing, elapsedMs: number, width: number): string {
  const share = standing.total > 0 ? Math.min(1, standing.done / standing.total) : 1;
  const filled = Math.round(share * barWidth);
  const bar = '█'.repeat(filled) + '░'.repeat(barWidth - filled);
  const words = [...pace(standing, elapsedMs), ...yieldSoFar(standing)].join(', ');
  return `${bar} ${String(Math.floor(share * 100)).padStart(3)} %  ${words}`.slice(0, width - 1);
}

const barWidth = 10;
const clearLine = '\u001b[K';

/** Rate and time left; the whole time at the end. */
function pace({ done, total }: Standing, elapsedMs: number): string[] {
  if (done === 0 || elapsedMs <= 0) return [];
  const perS = (done * 1000) / elapsedMs;
  return [`${rateText(perS)}/s`, done < total ? `${durationText((total - done) / perS)} left` : `${durationText(elapsedMs / 1000)} in all`];
}

function yieldSoFar({ done, feasible, front }: Standing): string[] {
  return done === 0 ? [] : [`${shareText(feasible / done)} feasible`, `${count(front)} on the front`];
}

/** Shows progress as the terminal allows. Starts counting time now. */
export function startProgress(total: number, now: () => number = Date.now): Progress {
  const moving = movingAllowed();
  const began = now();
  let last: Standing = { done: 0, total, feasible: 0, front: 0 };
  let shown = began;
  draw();

  function draw(): void {
    const elapsed = now() - began;
    if (moving) process.stderr.write(`\r${progressLine(last, elapsed, terminalWidth())}${clearLine}`);
    else say(progressText(last, elapsed));
  }

  function abandon(): void {
    if (moving) process.stderr.write(`\r${clearLine}`);
  }

  return {
    abandon,
    update(standing) {
      last = standing;
      if (now() - shown < (moving ? movingEveryMs : plainEveryMs)) return;
      shown = now();
      draw();
    },
    end() {
      abandon();
      say(progressText(last, now() - began));
    },
  };
}

function rateText(perS: number): string {
  return count(perS >= 1000 ? Math.round(perS / 100) * 100 : Math.round(perS));
}
