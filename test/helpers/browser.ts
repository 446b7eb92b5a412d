// A real browser for tests of pages: one without a window, spoken to through a pipe by its debugging protocol.
import { spawn, spawnSync } from 'node:child_process';
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { Readable, Writable } from 'node:stream';

const programs = ['chromium', 'chromium-browser', 'google-chrome'];

/** What starts it; undefined where none is installed. */
export const browserProgram: string | undefined = programs.find(
  (program) => spawnSync(program, ['--version'], { stdio: 'ignore' }).status === 0,
);

interface Answer {
  readonly id: number;
  readonly sessionId?: string;
  readonly result?: unknown;
  readonly error?: { readonly message: string };
}

export interface View {
  /** Pixels. */
  readonly width: number;
  readonly scheme?: 'light' | 'dark';
  readonly media?: 'screen' | 'print';
}

export interface Browser {
  /** Lays a document out in a view so many pixels wide; nothing of it is fetched. */
  show(html: string, view: View): Promise<void>;
  /** What a JavaScript expression gives there, awaited, as JSON has it. */
  ask<T>(expression: string): Promise<T>;
  close(): Promise<void>;
}

/** @param program from `browserProgram` */
export async function startBrowser(program: string): Promise<Browser> {
  const home = mkdtempSync(join(tmpdir(), 'keepsum-browser-'));
  // No sandbox: tests may run as root, where it refuses to start, and show only pages of our own.
  const flags = ['--headless=new', '--no-sandbox', '--disable-gpu', '--disable-dev-shm-usage', '--no-first-run'];
  const child = spawn(program, [...flags, '--remote-debugging-pipe', `--user-data-dir=${home}`, 'about:blank'], {
    stdio: ['ignore', 'ignore', 'ignore', 'pipe', 'pipe'],
  });
  const ended = new Promise<void>((done) => child.on('exit', () => done()));
  const send = protocol(child.stdio[3] as Writable, child.stdio[4] as Readable);
  const { targetId } = await send<{ targetId: string }>('Target.createTarget', { url: 'about:blank' });
  const { sessionId } = await send<{ sessionId: string }>('Target.attachToTarget', { targetId, flatten: true });
  const page = <T>(method: string, parameters: object = {}): Promise<T> => send<T>(method, parameters, sessionId);
  const { frameTree } = await page<{ frameTree: { frame: { id: string } } }>('Page.getFrameTree');
  return {
    async show(html, { width, scheme = 'light', media = 'screen' }) {
      await page('Emulation.setDeviceMetricsOverride', { width, height: 900, deviceScaleFactor: 1, mobile: true });
      await page('Emulation.setEmulatedMedia', { media, features: [{ name: 'prefers-color-scheme', value: scheme }] });
      await page('Page.setDocumentContent', { frameId: frameTree.frame.id, html });
    },
    async ask<T>(expression: string) {
      const { result, exceptionDetails } = await page<{ result: { value: T }; exceptionDetails?: unknown }>(
        'Runtime.evaluate',
        { expression, awaitPromise: true, returnByValue: true },
      );
      if (exceptionDetails !== undefined) throw new Error(JSON.stringify(exceptionDetails));
      return result.value;
    },
    async close() {
      await send('Browser.close').catch(() => child.kill());
      await ended;
      rmSync(home, { recursive: true, force: true, maxRetries: 5 });
    },
  };
}

type Send = <T>(method: string, parameters?: object, sessionId?: string) => Promise<T>;

/** Messages are JSON, each ended by a zero byte. */
function protocol(to: Writable, from: Readable): Send {
  const waiting = new Map<number, { done: (result: unknown) => void; fail: (error: Error) => void }>();
  let last = 0;
  let rest = '';
  from.setEncoding('utf8').on('data', (piece: string) => {
    const messages = (rest + piece).split('\0');
    rest = messages.pop()!;
    for (const { id, result, error } of messages.map((text) => JSON.parse(text) as Answer)) {
      const asker = waiting.get(id);
      waiting.delete(id);
      if (error === undefined) asker?.done(result);
      else asker?.fail(new Error(error.message));
    }
  });
  from.on('close', () => waiting.forEach(({ fail }) => fail(new Error('the browser ended'))));
  return <T>(method: string, parameters: object = {}, sessionId?: string) =>
    new Promise<T>((done, fail) => {
      const id = ++last;
      waiting.set(id, { done: done as (result: unknown) => void, fail });
      to.write(
        `${JSON.stringify({ id, method, params: parameters, ...(sessionId === undefined ? {} : { sessionId }) })}\0`,
      );
    });
}
