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
    'a small 2x2 table: the largest p over both; larger ones: a parametric bootstrap, labelled an approximation',
    'source: Barnard (1947)',
  ],
};

export const designsTopic: Topic = {
  name: 'designs',
  summary: 'what the study held fixed, and so what chance does: --fixed, --strata, --cluster, --paired, --ordered',
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
        'of 2x2 tables the sum of corner counts, its exact law by convolution; of larger ones the forms of Landis, Heyman & Koch, by scores that are midranks within each stratum unless named',
        'whether the strata agree is told beside it: Breslow & Day (1980), Tarone (1985), Zelen (1971); and where pooling would turn the answer: Simpson (1951)',
        'source: Mantel & Haenszel (1959), Cornfield (1956), Gart (1970), Mehta, Patel & Gray (1985), Landis, Heyman & Koch (1978), van Elteren (1960)',
      ],
    },
    {
      name: '--cluster',
      lines: [
        'clusters (litters, plates, households) are dealt to the rows whole, as many to each row as it has; no independence within one is assumed',
        'for pearson, wald, score and trend; every record of a cluster has the same row; not together with strata',
      ],
    },
    {
      name: '--paired',
      lines: [
        'the same units twice: given how many pairs lie in two cells that mirror each other, each lies in one or the other like a fair coin',
        'both sides have the same levels, matched by label; with two levels the unconditional p, its maximum certified, stands beside',
        'source: McNemar (1947), Bowker (1948), Stuart (1955), Suissa & Shuster (1991)',
      ],
    },
    {
      name: 'impossible cells',
      lines: [
        'a cell into which no unit could ever fall is written -, as in a=-,8,3; 0 stays a count like any other',
        'independence is tested in the other cells (quasi-independence): expected counts by iterative fitting, degrees of freedom that allow for blocks',
        'p from every table where they are few, else from a chain through the observed table, valid however slowly it mixes',
        'source: Goodman (1968), Deming & Stephan (1940), Besag & Clifford (1989)',
      ],
    },
    {
      name: '--ordered',
      lines: [
        'rows, columns or both stand in the order listed; each test that uses it says which question it answers',
        "both: trend by declared scores, isotonic-trend for steps of any size, and gamma, tau-b, tau-c, Somers' d; one: kruskal-wallis",
        'scores are 1, 2, 3, ... by place, a list, or midranks; only the gaps between them matter; an empty line keeps its place and its score',
        'source: Armitage (1955), Mantel (1963), Bartholomew (1959), Kruskal & Wallis (1952)',
      ],
    },
  ],
};
