// Remarks on strata: those that say nothing, those that disagree, and a pooled table that would tell another story.
import { homogeneityStatistics } from '../statistic/stratified.js';
import type { Plan } from '../plan/plan.js';
import type { PValueEntry } from '../pvalue/contract.js';
import { quoted } from './label-words.js';
import { digits, probabilityWords, statisticValueWords } from './number-words.js';
import type { Note, Result } from './result.js';

type Strata = NonNullable<Result['strata']>;

/** A pooled odds ratio further from the stratified one than this factor: the change that calls for adjustment (Mickey & Greenland 1989). */
const noticeable = 1.1;

/**
 * @param asymptotic the approximation over strata, to compare with that of the pooled table
 * @param value the statistic over strata
 */
export function strataNotes(
  plan: Plan,
  strata: Strata,
  asymptotic: PValueEntry,
  value: number,
  homogeneity: readonly PValueEntry[],
): Note[] {
  return [
    ...silentNotes(strata),
    ...pooledNotes(plan, strata, asymptotic, value),
    ...homogeneityNotes(plan, homogeneity),
    ...zelenNotes(strata, homogeneity),
  ];
}

function silentNotes({ labels, decides }: Strata): Note[] {
  const silent = labels.filter((_, s) => !decides[s]);
  if (silent.length === 0 || silent.length === labels.length) return [];
  const names = silent.slice(0, 5).map(quoted).join(', ') + (silent.length > 5 ? ` and ${silent.length - 5} more` : '');
  const one = silent.length === 1;
  return [
    {
      code: 'silent-strata',
      text: `${one ? 'One stratum has' : `${silent.length} strata have`} one row or one column only, which leaves chance nothing to decide: ${names}. ${one ? 'It changes' : 'They change'} no p.`,
    },
  ];
}

/** Simpson (1951): what holds within every stratum may be gone, or turned round, when they are thrown together. */
function pooledNotes(plan: Plan, strata: Strata, asymptotic: PValueEntry, value: number): Note[] {
  const [pooled, common] = [sizeOf(strata.pooledOddsRatio), sizeOf(strata.commonOddsRatio)];
  if (pooled !== undefined && common !== undefined) {
    const words = `${ratioWords(strata.pooledOddsRatio)} in the pooled table and ${ratioWords(strata.commonOddsRatio)} over strata (Mantel-Haenszel)`;
    if (pooled * common < 0) {
      return [
        {
          code: 'pooled-differs-in-sign',
          text: `The odds ratio is ${words}: throwing the strata together turns the association round (Simpson 1951). Report the stratified answer.`,
        },
      ];
    }
    if (Math.abs(pooled - common) > Math.log(noticeable)) {
      return [
        {
          code: 'pooled-differs-in-size',
          text: `The odds ratio is ${words}, apart by more than a tenth: the strata confound it (Simpson 1951; Mickey & Greenland 1989). Report the stratified answer.`,
        },
      ];
    }
  }
  if (plan.statistic === 'score-correlation' && strata.pooled.value * value < 0) {
    return [
      {
        code: 'pooled-differs-in-sign',
        text: `Over strata the correlation goes one way (signed root ${digits(value, 3)}), in the pooled table the other (${digits(strata.pooled.value, 3)}): throwing the strata together turns it round (Simpson 1951). Report the stratified answer.`,
      },
    ];
  }
  const [theirs, ours] = [strata.pooled.p, asymptotic.p];
  if (theirs === null || ours === null || asymptotic.method !== 'asymptotic') return [];
  if (theirs <= plan.alpha === ours <= plan.alpha) return [];
  return [
    {
      code: 'pooled-differs-in-size',
      text: `The pooled table would have given an asymptotic p of ${probabilityWords(theirs)}, the strata give ${probabilityWords(ours)}: they lie on different sides of ${plan.alpha} (Simpson 1951). Report the stratified answer.`,
    },
  ];
}

/** ln of an odds ratio; undefined where it has no value. */
function sizeOf(ratio: Strata['pooledOddsRatio']): number | undefined {
  if (ratio === undefined || ratio === null) return undefined;
  return ratio === 'infinity' ? Infinity : ratio === '-infinity' ? -Infinity : Math.log(ratio);
}

const ratioWords = (ratio: Strata['pooledOddsRatio']): string => statisticValueWords(ratio ?? 0);

function homogeneityNotes(plan: Plan, homogeneity: readonly PValueEntry[]): Note[] {
  const against = homogeneity.filter(
    ({ p, statistic }) => statistic !== 'breslow-day' && p !== null && p <= plan.alpha,
  );
  if (against.length === 0) return [];
  const names = against.map(
    ({ statistic, p }) =>
      `${statistic === 'zelen' ? 'Zelen (exact)' : "Breslow-Day with Tarone's correction"} p ${probabilityWords(p!)}`,
  );
  return [
    {
      code: 'strata-differ',
      text: `The strata do not share one odds ratio (${names.join(', ')}): a common one averages different associations. Look at each stratum.`,
    },
  ];
}

function zelenNotes({ decides }: Strata, homogeneity: readonly PValueEntry[]): Note[] {
  const several = decides.filter(Boolean).length > 1;
  const isAsked = homogeneity.some(({ statistic }) => homogeneityStatistics.includes(statistic));
  if (!several || !isAsked || homogeneity.some(({ statistic }) => statistic === 'zelen')) return [];
  return [
    {
      code: 'zelen-out-of-reach',
      text: "Zelen's exact test of homogeneity would take too long for these strata and is left out; the Breslow-Day p rests on an approximation.",
    },
  ];
}
