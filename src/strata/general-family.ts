// Strata of tables of any shape: the generalised Cochran-Mantel-Haenszel statistics (Landis, Heyman & Koch 1978).
import type { PValueEntry, Question } from '../pvalue/contract.js';
import { chiSquarePValue, normalPValue } from '../pvalue/from-asymptotic.js';
import { summedExpectations } from './expectations.js';
import type { StrataFamily } from './family.js';
import { exactVector, forecastVector } from './general/exact-vector.js';
import { judgeFor } from './general/judge.js';
import { problemFor, type GeneralName, type Layer } from './general/problem.js';
import { layerSampler } from './general/sample-layers.js';

/** @param rows, columns  numbers of live lines of the pooled table, groups as rows */
export function generalFamily(
  name: GeneralName,
  layers: readonly Layer[],
  rows: number,
  columns: number,
): StrataFamily {
  const problem = problemFor(name, layers, rows, columns);
  const judged = judgeFor(problem);
  const { rank, mean, covariance } = judged.form;
  const root = rank === 0 ? 0 : (judged.observed[0]! - mean[0]!) / Math.sqrt(covariance[0]!);
  return {
    work: rank === 0 ? { workUnits: 0, tables: 1 } : forecastVector(problem, judged),
    value: name === 'score-correlation' ? root : judged.value,
    degreesOfFreedom: name === 'score-correlation' ? undefined : rank,
    layers: rank === 0 ? [] : layers,
    expectations: summedExpectations(layers),
    exact: (names) => exactVector(problem, judged, names),
    sampler: (names) => layerSampler(problem, judged, names),
    approximations: (question) => (rank === 0 ? [] : [approximation(question)]),
    homogeneity: () => Promise.resolve([]),
    effects: () => Promise.resolve([]),
  };

  function approximation(question: Question): PValueEntry {
    if (name !== 'score-correlation') return chiSquarePValue(question, judged.value, rank);
    if (question.tail !== 'both') return { ...normalPValue(question, root), value: root };
    return { ...chiSquarePValue(question, root * root, 1), value: root * root };
  }
}
