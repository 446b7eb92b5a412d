// Which tables count as at least as extreme as the observed one. The lists of names are those of the plan.
import type { Tail, TwoSidedRule } from '../../plan/plan.js';
import type { Topic } from './topic.js';

const tailLines: Readonly<Record<Tail, readonly string[]>> = {
  upper: ['statistic at least as large as the observed one', 'the default of a statistic without a sign'],
  lower: ['statistic at most as large as the observed one'],
  both: [
    'either way; for a statistic with a sign, of which it is the default',
    'what is as extreme on the other side is said by --two-sided-rule (keepsum help rules)',
  ],
};

const ruleLines: Readonly<Record<TwoSidedRule, readonly string[]>> = {
  distance: [
    'a table is as extreme when its statistic lies at least as far from its centre; the default',
    'definition: P(|T - centre| >= |observed - centre|)',
  ],
  probability: [
    'a table is as extreme when its value of the statistic is no more probable than the observed one',
    'definition: P(T takes a value v with P(T = v) <= P(T = observed))',
    'source: Irwin (1935), Freeman & Halton (1951)',
  ],
  doubled: [
    'the smaller one-tailed p, doubled, at most 1',
    'definition: min(1, 2 min(P(T >= observed), P(T <= observed)))',
  ],
  blaker: [
    'a table is as extreme when the smaller of the two tails that its value ends is no larger than that of the observed one; exact only',
    'definition: with g(v) = min(P(T >= v), P(T <= v)): P(g(T) <= g(observed))',
    'source: Blaker (2000)',
  ],
};

const entriesOf = (lines: Readonly<Record<string, readonly string[]>>) =>
  Object.entries(lines).map(([name, each]) => ({ name, lines: each }));

export const tailsTopic: Topic = {
  name: 'tails',
  summary: 'which side counts as extreme: every --tail',
  opening:
    'The observed table counts in its own tail, and ties with it count too. A mid-p counts ties by half (Lancaster 1961) and is not guaranteed.',
  entries: entriesOf(tailLines),
};

export const rulesTopic: Topic = {
  name: 'rules',
  summary: 'two-sided p-values: every --two-sided-rule',
  opening:
    'T is a statistic with a sign. The rules agree where its law is symmetric; elsewhere choose before you see the answers. The rule is named wherever a two-sided p is shown.',
  entries: entriesOf(ruleLines),
};
