// Which measures of effect people are shown, with which of their intervals, and how these are called and cited. Every
// measure and every interval is in the json format.
import type { ResultBeforeWords } from './describe.js';
import type { Effect, EffectInterval } from './result.js';

export interface ShownEffect {
  readonly effect: Effect;
  readonly words: string;
  /** Author and year of the measure, where it has any. */
  readonly source?: string;
  readonly interval?: EffectInterval;
  /** The interval's method in two or three words, and as "by ... (author year)". */
  readonly method?: string;
  readonly methodSource?: string;
}

interface Wording {
  readonly words: string;
  readonly source?: string;
  /** The interval shown; where there is none of that method, none. */
  readonly method?: string;
}

const measures: Readonly<Record<string, Wording>> = {
  'risk-difference': { words: 'risk difference', method: 'newcombe' },
  'risk-ratio': { words: 'risk ratio', method: 'koopman' },
  'conditional-odds-ratio': {
    words: 'odds ratio given the margins',
    source: 'conditional maximum likelihood',
    method: 'central',
  },
  'cramer-v-corrected': { words: "Cramer's V without bias", source: 'Bergsma 2013', method: 'bootstrap' },
  'goodman-kruskal-tau': { words: 'tau', source: 'Goodman & Kruskal 1954', method: 'delta' },
};

const methods: Readonly<Record<string, readonly [short: string, cited: string]>> = {
  newcombe: ['Newcombe', 'from Wilson limits (Newcombe 1998, method 10)'],
  koopman: ['score', 'from the score test (Koopman 1984)'],
  'chan-zhang': ['exact, unconditional', 'that is exact for two groups of fixed size (Chan & Zhang 1999)'],
  central: ['exact, central', 'that is exact and central (Cornfield 1956)'],
  probability: ['exact, probability', 'that inverts the exact test by probability (Baptista & Pike 1977)'],
  blaker: ['exact, blaker', 'that inverts the exact test by the smaller tail (Blaker 2000)'],
  bootstrap: ['bootstrap', 'by the percentile bootstrap (Efron 1979)'],
  delta: ['delta method', 'by the delta method (Goodman & Kruskal 1972)'],
};

/** In the order of the result. */
export function shownEffects(result: ResultBeforeWords): ShownEffect[] {
  return (result.effects ?? []).flatMap((effect) => {
    const wording = measures[effect.name];
    if (wording === undefined || effect.predicts === 'either') return [];
    const method = effect.name === 'conditional-odds-ratio' ? pairedMethod(result) : wording.method;
    const interval = effect.intervals.find((one) => one.method === method);
    const named = interval === undefined ? undefined : methods[interval.method];
    return [
      {
        effect,
        words: `${wording.words}${foretold(effect)}`,
        ...(wording.source === undefined ? {} : { source: wording.source }),
        ...(interval === undefined ? {} : { interval }),
        ...(named === undefined ? {} : { method: named[0], methodSource: named[1] }),
      },
    ];
  });
}

const foretold = ({ predicts }: Effect): string =>
  predicts === undefined ? '' : predicts === 'rows' ? ', rows from columns' : ', columns from rows';

/** The exact interval that inverts the p asked for (Fay 2010), else the central one. */
export function pairedMethod({ pValues, effects }: ResultBeforeWords): string {
  const headline = pValues[0]!;
  const rule = headline.rule ?? (headline.statistic === 'probability' ? 'probability' : undefined);
  const exact = effects?.find(({ name }) => name === 'conditional-odds-ratio')?.intervals;
  return exact?.find(({ invertsP }) => invertsP !== undefined && invertsP === rule)?.method ?? 'central';
}
