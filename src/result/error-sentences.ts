// What the error of a p-value is, in sentences: one for each kind of error that it carries.
import type { SamplingError, SequentialError } from './describe.js';
import { bracketWords, countWords, probabilityWords } from './number-words.js';
import type { PValue, PValueError } from './result.js';

type BracketError = Extract<PValueError, { kind: 'bracket' }>;

/** What the error of a p-value is, one sentence for each kind of error it carries. */
export const errorSentences = (p: PValue): string[] => p.errors.map((error) => errorSentence(p, error));

function errorSentence(p: PValue, error: PValueError): string {
  switch (error.kind) {
    case 'rounding':
      return error.relative === 0
        ? 'It carries no error at all.'
        : `Its only error is rounding, at most ${error.relative.toExponential(1)} of its value.`;
    case 'sampling':
      return samplingSentence(p, error);
    case 'sequential':
      return sequentialSentence(error);
    case 'nuisance-maximum':
      return `It is a proved upper bound of a maximum, at most ${error.relative.toExponential(1)} of its value too large.`;
    case 'chain':
      return (
        `Its tables form one chain and depend on one another, so no error of drawing is claimed: ${howMany({ ...error, draws: error.tables })} of ` +
        `${countWords(error.tables)} tables, ${countWords(error.stepsBetween)} steps apart, ${error.atLeast > 1 ? 'were' : 'was'} at least as extreme; ` +
        `(b + 1) / (m + 1) is a valid p however slowly the chain mixes (Besag & Clifford 1989).`
      );
    case 'bracket':
      return bracketSentence(error);
    case 'approximation':
      if (p.method === 'sample')
        return 'It is an approximation: fitted proportions stand for the unknown ones, with an error not known here.';
      return 'It rests on an approximation for large counts; its error here is not known.';
  }
}

const bracketSentence = ({ lower, upper }: BracketError): string =>
  `Partial sums too many to keep apart were merged, once rounded down and once rounded up: the exact p lies from ` +
  `${bracketWords(lower, upper)} for certain, and the upper limit is reported.`;

function samplingSentence(p: PValue, error: SamplingError): string {
  const draws = countWords(error.draws);
  const all = countWords(error.draws + 1);
  const ending = `with the observed one counted in, p is ${p.rule === 'doubled' ? '2 x ' : ''}${countWords(error.atLeast + 1)} / ${all}`;
  const limit = p.rule === 'doubled' ? ', at most 1' : '';
  const seen =
    error.tails === undefined
      ? `${howMany(error)} of ${draws} random tables ${error.atLeast > 1 ? 'were' : 'was'} at least as extreme`
      : `${countWords(error.tails.upper)} of ${draws} random tables were at least as extreme in the upper tail, ${countWords(error.tails.lower)} in the lower`;
  return `Its error is that of drawing: ${seen}; ${ending}${limit} (Phipson & Smyth 2010).`;
}

function sequentialSentence(error: SequentialError): string {
  const { atLeast, draws, interval, risk } = error;
  return (
    `Its error is that of drawing under a stopping rule: ${howMany(error)} of ${countWords(draws)} random tables ` +
    `${atLeast > 1 ? 'were' : 'was'} at least as extreme; p is the upper end of ${probabilityWords(interval[0])} to ` +
    `${probabilityWords(interval[1])} plus ${probabilityWords(risk)}, the risk that these limits err at any look ` +
    `(Robbins 1970). ${stopWords(error)}`
  );
}

/** Why drawing ended, and what more would take. */
function stopWords({ stoppedBecause, drawsToSettle }: SequentialError): string {
  switch (stoppedBecause) {
    case 'settled-below':
      return 'Drawing ended because p is settled at or below the level it is compared with.';
    case 'settled-above':
      return 'Drawing ended because p is settled above the level it is compared with.';
    case 'precise-enough':
      return `Drawing ended because p is known as precisely as asked for${moreWords(drawsToSettle)}.`;
    case 'limit':
      return `Drawing ended at the most draws allowed${moreWords(drawsToSettle)}.`;
  }
}

function moreWords(drawsToSettle: number | null): string {
  if (drawsToSettle === 0) return '';
  return drawsToSettle === null
    ? '; p lies so near the level that no number of draws would settle its side'
    : `; about ${countWords(drawsToSettle)} more draws would settle its side of the level`;
}

const howMany = ({ atLeast, draws }: { atLeast: number; draws: number }): string =>
  atLeast === 0 ? 'none' : atLeast === draws ? 'every one' : countWords(atLeast);
