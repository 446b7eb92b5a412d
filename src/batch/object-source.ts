// Tables that a program hands over one by one, in the chunks that a batch works on.
import type { Chunk, UnitSource } from './chunk.js';

/** @param tables objects as lines of a batch would hold them; read no further than they are worked on. */
export function objectSource(tables: Iterable<unknown> | AsyncIterable<unknown>): UnitSource {
  const iterator = Symbol.asyncIterator in tables ? tables[Symbol.asyncIterator]() : tables[Symbol.iterator]();
  let first = 1;
  let pending: Promise<IteratorResult<unknown>> | undefined;
  let ended = false;
  return {
    async next(most): Promise<Chunk | null> {
      const objects: unknown[] = [];
      while (!ended && objects.length < most) {
        pending ??= Promise.resolve().then(() => iterator.next());
        // The first one is waited for; further ones are taken along if they are there. A failure waits for its turn.
        if (objects.length > 0 && !(await isThere(pending))) break;
        const { done, value } = await pending;
        pending = undefined;
        if (done) ended = true;
        else objects.push(value);
      }
      if (objects.length === 0) return null;
      const chunk: Chunk = { kind: 'objects', objects, first };
      first += objects.length;
      return chunk;
    },
  };
}

const isThere = (promise: Promise<unknown>): Promise<boolean> =>
  Promise.race([
    promise.then(
      () => true,
      () => false,
    ),
    new Promise<boolean>((resolve) => setImmediate(() => resolve(false))),
  ]);
