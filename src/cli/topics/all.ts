// Every topic of the help. Adding one is a Topic and a line here.
import { adjustmentsTopic } from './many-tests.js';
import { designsTopic } from './designs.js';
import { effectsTopic } from './effects.js';
import { plannedTestsTopic } from './planned-tests.js';
import { exitStatusTopic, methodsTopic, seedsTopic } from './running.js';
import { statisticsTopic } from './statistics.js';
import { rulesTopic, tailsTopic } from './tails-and-rules.js';
import type { Topic } from './topic.js';

export const topics: readonly Topic[] = [
  statisticsTopic,
  tailsTopic,
  rulesTopic,
  designsTopic,
  methodsTopic,
  effectsTopic,
  adjustmentsTopic,
  plannedTestsTopic,
  seedsTopic,
  exitStatusTopic,
];

/** One statistic, tail, rule, method, measure or adjustment as a topic of its own. */
export const entryNamed = (name: string): Topic | undefined => {
  const found = topics.flatMap(({ entries }) => entries).find((entry) => entry.name === name);
  return found === undefined ? undefined : { name, summary: '', opening: '', entries: [found] };
};

/** What may follow `keepsum help`, beside the commands; statuses are reached by their topic. */
export const topicNames: readonly string[] = [
  ...topics.map(({ name }) => name),
  ...topics.flatMap(({ entries }) => entries.map(({ name }) => name)).filter((name) => /^[a-z][a-zA-Z-]*$/.test(name)),
];
