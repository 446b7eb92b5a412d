// The README's recipes for many processes, run as they stand there: GNU parallel, a Slurm array with its variables set by hand, and
// what Spark's `pipe` counts on.
import { chmodSync, mkdirSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { checkedLines } from '../helpers/checked-lines.js';
import { bin, keepsum, root, run } from './run-command.js';

const readme = readFileSync(join(root, 'README.md'), 'utf8');
const blocks = [...readme.matchAll(/```(?:sh|python)\n([\s\S]*?)```/g)].map(([, text]) => text!);
const recipe = (start: string): string => blocks.find((text) => text.startsWith(start))!;

const folder = mkdtempSync(join(tmpdir(), 'keepsum-recipes-'));
const tools = join(folder, 'tools');
const place = join(folder, 'place');
const environment = { PATH: `${tools}:${process.env['PATH']!}` };
afterAll(() => rmSync(folder, { recursive: true }));

function tool(name: string, text: string): void {
  writeFileSync(join(tools, name), text);
  chmodSync(join(tools, name), 0o755);
}

/** Exact and drawn tables, some of them without a key, one that cannot be used, and a blank line. */
const withoutKeys = Array.from({ length: 30 }, (_, k) => {
  if (k === 7) return '';
  if (k === 11) return '{"key":"bad","counts":[[1,2],[3,"x"]]}';
  const plan = k % 3 === 0 ? ',"plan":{"method":"sample","draws":1000}' : '';
  return `{${k % 4 === 0 ? '' : `"key":"k${k}",`}"counts":[[${k % 13},${5 + (k % 3)},4],[2,${1 + (k % 11)},9]]${plan}}`;
});

let single = '';
beforeAll(async () => {
  mkdirSync(tools);
  tool('keepsum', `#!/bin/sh\nexec "${process.execPath}" "${bin}" "$@"\n`);
  writeFileSync(join(folder, 'tables.ndjson'), withoutKeys.join('\n'));
  single = (await keepsum(['batch', 'tables.ndjson', '--seed', 'march'], { folder })).out;
  expect(checkedLines(single)).toHaveLength(29);
});
beforeEach(() => {
  rmSync(place, { recursive: true, force: true });
  mkdirSync(place);
  writeFileSync(join(place, 'tables.ndjson'), withoutKeys.join('\n'));
});

const bash = (text: string) => run('bash', ['-c', text], { folder: place, environment });
const results = (): string => readFileSync(join(place, 'results.ndjson'), 'utf8');

it('GNU parallel', async ({ skip }) => {
  const { out } = await run('bash', ['-c', 'parallel --version'], {});
  skip(!out.startsWith('GNU parallel'), 'GNU parallel is not installed (Debian package parallel)');
  const { err } = await bash(recipe('parallel '));
  expect(err).not.toContain('error:');
  expect(results()).toBe(single);
});

it('a Slurm array', async () => {
  writeFileSync(join(place, 'many.sh'), recipe('#!/bin/bash'));
  // Stands for the scheduler: every task of the array in turn, the last one first, then what waits for them.
  tool(
    'sbatch',
    `#!/bin/bash
for last; do :; done
case "$1" in
  --parsable)
    [[ $(grep '^#SBATCH' "$last") =~ --array=1-([0-9]+).*--cpus-per-task=([0-9]+) ]]
    export SLURM_ARRAY_TASK_COUNT=\${BASH_REMATCH[1]} SLURM_CPUS_PER_TASK=\${BASH_REMATCH[2]}
    for task in $(seq "$SLURM_ARRAY_TASK_COUNT" -1 1); do SLURM_ARRAY_TASK_ID=$task bash "$last" || exit 1; done
    echo 4711 ;;
  --dependency=afterok:4711) bash -c "$last" ;;
esac
`,
  );
  const { err, status } = await bash(recipe('job=$(sbatch'));
  expect(err).not.toContain('error:');
  expect(status).toBe(0);
  expect(results()).toBe(single);
});

describe("through Spark's pipe", () => {
  const [, command] = /\.pipe\("([^"]+)"\)/.exec(recipe('lines = spark'))!;
  const keyed = withoutKeys.map((line, k) => line.replace('{"counts"', `{"key":"n${k}","counts"`));
  const sorted = (text: string): string[] => text.trimEnd().split('\n').map(withoutPlace).sort();
  /** The place of a fault is that in its partition. */
  const withoutPlace = (line: string): string => line.replace(/"place":"standard input:\d+"/, '');

  /** As the lines of one partition go through the command. */
  async function piped(lines: readonly string[]): Promise<string> {
    const input = lines.map((line) => `${line}\n`).join('');
    const { out, err, status } = await run('bash', ['-c', command!], { folder: place, environment, input });
    expect({ err, status }).toEqual({ err: '', status: 0 });
    checkedLines(out);
    return out;
  }

  it('partitions and their order change no digit: a line in gives a line out', async () => {
    const lines = keyed.filter((line) => line !== '');
    const whole = await piped(lines);
    expect(whole.trimEnd().split('\n')).toHaveLength(lines.length);
    const mixed = [...lines].reverse();
    const parts = [mixed.filter((_, k) => k % 3 === 1), mixed.filter((_, k) => k % 3 !== 1)];
    expect(sorted((await Promise.all(parts.map(piped))).join(''))).toEqual(sorted(whole));
    const bySingle = await keepsum(['batch', '-', '--seed', 'march'], { input: lines.join('\n') });
    expect(sorted(whole)).toEqual(sorted(bySingle.out));
  });

  it('an empty partition gives no line', async () => {
    expect(await piped([])).toBe('');
  });

  it('a line without a key is refused rather than drawn by its number in the partition', async () => {
    const [line] = checkedLines(await piped(['{"counts":[[8,2],[1,9]]}']));
    expect(line).toMatchObject({ key: '1', error: { code: 'no-key' } });
  });
});
