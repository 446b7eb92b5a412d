// How to run the same analysis again: a command where it can be typed safely, and the facts that decide every digit.
import { quoted, shown } from '../result/label-words.js';
import { statedText } from '../result/stated-words.js';
import { countWords } from '../result/number-words.js';
import type { Result } from '../result/result.js';

/**
 * The words of a command, each to stay whole on its line; undefined where there is none to give (a program passed the
 * counts) or where a label cannot be written so that a shell reads it as it stands. Never run by us.
 */
export function againCommand(result: Result): readonly string[] | undefined {
  const table = tableParts(result);
  if (table === undefined) return undefined;
  const operands = table.operands.map(shellWord);
  const options = [...table.options, ...planOptions(result)].map(([name, value]) => optionWords(name, value));
  const words = [...operands, ...options];
  return words.includes(undefined) ? undefined : ['keepsum test', ...(words as string[])];
}

/** The same in a sentence. */
export function againInWords({ input, plan }: Result): string {
  const said = [
    ...(plan.paired ? ['pairs'] : []),
    `statistic ${plan.statistic}`,
    `tail ${plan.tail}`,
    ...(plan.twoSidedRule === null ? [] : [`two-sided rule ${plan.twoSidedRule}`]),
    ...(plan.groups === null ? [] : [`groups ${plan.groups}`]),
    ...(plan.event === null ? [] : [`event ${quoted(plan.event)}`]),
    ...(plan.reference === null ? [] : [`reference ${quoted(plan.reference)}`]),
    ...(plan.rowScores === undefined ? [] : [`row scores ${plan.rowScores.join()}`]),
    ...(plan.columnScores === undefined ? [] : [`column scores ${plan.columnScores.join()}`]),
    ...(plan.rowRanks === undefined ? [] : [`row scores ${plan.rowRanks}`]),
    ...(plan.columnRanks === undefined ? [] : [`column scores ${plan.columnRanks}`]),
    ...(plan.lambda === undefined ? [] : [`lambda ${plan.lambda}`]),
    ...(plan.ordered === undefined ? [] : [`ordered ${plan.ordered}`]),
    ...(plan.bootstrap === undefined ? [] : [`bootstrap ${plan.bootstrap}`]),
    ...(declaredFixed(plan.fixed) === null ? [] : [`fixed ${plan.fixed}`]),
    ...(plan.outcomeOrder === undefined ? [] : [`outcome order ${plan.outcomeOrder}`]),
    ...(plan.nullValue === undefined ? [] : [`null value ${statedText(plan.nullValue)}`]),
    ...(plan.nuisanceRisk === undefined ? [] : [`nuisance risk ${plan.nuisanceRisk}`]),
    `method ${plan.method}`,
    ...(plan.cells?.asked ? ['cells'] : []),
    ...(plan.cells?.seed === undefined ? [] : [`seed ${quoted(plan.cells.seed)}`]),
  ];
  const { rowsFrom, columnsFrom, strataFrom, clusterFrom } = input.source;
  const table =
    input.source.form === 'records'
      ? ` (${[
          `rows ${quoted(rowsFrom ?? '')}`,
          `columns ${quoted(columnsFrom ?? '')}`,
          ...(strataFrom === undefined || strataFrom === null ? [] : [`strata ${quoted(strataFrom)}`]),
          ...(clusterFrom === undefined ? [] : [`clusters ${quoted(clusterFrom)}`]),
        ].join(', ')})`
      : '';
  return `Take the same counts${table} with ${said.join(', ')}.`;
}

/** A flag has no value. */
type Option = readonly [name: string, value: string | null];

interface TableParts {
  readonly operands: readonly string[];
  readonly options: readonly Option[];
}

function tableParts({ input, notes, plan }: Result): TableParts | undefined {
  const { source } = input;
  switch (source.form) {
    case 'library':
      return undefined;
    case 'inline': {
      const labels = input.columnLabels;
      // Pairs: the labels of the rows are those of the columns, and levels without any are numbered.
      const hasNames = !plan.paired && labels.some((label, j) => label !== `column ${j + 1}`);
      const bare = plan.paired && labels.every((label, j) => label === `level ${j + 1}`);
      return {
        operands: input.counts
          .map((row, i) => row.map((n, j) => (input.impossible?.[i]?.[j] ? '-' : n)))
          .map((row, i) => (bare ? row.join(',') : rowOperand(input.rowLabels[i]!, i, row))),
        options: hasNames ? [['column-labels', labels.map(csvLabel).join(',')]] : [],
      };
    }
    case 'cross-table': {
      const dropped: Option[] = (source.totalsLeftOut ?? []).length > 0 ? [['drop-totals', null]] : [];
      const kept: Option[] = notes.some(({ code }) => code === 'totals-kept') ? [['keep-totals', null]] : [];
      return {
        operands: ['FILE'],
        options: [...dropped, ...kept, ...optional('strata', source.strataFrom), ...levelOptions(input)],
      };
    }
    case 'records':
      return {
        operands: ['FILE'],
        options: [
          ['rows', source.rowsFrom ?? ''],
          ['columns', source.columnsFrom ?? ''],
          ...optional('count', source.countFrom),
          ...optional('strata', source.strataFrom),
          ...optional('cluster', source.clusterFrom),
          ...optional('missing', input.missing?.rule === 'fail' ? null : input.missing?.rule),
          ...levelOptions(input),
        ],
      };
  }
}

/** Levels changed after reading; rows typed in are shown as they were after that. */
const levelOptions = ({ levels }: Result['input']): Option[] =>
  (levels?.changes ?? []).map(({ action, side, into, labels }): Option => {
    const names = labels.map(levelLabel);
    const list = action === 'merge' ? `${levelLabel(into ?? '')}=${names.join('+')}` : names.join(',');
    return [action, `${side}:${list}`];
  });

const levelLabel = (label: string): string =>
  /[",+=]|^\s|\s$/.test(label) ? `"${label.replaceAll('"', '""')}"` : label;

/** A row as it is typed; without its label where that is the one given to rows that have none. */
const rowOperand = (label: string, index: number, counts: readonly (number | '-')[]): string =>
  label === `row ${index + 1}` && counts[0] !== '-' ? counts.join(',') : `${label}=${counts.join(',')}`;

const csvLabel = (label: string): string => (/[",]/.test(label) ? `"${label.replaceAll('"', '""')}"` : label);

const optional = (name: string, value: string | number | null | undefined): Option[] =>
  value === null || value === undefined ? [] : [[name, String(value)]];

/** Groups, event and reference: always where the statistic compares groups, else where they are not those taken unasked. */
function roleOptions({ plan, statistic, input }: Result): Option[] {
  const unasked =
    plan.groups === 'rows' && plan.event === input.columnLabels[0] && plan.reference === input.rowLabels[1];
  if (statistic.event === undefined && unasked) return [];
  return [
    ...optional('groups', plan.groups),
    ...optional('event', plan.event),
    ...optional('reference', plan.reference),
  ];
}

/** Strata, clusters and pairs are declared by options of their own. */
const declaredFixed = (fixed: Result['plan']['fixed']): string | null =>
  fixed === 'rows' || fixed === 'columns' || fixed === 'total' ? fixed : null;

const planOptions = (result: Result): Option[] => planOptionsOf(result.plan, roleOptions(result));

const planOptionsOf = (plan: Result['plan'], roles: readonly Option[]): Option[] => [
  ...(plan.paired ? [['paired', null] as const] : []),
  ...optional('statistic', plan.statistic),
  ...optional('tail', plan.tail),
  ...optional('two-sided-rule', plan.twoSidedRule),
  ...roles,
  ...optional('ordered', plan.ordered),
  ...optional('row-scores', plan.rowScores?.join() ?? plan.rowRanks),
  ...optional('column-scores', plan.columnScores?.join() ?? plan.columnRanks),
  ...optional('compare', plan.compare),
  ...optional('control', plan.control),
  ...optional('lambda', plan.lambda),
  ...optional('fixed', declaredFixed(plan.fixed)),
  ...optional('outcome-order', plan.outcomeOrder === 'statistic' ? null : plan.outcomeOrder),
  ...optional('null-value', plan.nullValue === undefined ? null : statedText(plan.nullValue)),
  ...optional('nuisance-risk', plan.nuisanceRisk),
  ...optional('method', plan.method),
  // How far a bracket is refined depends on it.
  ...optional('effort', plan.forecast.engine === 'bracket' && plan.method === 'exact' ? plan.effort : null),
  ...optional('draws', plan.draws),
  ...optional('most-draws', plan.mostDraws),
  ...optional('sampling-risk', plan.samplingRisk),
  ...optional('relative-error', plan.relativeError),
  ...optional('alpha', plan.draws === 'auto' || plan.alpha !== 0.05 ? plan.alpha : null),
  ...optional('bootstrap', plan.bootstrap),
  ...optional('seed', plan.seed),
  ...(plan.cells?.asked ? [['cells', null] as const] : []),
  ...optional('seed', plan.seed === null ? plan.cells?.seed : null),
  ...optional('confidence', plan.confidence === 0.95 ? null : plan.confidence),
  ...optional('sampling-confidence', typeof plan.draws === 'number' ? plan.samplingConfidence : null),
];

/** An option with its value; a value that looks like an option is joined by an equals sign. */
function optionWords(name: string, value: string | null): string | undefined {
  if (value === null) return `--${name}`;
  if (value.startsWith('-')) return shellWord(`--${name}=${value}`);
  const word = shellWord(value);
  return word === undefined ? undefined : `--${name} ${word}`;
}

/** Bare, or in the single quotes that a POSIX shell takes literally; else undefined. */
function shellWord(word: string): string | undefined {
  if (word === '' || (word.startsWith('-') && !word.startsWith('--'))) return undefined;
  if (/^(--)?\w[\w.,:=+/-]*$/.test(word)) return word;
  return shown(word) === word && !/['\u2018-\u201b]/.test(word) ? `'${word}'` : undefined;
}

/** What decides every digit, in sentences. */
export function againSentences({ input, plan, tool }: Result): string[] {
  const draws =
    plan.draws === null || plan.seed === null
      ? []
      : [
          `${plan.draws === 'auto' ? 'Draws until settled' : `${countWords(plan.draws)} draws`}, seed ${quoted(plan.seed)}, generator ${plan.generator ?? 'unnamed'}` +
            `${plan.blockSize === null ? '' : ` in blocks of ${countWords(plan.blockSize)}`}: the same seed gives the same digits on any machine.`,
        ];
  const bytes = input.sha256 === null ? [] : [`The bytes read have the SHA-256 ${input.sha256}.`];
  return [...draws, ...bytes, `${tool.name} ${tool.version}; the json format holds every digit, measure and setting.`];
}
