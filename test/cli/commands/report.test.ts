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

  it('refuses what is no whole result, and says where', async () => {
    const compact = await report('{"key":"a","counts":[[8,2],[1,9]]}\n');
    expect(compact).toMatchObject({ status: 1, out: '' });
    expect(compact.err).toContain('--full');
    const tampered = await report(`${lines.trim().replaceAll('"total":', '"totle":')}\n`);
    expect(tampered).toMatchObject({ status: 1, out: '' });
    expect(tampered.err).toContain('standard input:1');
  });
});
