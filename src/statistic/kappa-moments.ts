// Kappa with its two standard errors for large counts: under independence, for a p, and at the observed table, for an interval (Fleiss,
// Cohen & Everitt 1969).
import type { LiveTable } from '../table/live-table.js';

export type KappaWeights = 'none' | 'linear' | 'quadratic';

/** Agreement between two levels, from 0 to 1; indexes into the whole table. */
export type Agreement = (row: number, column: number) => number;

export function agreementOf(weights: KappaWeights, levels: number): Agreement {
  const most = Math.max(1, levels - 1);
  switch (weights) {
    case 'none':
      return (row, column) => (row === column ? 1 : 0);
    case 'linear':
      return (row, column) => 1 - Math.abs(row - column) / most;
    case 'quadratic':
      return (row, column) => 1 - ((row - column) / most) ** 2;
  }
}

export interface KappaMoments {
  /** NaN where expected agreement is complete (both raters only ever used one and the same level). */
  readonly kappa: number;
  /** Standard error under independence, for given margins. */
  readonly nullError: number;
  /** Standard error at the observed table. */
  readonly error: number;
}

/** @param counts row-major over the live table, with its margins. */
export function kappaMoments(live: LiveTable, agreement: Agreement, counts: ArrayLike<number>): KappaMoments {
  const { rows, columns, total, rowIndex, columnIndex } = live;
  const weight = (i: number, j: number): number => agreement(rowIndex[i]!, columnIndex[j]!);
  const rowShare = (i: number): number => live.rowTotals[i]! / total;
  const columnShare = (j: number): number => live.columnTotals[j]! / total;
  const ofRow = new Float64Array(rows);
  const ofColumn = new Float64Array(columns);
  let expected = 0;
  for (let i = 0; i < rows; i++) {
    for (let j = 0; j < columns; j++) {
      const w = weight(i, j);
      ofRow[i]! += w * columnShare(j);
      ofColumn[j]! += w * rowShare(i);
      expected += w * rowShare(i) * columnShare(j);
    }
  }
  const room = 1 - expected;
  if (room <= 1e-15) return { kappa: NaN, nullError: 0, error: 0 };
  // What is missing to full agreement, seen over expected: no digits are lost where both are small.
  let lackSeen = 0;
  let lackExpected = 0;
  for (let i = 0; i < rows; i++) {
    for (let j = 0; j < columns; j++) {
      const lack = 1 - weight(i, j);
      lackSeen += lack * counts[i * columns + j]!;
      lackExpected += (lack * live.rowTotals[i]! * live.columnTotals[j]!) / total;
    }
  }
  const ratio = lackSeen / lackExpected;
  const kappa = 1 - ratio;
  let nullSum = 0;
  let sum = 0;
  for (let i = 0; i < rows; i++) {
    for (let j = 0; j < columns; j++) {
      const w = weight(i, j);
      const both = ofRow[i]! + ofColumn[j]!;
      nullSum += rowShare(i) * columnShare(j) * (w - both) ** 2;
      sum += (counts[i * columns + j]! / total) * (w - both * ratio) ** 2;
    }
  }
  const errorOf = (variance: number): number => Math.sqrt(Math.max(0, variance) / total) / room;
  return {
    kappa,
    nullError: errorOf(nullSum - expected ** 2),
    error: errorOf(sum - (kappa - expected * ratio) ** 2),
  };
}
