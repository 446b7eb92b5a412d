// What chance is taken to do: what the study held fixed, and the settings with laws of their own.
import type { FixedSide } from '../../plan/design.js';
import type { Topic } from './topic.js';

const fixedLines: Readonly<Record<FixedSide, readonly string[]>> = {
  both: [
    'every row and column total held; the default, and valid whatever the study held',
    'law: P(table) = (product of R_i!) (product of C_j!) / (n! product of n_ij!)',
    'source: Fisher (1935), Freeman & Halton (1951)',
  ],
  rows: [
    'the row totals only: each row is drawn at its own total with the same unknown proportions',
    'for a 2x2 table p is the largest over the unknown proportion, its maximum certified; --outcome-order statistic or conditional-p; --nuisance-risk looks in an interval only',
    'source: Barnard (1945), Boschloo (1970), Suissa & Shuster (1985), Berger & Boos (1994)',
  ],
  columns: ['the same with the column totals held'],
  total: [
    'the total only: cells are drawn with unknown row and column proportions, unrelated',
    'source: Barnard (1947)',
  ],
};

export const designsTopic: Topic = {
  name: 'designs',
  summary: 'what the study held fixed, and so what chance does: --fixed, --strata, --cluster, --paired',
  opening: 'Say what was fixed before the counts were seen. The record and the report name it.',
  entries: [
    ...Object.entries(fixedLines).map(([name, lines]) => ({ name: `--fixed ${name}`, lines })),
    {
      name: '--null-value',
      lines: [
        'a 2x2 table tested against a stated value instead of none; two values with a comma between test equivalence, and p is the larger of two one-tailed ones',
        'odds-ratio=2: given both margins, by the noncentral hypergeometric law; --two-sided-rule doubled or probability',
        'difference=-0.1, ratio=1.25: with --fixed rows or columns, the largest over all proportions that the value allows, ordered by the score at it; --two-sided-rule distance or doubled',
        'source: Cornfield (1956), Miettinen & Nurminen (1985), Farrington & Manning (1990), Chan (1998), Schuirmann (1987)',
      ],
    },
    {
      name: '--strata',
      lines: [
        'the margins of every stratum held; association is looked for within strata',
        'source: Mantel & Haenszel (1959), Cornfield (1956), Landis, Heyman & Koch (1978)',
      ],
    },
    {
      name: '--cluster',
      lines: [
        'clusters (litters, plates, households) are dealt to the rows whole; no independence within one is assumed',
      ],
    },
    {
      name: '--paired',
      lines: [
        'the same units twice: given how many pairs lie in two cells that mirror each other, each lies in one or the other like a fair coin',
        'source: McNemar (1947), Bowker (1948), Stuart (1955)',
      ],
    },
  ],
};
