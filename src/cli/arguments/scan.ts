// First look at the words of a command: which are options, which are their values, which are operands.
// It settles what a general parser gets wrong here: `-8,2` is a row with a negative count and not an option,
// and `--seed --quiet` is a seed that was forgotten. What it hands on is unambiguous.
import { usageProblem, type Problem } from '../../problem/problem.js';
import { shownValue } from '../../input/shown-value.js';
import { nearest } from '../../problem/suggest.js';
import { flagOf, type Declarations } from './option.js';

export interface ScannedWords {
  /** `--flag` or `--flag=value`, as declared, in the order given. */
  readonly options: readonly string[];
  readonly operands: readonly string[];
}

/** @throws Problem (usage): `unknown-option`, `missing-value`, `needless-value`, `given-twice`, `contradiction`. */
export function scan(words: readonly string[], declarations: Declarations): ScannedWords {
  const known = knownFlags(declarations);
  const options: string[] = [];
  const operands: string[] = [];
  for (let at = 0; at < words.length; at++) {
    const word = words[at]!;
    if (word === '--') {
      operands.push(...words.slice(at + 1));
      break;
    }
    if (!looksLikeOption(word)) {
      operands.push(word);
      continue;
    }
    const { typed, joined } = splitOption(word);
    const flag = known.get(typed);
    if (flag === undefined) throw unknownOption(typed, [...known.keys()]);
    if (flag.placeholder === undefined) {
      if (joined !== undefined) throw needlessValue(flag.name);
      options.push(flag.name);
    } else {
      const value = joined ?? words[++at];
      if (value === undefined || (joined === undefined && value.startsWith('--'))) {
        throw missingValue(flag.name, flag.placeholder, value);
      }
      options.push(`${flag.name}=${value}`);
    }
  }
  refuseTwoAnswers(options, known);
  return { options, operands };
}

/** `-` is standard input, `-8,2` and `-,2` are rows; everything else with a hyphen in front is an option. */
const looksLikeOption = (word: string): boolean => /^-[^\d.,]/.test(word);

/** `--draws=5` -> --draws and 5. A letter is never joined to its value: `-output` is a slip for --output, not -o utput. */
function splitOption(word: string): { typed: string; joined: string | undefined } {
  const equals = word.startsWith('--') ? word.indexOf('=') : -1;
  return equals < 0
    ? { typed: word, joined: undefined }
    : { typed: word.slice(0, equals), joined: word.slice(equals + 1) };
}

interface KnownFlag {
  readonly name: string;
  readonly placeholder: string | undefined;
  readonly gathers: boolean;
}

/** Which of two answers to take would be a guess: an option with two values, and a switch beside its opposite. */
function refuseTwoAnswers(options: readonly string[], known: ReadonlyMap<string, KnownFlag>): void {
  const given = new Map<string, string>();
  for (const option of options) {
    const equals = option.indexOf('=');
    const name = equals < 0 ? option : option.slice(0, equals);
    const value = equals < 0 ? '' : option.slice(equals + 1);
    const before = given.get(name);
    if (before !== undefined && before !== value && !known.get(name)!.gathers) throw givenTwice(name, before, value);
    given.set(name, value);
  }
  for (const name of given.keys()) {
    const opposite = name.replace(/^--/, '--no-');
    if (given.has(opposite)) throw contradiction(name, opposite);
  }
}

function knownFlags(declarations: Declarations): Map<string, KnownFlag> {
  const known = new Map<string, KnownFlag>();
  for (const [name, { short, placeholder, gathers }] of Object.entries(declarations)) {
    const flag = { name: flagOf(name), placeholder, gathers: gathers === true };
    known.set(flag.name, flag);
    if (short !== undefined) known.set(`-${short}`, flag);
  }
  return known;
}

function unknownOption(typed: string, flags: readonly string[]): Problem {
  const close = nearest(
    typed,
    flags.filter((flag) => flag.startsWith('--')),
  );
  return usageProblem({
    code: 'unknown-option',
    message: `there is no option ${typed}`,
    hint: close === undefined ? 'keepsum COMMAND --help lists the options' : `did you mean ${close}?`,
  });
}

const givenTwice = (flag: string, first: string, second: string): Problem =>
  usageProblem({
    code: 'given-twice',
    message: `${flag} is given twice, as ${shownValue(first)} and as ${shownValue(second)}`,
    hint: 'give it once',
  });

const contradiction = (flag: string, opposite: string): Problem =>
  usageProblem({
    code: 'contradiction',
    message: `${flag} and ${opposite} contradict each other`,
    hint: 'give one of them',
  });

const needlessValue = (flag: string): Problem =>
  usageProblem({
    code: 'needless-value',
    message: `${flag} takes no value`,
    hint: `write ${flag} alone, or leave it out`,
  });

function missingValue(flag: string, placeholder: string, next: string | undefined): Problem {
  return usageProblem({
    code: 'missing-value',
    message:
      next === undefined ? `${flag} comes last, without its value` : `${flag} has no value: ${next} follows at once`,
    hint:
      next === undefined
        ? `write ${flag} ${placeholder}`
        : `write ${flag} ${placeholder}; a value that itself begins with -- is joined to it: ${flag}=${next}`,
  });
}
