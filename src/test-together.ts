// The spine of several outcomes tested together: counts by group and outcome profile in, adjusted p-values out.
import { tableEffects } from './effect/larger/table-effects.js';
import { jointCounts, type JointOutcomeAnswer } from './family/joint.js';
import type { TogetherResult } from './result/together-declaration.js';
import type { JointCounts } from './input/joint-counts.js';
import type { JointRead } from './input/joint-records.js';
import { blockSize } from './null/sampled/limits.js';
import { refuseEmptySeed } from './plan/footing.js';
import { freshSeed } from './plan/fresh-seed.js';
import { share, wholeNumber } from './plan/settings.js';
import { dataProblem } from './problem/problem.js';
import { clopperPearson } from './pvalue/clopper-pearson.js';
import { generatorName } from './random/stream.js';
import { quoted } from './result/label-words.js';
import { togetherMethods, togetherSentence } from './result/together-words.js';
import { version } from './result/version.js';
import { liveTable } from './table/live-table.js';
import { makeTable } from './table/table.js';

export interface TogetherOptions {
  /** Default 10,000. */
  readonly draws?: number;
  readonly seed?: string;
  /** Of the intervals of sampled p-values. Default 0.99. */
  readonly samplingConfidence?: number;
}

const standardDraws = 10_000;

/**
 * Tests every outcome against the groups by Pearson's statistic and adjusts over all of them by dealing the groups to the subjects
 * anew, outcomes and all (Westfall & Young 1993). Memory: the distinct tables of each outcome among the draws.
 * @throws Problem: `one-group` (data), usage for options out of range.
 */
export async function testTogether(
  read: JointRead,
  options: TogetherOptions = {},
  onProgress?: (done: number, most: number) => void,
): Promise<TogetherResult> {
  const { joint } = read;
  refuseOneGroup(joint);
  refuseEmptySeed(options);
  const draws = wholeNumber(options.draws ?? standardDraws, 1, 1e9, '--draws');
  const samplingConfidence = share(options.samplingConfidence, 0.99, '--sampling-confidence');
  const seed = options.seed ?? freshSeed();
  const found = jointCounts(joint, seed, draws, onProgress);
  const outcomes = await Promise.all(
    found.outcomes.map(async (outcome, k) => ({
      label: outcome.label,
      levels: [...joint.outcomes[k]!.levels],
      counts: outcome.counts,
      statistic: outcome.value,
      ...effectOf(outcome.counts),
      ...(await drawn(outcome, draws, samplingConfidence)),
    })),
  );
  const before = {
    schema: 'keepsum/together/1' as const,
    tool: { name: 'keepsum' as const, version },
    input: {
      sha256: read.sha256,
      groups: [...joint.groups],
      total: joint.counts.flat().reduce((a, b) => a + b, 0),
      missing: { rule: read.rule, records: read.records, dropped: read.dropped },
    },
    plan: { statistic: 'pearson' as const, draws, seed, generator: generatorName, blockSize, samplingConfidence },
    outcomes,
    notes: notesOf(joint),
  };
  return { ...before, sentence: togetherSentence(before), methods: togetherMethods(before) };
}

/** Tau of the outcome from the group. */
function effectOf(counts: number[][]): Pick<TogetherResult['outcomes'][number], 'effect'> {
  const found = tableEffects(liveTable(makeTable({ counts })), { confidence: 0.95 }, null).find(
    ({ name, predicts }) => name === 'goodman-kruskal-tau' && predicts === 'columns',
  );
  return found === undefined ? {} : { effect: { ...found, intervals: [...found.intervals] } };
}

type DrawnP = TogetherResult['outcomes'][number]['alone'];

async function drawn(
  { atLeast, atLeastByLargest, atLeastBySmallest }: JointOutcomeAnswer,
  draws: number,
  confidence: number,
): Promise<{ alone: DrawnP; maxT: DrawnP; minP: DrawnP }> {
  const entry = async (hits: number): Promise<DrawnP> => ({
    p: (hits + 1) / (draws + 1),
    atLeast: hits,
    estimate: hits / draws,
    interval: await clopperPearson(hits, draws, confidence),
  });
  return { alone: await entry(atLeast), maxT: await entry(atLeastByLargest), minP: await entry(atLeastBySmallest) };
}

function refuseOneGroup({ groups }: JointCounts): void {
  if (groups.length > 1) return;
  throw dataProblem({
    code: 'one-group',
    message: `all subjects are in one group, ${quoted(groups[0] ?? '')}`,
    hint: 'name the column that tells the groups apart with --groups',
  });
}

function notesOf({ outcomes }: JointCounts): TogetherResult['notes'] {
  const single = outcomes.filter(({ levels }) => levels.length < 2).map(({ label }) => quoted(label));
  const sizes = new Set(outcomes.map(({ levels }) => levels.length));
  return [
    ...(single.length === 0
      ? []
      : [{ code: 'one-level-only', text: `All subjects share one level of ${single.join(', ')}, whose p is 1.` }]),
    ...(sizes.size < 2
      ? []
      : [
          {
            code: 'levels-differ',
            text: 'The outcomes have different numbers of levels: the largest statistic then favours those with more, so prefer the smallest p.',
          },
        ]),
  ];
}
