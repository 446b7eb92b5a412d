// A p from a chain of tables (Besag & Clifford 1989): (b + 1) / (m + 1), valid however slowly the chain mixes. Its tables depend on one
// another, so no binomial error is claimed.
import type { SampledCut } from '../null/contract.js';
import { orderedBy, type PValueEntry, type Question } from './contract.js';

export function chainPValue(question: Question, cut: SampledCut, stepsBetween: number, moves: number): PValueEntry {
  const { tied, above, draws } = cut;
  const atLeast = tied + above;
  const p = (atLeast + 1) / (draws + 1);
  return {
    tail: question.tail,
    orderedBy: orderedBy(question),
    method: 'sample',
    statistic: question.statistic,
    p,
    log10P: Math.log10(p),
    strict: above / draws,
    mid: (above + tied / 2) / draws,
    tied: tied / draws,
    guaranteed: true,
    errors: [{ kind: 'chain', form: 'serial', chains: 1, tables: draws, atLeast, stepsBetween, moves }],
  };
}
