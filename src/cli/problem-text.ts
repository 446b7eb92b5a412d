// What a person reads when a run cannot finish: what is wrong and where, then what to type. Two lines, always.
import { Problem } from '../problem/problem.js';
import { shown } from '../result/label-words.js';

export interface Ending {
  readonly text: string;
  readonly status: number;
}

/**
 * Text for standard error and the exit status. Only an error we did not foresee can show its stack, and only when asked.
 * Labels and paths come from outside: nothing in them may steer a terminal or break a line.
 */
export function endingOf(thrown: unknown, debug: boolean): Ending {
  if (thrown instanceof Problem) {
    const place = thrown.place === undefined || namedAlready(thrown) ? '' : `${thrown.place}: `;
    return {
      text: `error: ${shown(place + thrown.message)}\nhint: ${shown(thrown.hint)}\n`,
      status: thrown.exitStatus,
    };
  }
  const error = thrown instanceof Error ? thrown : new Error(String(thrown));
  const stack = debug ? `${error.stack ?? ''}\n` : '';
  return {
    text:
      `error: ${shown(`something went wrong inside keepsum (${error.message})`)}\n` +
      `hint: please report it with the command that you typed${debug ? '' : '; --debug shows where it happened'}\n${stack}`,
    status: 1,
  };
}

/** `--draws: --draws has no effect` would say it twice. */
const namedAlready = ({ place, message }: Problem): boolean =>
  place !== undefined && place.startsWith('--') && message.includes(place);
