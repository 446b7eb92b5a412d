// What a methods paragraph says of a table with impossible cells.
import { type ResultBeforeWords } from './describe.js';
import { quoted } from './label-words.js';
import { countWords } from './number-words.js';
import type { PValue } from './result.js';

export function quasiSentence({ quasiIndependence, input }: ResultBeforeWords): string | undefined {
  if (quasiIndependence === undefined) return undefined;
  const cells = input.impossible?.flat().filter(Boolean).length ?? 0;
  return (
    `${cells} cell${cells === 1 ? '' : 's'} could hold no unit, so quasi-independence was tested in the others, with expected counts by iterative ` +
    `proportional fitting (Deming & Stephan 1940) and degrees of freedom that allow for separable blocks (Goodman 1968).`
  );
}

export function quasiMethod({ plan }: ResultBeforeWords, name: string, p: PValue): string {
  const chain = p.errors.find((error) => error.kind === 'chain');
  if (chain !== undefined) {
    return (
      `${name} comes from one chain through the observed table (Metropolis et al. 1953) over the tables with these margins and impossible cells, joined ` +
      `by moves along chordless cycles (Aoki & Takemura 2005): ${countWords(chain.tables)} tables, ${countWords(chain.stepsBetween)} steps apart, the observed one ` +
      `at a place drawn at random (Besag & Clifford 1989); generator ${plan.generator ?? ''}, seed ${quoted(plan.seed ?? '')}. With b of them at least as extreme it is reported as (b + 1) / (m + 1).`
    );
  }
  if (p.method === 'exact') return `${name} is exact: every table with these margins and impossible cells was listed.`;
  return `${name} comes from the chi-square approximation, which holds for large counts.`;
}
