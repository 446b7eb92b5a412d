// Saved results on one page, and what is refused.
import { describe, expect, it } from 'vitest';
import { analyse } from '../../../src/analyse.js';
import { main } from '../../../src/cli/main.js';
import { fakeShell } from '../fake-shell.js';

const one = await analyse({
  counts: [
    [8, 2],
    [1, 9],
  ],
});
const two = await analyse(
  {
    counts: [
      [3, 4],
      [5, 1],
    ],
  },
  { nullSummary: true },
);
const lines = `${JSON.stringify(one)}\n${JSON.stringify(two)}\n`;

async function report(input: string) {
  const shell = fakeShell({ input });
  return { status: await main(['report', '-'], shell), ...shell.written };
}

describe('keepsum report', () => {
  it('puts every result of a file on one page, the records inside', async () => {
    const { status, out, err } = await report(lines);
    expect({ status, err }).toEqual({ status: 0, err: '' });
    expect(out.match(/<article/g)).toHaveLength(2);
    const [, record] = /id="keepsum-record">([^<]*)</.exec(out)!;
    expect(JSON.parse(record!)).toEqual(JSON.parse(JSON.stringify([one, two])));
  });

  it('reads back the page that it wrote', async () => {
    const page = (await report(lines)).out;
    expect((await report(page)).out).toBe(page);
  });

  it('makes a table of compact lines, keeps what could not be used apart, and can be replayed', async () => {
    const tables =
      '{"key":"<a>","counts":[[8,2],[1,9]]}\n{"key":"b","counts":[[1,2],[3]]}\n{"key":"c","counts":[[3,4],[5,1]],"plan":{"statistic":"score"}}\n';
    const batch = fakeShell({ input: tables });
    expect(await main(['batch', '-', '--seed', 's', '--quiet', '--allow-errors'], batch)).toBe(0);
    const { status, out, err } = await report(batch.written.out);
    expect({ status, err }).toEqual({ status: 0, err: '' });
    const rows = [...out.matchAll(/<th scope="row">([^<]*)<\/th>/g)].map(([, words]) => words);
    expect(rows).toEqual(['&lt;a&gt;', 'c', 'b']);
    expect(out).toContain('Tables that could not be used');
    expect((await report(out)).out).toBe(out);
    const replayed = fakeShell({ input: out });
    expect(await main(['replay', '-'], replayed)).toBe(0);
  });

  it('puts whole lines and what could not be used on one page', async () => {
    const failed =
      '{"key":"x","error":{"code":"c","message":"m","place":"p","hint":"h"}}\n{"part":"1/2","lines":1,"tables":2}\n';
    const { status } = await report(lines + failed);
    expect(status).toBe(1);
    const { out } = await report(lines + failed.split('\n')[0]!);
    expect(out.match(/<article/g)).toHaveLength(2);
    expect(out).toContain('<th scope="row">x</th>');
  });

  it('refuses what is no result, and says where', async () => {
    const compact = await report('{"key":"a","counts":[[8,2],[1,9]]}\n');
    expect(compact).toMatchObject({ status: 1, out: '' });
    expect(compact.err).toContain('this is no result');
    const tampered = await report(`${lines.trim().replaceAll('"total":', '"totle":')}\n`);
    expect(tampered).toMatchObject({ status: 1, out: '' });
    expect(tampered.err).toContain('standard input:1');
  });
});
