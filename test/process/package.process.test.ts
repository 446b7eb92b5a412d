// What a user of the packed tarball gets: a command, a library and its types, with nothing else to install for running.
import {
  existsSync,
  mkdirSync,
  mkdtempSync,
  readFileSync,
  readdirSync,
  rmSync,
  symlinkSync,
  writeFileSync,
} from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { root, run } from './run-command.js';

let project = '';
let installed = '';

beforeAll(async () => {
  project = mkdtempSync(join(tmpdir(), 'keepsum-'));
  installed = join(project, 'node_modules/keepsum');
  mkdirSync(installed, { recursive: true });
  // dist is built already, so the scripts that would build it again are left out.
  await expectDone('npm', ['pack', '--ignore-scripts', '--pack-destination', project], root);
  const tarball = readdirSync(project).find((name) => name.endsWith('.tgz'))!;
  await expectDone('tar', ['-xzf', tarball, '-C', installed, '--strip-components=1'], project);
  writeFileSync(join(project, 'package.json'), '{ "type": "module" }');
});
afterAll(() => rmSync(project, { recursive: true }));

async function expectDone(program: string, words: string[], folder: string): Promise<string> {
  const { status, out, err } = await run(program, words, { folder });
  expect({ status, err: status === 0 ? '' : `${out}${err}` }).toEqual({ status: 0, err: '' });
  return out;
}

describe('the package', () => {
  it('holds what is needed to run it and to read its types, and no sources or tests', () => {
    expect(readdirSync(installed).sort()).toEqual(
      ['LICENSE', 'README.md', 'bin', 'dist', 'fixtures', 'package.json'].filter((name) =>
        existsSync(join(root, name)),
      ),
    );
    expect(readdirSync(join(installed, 'fixtures'))).toEqual(['demo']);
    expect(existsSync(join(installed, 'dist/third-party-licenses.md'))).toBe(true);
    expect(existsSync(join(installed, 'dist/keepsum.1'))).toBe(true);
    // Types that the library does not lead to are left out.
    expect(existsSync(join(installed, 'dist/types/cli'))).toBe(false);
  });

  it('works as a command where nothing else is installed', async () => {
    const out = await expectDone(
      process.execPath,
      ['node_modules/keepsum/bin/keepsum.js', 'test', '8,2', '1,9', '--format', 'json'],
      project,
    );
    expect(JSON.parse(out)).toMatchObject({ schema: 'keepsum/result/1' });
    const schema = await expectDone(
      process.execPath,
      ['node_modules/keepsum/bin/keepsum.js', 'schema', 'result'],
      project,
    );
    expect(JSON.parse(schema)).toMatchObject({ $id: 'keepsum/result/1' });
  });

  it('works as a library, which gives what the command gives', async () => {
    writeFileSync(
      join(project, 'use.js'),
      `import { analyse, readInline, render } from 'keepsum';
       const result = await analyse(readInline(['8,2', '1,9']), { statistic: 'score' });
       process.stdout.write(render(result, 'json'));`,
    );
    const byLibrary = await expectDone(process.execPath, ['use.js'], project);
    const words = [
      'node_modules/keepsum/bin/keepsum.js',
      'test',
      '8,2',
      '1,9',
      '--statistic',
      'score',
      '--format',
      'json',
    ];
    expect(byLibrary).toBe(await expectDone(process.execPath, words, project));
  });

  it('runs the programs of the README as they stand there', async () => {
    const readme = readFileSync(join(root, 'README.md'), 'utf8');
    const programs = [...readme.matchAll(/```ts\n(import [\s\S]*?)```/g)].map(([, text]) => text!);
    const printed: string[] = [];
    for (const program of programs) {
      writeFileSync(join(project, 'example.js'), program);
      printed.push(await expectDone(process.execPath, ['example.js'], project));
    }
    expect(programs.filter((text) => text.includes('analyseMany('))).toHaveLength(1);
    const many = printed[programs.findIndex((text) => text.includes('analyseMany('))]!;
    const words = ['node_modules/keepsum/bin/keepsum.js', 'batch', '-', '--seed', 'march'];
    const input = ['{"key":"press","counts":[[3,57],[12,48]]}', '{"key":"glaze","counts":[[1,44],[5,50]]}'].join('\n');
    const { out } = await run(process.execPath, words, { folder: project, input });
    const lines = out.trimEnd().split('\n').map((line) => JSON.parse(line) as { key: string; pValues: { p: number }[] }); // prettier-ignore
    expect(many).toBe(lines.map(({ key, pValues }) => `${key} ${pValues[0]!.p}\n`).join(''));
  });

  it('has types that resolve and refuse a slip', async () => {
    // The one package that the types name; installing brings it along.
    symlinkSync(join(root, 'node_modules/zod'), join(project, 'node_modules/zod'));
    writeFileSync(
      join(project, 'use.ts'),
      `import { analyse, type PlanOptions, type Result } from 'keepsum';
       const options: PlanOptions = { tail: 'upper' };
       const result: Result = await analyse({ counts: [[8, 2], [1, 9]] }, options);
       export const p: number | null = result.pValues[0]!.p;
       // @ts-expect-error a tail that there is not
       export const wrong: PlanOptions = { tail: 'uper' };
       // @ts-expect-error a field that there is not
       export const missing = result.pvalues;`,
    );
    const tsc = join(root, 'node_modules/typescript/bin/tsc');
    for (const [module, resolution] of [
      ['nodenext', 'nodenext'],
      ['esnext', 'bundler'],
    ] as const) {
      const words = [
        '--noEmit',
        '--strict',
        '--target',
        'es2022',
        '--module',
        module,
        '--moduleResolution',
        resolution,
      ];
      await expectDone(process.execPath, [tsc, ...words, 'use.ts'], project);
    }
  });
});
