// The law of a linear statistic by dynamic programming (after Pagano & Tritchler 1983): columns are dealt to the rows one
// cell at a time; partial tables that leave the same row totals are one node, which carries the law of the sum so far.
// Weights are the chances of a cell given the node, so that values are probabilities and what is dropped is known.
import { Meter } from '../meter.js';
import { perDenseValue, perMove, perSparseValue } from './costs.js';
import { factorialsUpTo, HypergeometricWeights, type Scaled } from './factorials.js';
import { addMoves, moveWidth } from './add-moves.js';
import { NodeNumbers, Records } from './moves.js';
import { DenseLaw, powerOfTwo, SparseLaw, type SumLaw } from './node.js';
import type { ScoredLine, ScoredSides } from './scored-sides.js';

export interface DealtLaw {
  /** Probabilities of the values of S, times `upscale`. */
  readonly law: SumLaw;
  /** Probability left out, times `upscale`: no value is short by more. */
  readonly leftOut: number;
  /** Each probability held is right to this many units of 2^-53, relative. */
  readonly roundings: number;
}

/** The nodes of one stage: codes, what each row still lacks (a record of `rows` numbers each), and the laws so far. */
interface Nodes {
  readonly codes: number[];
  readonly left: Records;
  readonly laws: SumLaw[];
}

/** Most codes a network may have, so that each is a whole number. */
export const mostCodes = Number.MAX_SAFE_INTEGER;

/** Number of codes of row totals still to be filled; the network needs it below `mostCodes`. */
export const codesOf = (rows: readonly ScoredLine[]): number =>
  rows.reduce((product, { total }) => product * (total + 1), 1);

/**
 * @param least moves and end values below this (times `upscale`) are left out; 0 keeps all.
 * @param sparse hold sums in hash maps instead of arrays over their range.
 */
export function dealColumns(sides: ScoredSides, least: number, sparse: boolean, meter: Meter = new Meter()): DealtLaw {
  const perValue = sparse ? perSparseValue : perDenseValue;
  const { rows, columns, total } = sides;
  const kind = sparse ? SparseLaw : DenseLaw;
  const weights = new HypergeometricWeights(factorialsUpTo(total));
  const places = rows.map((_, row) => codesOf(rows.slice(row + 1)));
  const numbers = new NodeNumbers(codesOf(rows));
  let leftOut = 0;
  let roundings = 0;

  const step = (nodes: Nodes, row: number, column: ScoredLine, rest: number): Nodes => {
    const width = rows.length;
    const forced = row === width - 2;
    const place = places[row]!;
    const lastPlace = places[width - 1]!;
    const score = column.score * rows[row]!.score;
    const lastScore = column.score * rows[width - 1]!.score;
    const codes: number[] = [];
    const left = new Records(width);
    const lowest = new Records(1);
    const highest = new Records(1);
    const ways = new Records(1);
    const moves = new Records(moveWidth);
    const weight: Scaled = { mantissa: 0, exponent: 0 };
    nodes.laws.forEach((law, from) => {
      const before = moves.length;
      const at = from * width;
      const { data } = nodes.left;
      let drawn = -rest;
      let pool = 0;
      for (let h = 0; h < width; h++) {
        drawn += data[at + h]!;
        if (h >= row) pool += data[at + h]!;
      }
      const marked = data[at + row]!;
      const mass = law.mass();
      weights.set(marked, drawn, pool);
      const most = Math.min(marked, drawn);
      for (let k = Math.max(0, drawn - (pool - marked)); k <= most; k++) {
        weights.weigh(k, weight);
        const share = mass * weight.mantissa * powerOfTwo(weight.exponent);
        if (share < least) {
          leftOut += share;
          continue;
        }
        const shift = score * k + (forced ? lastScore * (drawn - k) : 0);
        const code = nodes.codes[from]! - k * place - (forced ? (drawn - k) * lastPlace : 0);
        let to = numbers.find(code);
        if (to < 0) {
          to = codes.push(code) - 1;
          const into = left.grow();
          for (let h = 0; h < width; h++) left.data[into + h] = data[at + h]!;
          left.data[into + row]! -= k;
          if (forced) left.data[into + width - 1]! -= drawn - k;
          lowest.data[lowest.grow()] = Infinity;
          highest.data[highest.grow()] = -Infinity;
          ways.grow();
        }
        if (law.lowest + shift < lowest.data[to]!) lowest.data[to] = law.lowest + shift;
        if (law.highest + shift > highest.data[to]!) highest.data[to] = law.highest + shift;
        ways.data[to]!++;
        const move = moves.grow();
        moves.data[move] = from;
        moves.data[move + 1] = to;
        moves.data[move + 2] = shift;
        moves.data[move + 3] = weight.mantissa;
        moves.data[move + 4] = weight.exponent;
      }
      meter.spend((moves.length - before) * (perMove + law.size * perValue));
    });
    numbers.clear(codes);
    const laws: SumLaw[] = kind.many(lowest.data.subarray(0, codes.length), highest.data);
    const additions = addMoves(kind, nodes.laws, laws, moves, ways.data);
    for (const law of laws) {
      meter.spend(3 * law.size * perValue);
      leftOut += law.trim(least);
    }
    // A value takes the error of its weight, a product or two, and the additions.
    roundings += HypergeometricWeights.error(column.total) + 2 + additions;
    return { codes, left, laws };
  };

  let nodes: Nodes = { codes: [codesOf(rows) - 1], left: new Records(rows.length), laws: [kind.single()] };
  nodes.left.data.set(
    rows.map((row) => row.total),
    nodes.left.grow(),
  );
  let rest = total;
  for (const column of columns) {
    rest -= column.total;
    for (let row = 0; row < rows.length - 1; row++) nodes = step(nodes, row, column, rest);
  }
  return { law: nodes.laws[0]!, leftOut, roundings };
}
