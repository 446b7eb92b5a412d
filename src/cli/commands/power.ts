// keepsum power: for a study that is still planned. Groups as they are assumed to be, sizes or a power to reach.
import { noteFor } from '../streams/write-out.js';
import { usageProblem } from '../../problem/problem.js';
import { statisticNamed, statisticNames } from '../../statistic/registry.js';
import { powerOrders, twoGroupTests } from '../../power/design.js';
import { powerFormats } from '../../report/power.js';
import {
  anyText,
  betweenZeroAndOne,
  oneOf,
  wholeNumber,
  withNames,
  type CheckValue,
} from '../arguments/check-value.js';
import { repeatable, valued } from '../arguments/option.js';
import { plotWish } from '../plots/plot-wish.js';
import { command } from './command-file.js';
import { checkDocument, citationsIn } from './document.js';
import { documents } from './options/documents.js';
import { lookFor } from './look.js';
import { either } from './options/words.js';
import { reporting } from './options/reporting.js';
import { destinationFor, sharedOptions } from './shared-options.js';

/** "40,40", or several for a curve: "20,20 40,40 60,60" or "20..60:10" (one number stands for every group). */
const sizeLists: CheckValue<number[][]> = (text, flag) =>
  text
    .trim()
    .split(/\s+/)
    .flatMap(
      (part) => rangeOf(part, flag) ?? [part.split(',').map((one) => wholeNumber(1, 1e9, '40,40')(one.trim(), flag))],
    );

function rangeOf(part: string, flag: string): number[][] | undefined {
  const match = /^(\d+)\.\.(\d+)(?::(\d+))?$/.exec(part);
  if (match === null) return undefined;
  const [from, to, step] = [Number(match[1]), Number(match[2]), Number(match[3] ?? 1)];
  if (!(from >= 1 && to >= from && step >= 1 && (to - from) / step <= 1000)) {
    throw usageProblem({
      code: 'bad-range',
      message: `"${part}" is not a range of sizes`,
      place: flag,
      hint: `for example ${flag} 20..60:10`,
    });
  }
  return Array.from({ length: Math.floor((to - from) / step) + 1 }, (_, k) => [from + k * step]);
}

const positiveNumber: CheckValue<number> = (text, flag) => {
  const value = /^(\d+\.?\d*|\.\d+)$/.test(text) ? Number(text) : NaN;
  if (value > 0 && value <= 1000) return value;
  throw usageProblem({
    code: 'bad-number',
    message: `"${text}" is not a number from 0 to 1000`,
    place: flag,
    hint: `write ${flag} 1`,
  });
};

const planning = {
  sizes: valued('The test', 'SIZES', sizeLists, 'units in each group: 40,40; several, or 20..60:10, make a curve'),
  total: valued('The test', 'SIZES', sizeLists, 'units in all, where the study fixes no group sizes (simulated)'),
  power: valued('The test', 'POWER', betweenZeroAndOne('0.8'), 'find the smallest groups that reach it'),
  ratio: valued('The test', 'N', positiveNumber, 'second group over first, for --power (1)'),
  largest: valued('The test', 'N', wholeNumber(1, 2000, '500'), 'largest first group that --power looks at (500)'),
  test: valued(
    'The test',
    'NAME',
    oneOf(twoGroupTests),
    `for two groups and one event: ${either(twoGroupTests)} (conditional)`,
  ),
  order: valued('The test', 'NAME', oneOf(powerOrders), `of the unconditional test: ${either(powerOrders)} (score)`),
  tail: valued('The test', 'TAIL', oneOf(['upper', 'lower', 'both'] as const), 'upper, lower, both (both)'),
  twoSidedRule: valued(
    'The test',
    'RULE',
    oneOf(['distance', 'probability', 'doubled'] as const),
    'for both tails: distance, probability, doubled',
  ),
  alpha: valued('The test', 'LEVEL', betweenZeroAndOne('0.05'), 'the test rejects at p <= LEVEL (0.05)'),
  statistic: valued(
    'The test',
    'NAME',
    withNames(statisticNames, (text) => statisticNamed(text).name),
    `simulated: ${either(statisticNames)} (pearson)`,
  ),
  method: valued(
    'How p is found',
    'NAME',
    oneOf(['auto', 'exact', 'sample', 'asymptotic'] as const),
    'simulated: how the p of each table is found (auto)',
  ),
  number: valued('How p is found', 'N', wholeNumber(1, 1e7, '1000'), 'simulated: tables to draw (1000)', 'n'),
  draws: valued('How p is found', 'N', wholeNumber(1, 1e9, '1000'), 'simulated: draws for a p that is sampled (1000)'),
  effort: valued(
    'How p is found',
    'UNITS',
    wholeNumber(1, Infinity, '300000'),
    'simulated: most exact work for one table (3e5)',
  ),
  seed: valued('How p is found', 'TEXT', anyText, 'makes a simulation repeatable (one is made and shown)'),
  format: valued('The report', 'NAME', oneOf(powerFormats), `${either(powerFormats)} (text)`),
};

export const powerCommand = command({
  name: 'power',
  usage: [
    { line: 'keepsum power P P --sizes N,N', words: 'two groups, the probability of the event in each' },
    { line: 'keepsum power P P --power 0.8', words: 'the smallest groups that reach it' },
    { line: 'keepsum power P,P,... P,P,... --sizes N,N', words: 'more outcomes or groups: simulated' },
  ],
  purpose: 'Tells how likely a planned study is to find the difference that is assumed.',
  examples: [
    { line: 'keepsum power treated=0.7 control=0.4 --sizes 40,40', words: 'exact power' },
    {
      line: 'keepsum power 0.7 0.4 --power 0.8 --test unconditional --order conditional-p',
      words: 'the smallest groups',
    },
    { line: 'keepsum power a=0.2,0.3,0.5 b=0.4,0.3,0.3 --sizes 30..60:10 --seed plan', words: 'a simulated curve' },
  ],
  options: {
    ...planning,
    plot: repeatable(
      'The report',
      'FILE',
      plotWish(['curve'] as const),
      'the power over the sizes asked for, drawn into FILE.svg or FILE.png',
    ),
    citations: documents.citations,
    width: reporting.width,
    color: reporting.color,
    noColor: reporting.noColor,
    noProgress: reporting.noProgress,
    quiet: reporting.quiet,
    ...sharedOptions,
  },
  async run(operands, values, shell) {
    checkDocument(values);
    const destination = await destinationFor(values.output, shell);
    const { readGroups } = await import('../../power/read-groups.js');
    const { planPower } = await import('../../plan-power.js');
    const { renderPower } = await import('../../report/power.js');
    const { withSteps } = await import('../streams/steps.js');
    const draw =
      values.plot === undefined
        ? undefined
        : await (
            await import('../plots/plot-files.js')
          ).plotFiles(values.plot, null, values.output, noteFor(values, shell));
    const { sizes, total, number, format, ...rest } = values;
    const groups = readGroups(operands, total !== undefined);
    const wishes = {
      ...picked(rest),
      groups,
      ...(sizes === undefined ? {} : { sizes }),
      ...(total === undefined ? {} : { totals: total.map(([units]) => units!) }),
      ...(number === undefined ? {} : { tables: number }),
    };
    const result = await withSteps(values, shell, (onProgress) => planPower(wishes, onProgress));
    await destination.write(
      (await citationsIn([result], values)) ??
        (format === 'html'
          ? (await import('../../report/html/power.js')).powerHtml(result)
          : renderPower(result, format ?? 'text', await lookFor(values, shell))),
    );
    if (draw === undefined) return 0;
    const { drawPowerCurve, lackOfCurve } = await import('../../report/pictures/power-curve.js');
    await draw(() => {
      const lack = lackOfCurve(result);
      if (lack === undefined) return drawPowerCurve(result);
      throw usageProblem({
        code: 'no-picture',
        message: `there is no curve of this result: ${lack}`,
        place: '--plot',
        hint: 'give several sizes, such as --sizes 20..60:10',
      });
    });
    return 0;
  },
});

/** Only what the plan knows. */
function picked<V extends object>(values: V): Pick<V, Extract<keyof V, keyof typeof planning>> {
  return Object.fromEntries(Object.entries(values).filter(([name]) => name in planning)) as Pick<
    V,
    Extract<keyof V, keyof typeof planning>
  >;
}
