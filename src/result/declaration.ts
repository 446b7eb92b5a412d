// The one reported shape, declared once. Its TypeScript type and the published JSON Schema come from here.
// A new field is added here first; reports read nothing that is not declared.
import { z } from 'zod';
import { cell } from './declared/cell.js';
import { clusters } from './declared/clusters.js';
import { comparisons } from './declared/comparisons.js';
import { designLine } from './declared/design.js';
import { effect } from './declared/effect.js';
import { fragility } from './declared/fragility.js';
import { input } from './declared/input.js';
import { nullSummary } from './declared/null-summary.js';
import { order } from './declared/order.js';
import { pValue } from './declared/p-value.js';
import { count, extendedNumber, probability } from './declared/pieces.js';
import { plan } from './declared/plan.js';
import { strata } from './declared/strata.js';

const diagnostics = z.strictObject({
  /** 0 only for pairs of which none changed. */
  smallestExpected: z.number().min(0),
  /** Share of cells with an expected count below 5. */
  shareBelowFive: probability,
  /** Cochran (1954): does the chi-square approximation deserve trust here? */
  cochranAdvice: z.enum(['met', 'not-met']),
  cochranSentence: z.string(),
  /** Tables with these margins, when counted. */
  tables: z.number().optional(),
});

const group = z.strictObject({ label: z.string(), events: count, size: count, proportion: probability.nullable() });

export const resultDeclaration = z.strictObject({
  /** Lines of a batch: the table's own name. */
  key: z.string().optional(),
  schema: z.literal('keepsum/result/1'),
  tool: z.strictObject({ name: z.literal('keepsum'), version: z.string() }),
  input,
  plan,
  statistic: z.strictObject({
    name: z.string(),
    /** null beside a reason when these margins leave it undefined. */
    value: extendedNumber.nullable(),
    reason: z.enum(['empty-group', 'one-level-only']).optional(),
    degreesOfFreedom: count.optional(),
    /** 2x2 statistics: the two proportions compared, first minus second. */
    groups: z.tuple([group, group]).optional(),
    event: z.string().optional(),
  }),
  pValues: z.array(pValue).min(1),
  /** For a 2x2 table: what p would be had the study fixed something else. */
  designs: z.array(designLine).optional(),
  diagnostics,
  nullSummary: nullSummary.optional(),
  effects: z.array(effect).optional(),
  /** Tables with impossible cells: what independence in the others expects. */
  quasiIndependence: z
    .strictObject({
      /** null in impossible cells. */
      expected: z.array(z.array(z.number().min(0).nullable())),
      /** Parts that say nothing about each other. */
      blocks: count,
      /** Possible cells [row, column] that the margins hold at 0. */
      heldAtZero: z.array(z.tuple([count, count])),
    })
    .optional(),
  order: order.optional(),
  cells: z.array(cell).optional(),
  comparisons: comparisons.optional(),
  fragility: fragility.optional(),
  strata: strata.optional(),
  clusters: clusters.optional(),
  /** Of one part of a run: what was counted, below, tied and above for each ordering, then for the ranks of the cells. */
  part: z.strictObject({ draws: count, tallies: z.array(z.tuple([count, count, count])) }).optional(),
  sentence: z.string(),
  methods: z.string(),
  notes: z.array(z.strictObject({ code: z.string(), text: z.string() })),
});
