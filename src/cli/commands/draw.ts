// keepsum draw: random tables with the margins of a given one, one JSON object a line, for simulations in a pipeline.
import { usageProblem } from '../../problem/problem.js';
import type { Table } from '../../table/table.js';
import { anyText, wholeNumber } from '../arguments/check-value.js';
import { valued } from '../arguments/option.js';
import type { Shell } from '../shell.js';
import { remark, writeOut } from '../streams/write-out.js';
import { chooseSource } from './choose-source.js';
import { command } from './command-file.js';
import { readSource } from './read-source.js';
import { debugOption, helpOption } from './shared-options.js';
import { reading } from './options/reading.js';

const drawing = {
  number: valued('The tables', 'N', wholeNumber(1, 1e12, '10'), 'how many tables (1)', 'n'),
  seed: valued('The tables', 'TEXT', anyText, 'makes the tables repeatable (one is made and shown)'),
};

export const drawCommand = command({
  name: 'draw',
  usage: [
    { line: 'keepsum draw ROW ROW ...', words: 'margins of rows typed in: 8,2 or label=8,2' },
    { line: 'keepsum draw FILE', words: 'margins of a table of counts; - is standard input' },
  ],
  purpose: 'Draws random tables that keep every row and column total of a given table, one JSON object a line.',
  examples: [
    { line: 'keepsum draw 8,2 1,9 --number 3 --seed a', words: 'three tables, the same every time' },
    { line: 'keepsum draw fixtures/demo/orchid-forms.tsv --seed b', words: 'one table, with the labels of the file' },
  ],
  options: { ...reading, ...drawing, debug: debugOption, help: helpOption },
  async run(operands, values, shell) {
    const source = chooseSource(operands, values, shell.stdinIsTerminal);
    if (source === undefined) {
      throw usageProblem({
        code: 'nothing-named',
        message: 'no table is named',
        hint: 'write keepsum draw 8,2 1,9, name a file, or pipe a table in',
      });
    }
    const { table } = await readSource(source, values, shell);
    if (table.impossible !== undefined) {
      throw usageProblem({
        code: 'impossible-cells',
        message: 'this table has cells declared impossible (-), and tables with such cells are not drawn',
        hint: 'write 0 where a cell was merely empty',
      });
    }
    const { drawTables } = await import('../../draw-tables.js');
    const seed = values.seed ?? (await madeSeed(shell));
    const labels = labelsOf(table);
    let lines = '';
    let key = 0;
    for (const counts of drawTables(table, { number: values.number ?? 1, seed })) {
      lines += `${JSON.stringify({ key: String(++key), counts, ...labels })}\n`;
      if (lines.length < 65_536) continue;
      if (!(await writeOut(shell.stdout, lines, 'standard output'))) return 0; // nobody reads on
      lines = '';
    }
    await writeOut(shell.stdout, lines, 'standard output');
    return 0;
  },
});

async function madeSeed(shell: Shell): Promise<string> {
  const { freshSeed } = await import('../../plan/fresh-seed.js');
  const seed = freshSeed();
  await remark(shell.stderr, `note: the seed is ${seed}\n`);
  return seed;
}

/** Labels of the data go along with every table; those of our own making do not. */
function labelsOf({ rowLabels, columnLabels }: Table): {
  rowLabels?: readonly string[];
  columnLabels?: readonly string[];
} {
  const ours = (labels: readonly string[], side: string): boolean =>
    labels.every((label, k) => label === `${side} ${k + 1}`);
  return {
    ...(ours(rowLabels, 'row') ? {} : { rowLabels }),
    ...(ours(columnLabels, 'column') ? {} : { columnLabels }),
  };
}
