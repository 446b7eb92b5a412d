// What one saved record is: a whole result, a line of a batch, or nothing that a report is made of.
import type { SavedLine } from '../../../batch/lines-page.js';
import { dataProblem } from '../../../problem/problem.js';
import type { Result } from '../../../result/result.js';

/**
 * Only what keeps a published shape; undefined for the line that ends a part of a batch.
 * @throws Problem (data) `no-result`
 */
export async function savedLine(record: unknown, place: string): Promise<SavedLine | undefined> {
  const { resultDeclaration } = await import('../../../result/declaration.js');
  const whole = resultDeclaration.safeParse(record);
  if (whole.success) return { kind: 'whole', line: whole.data };
  if (typeof record === 'object' && record !== null && !('schema' in record)) {
    const batch = await import('../../../batch/declaration.js');
    const compact = batch.compactDeclaration.safeParse(record);
    if (compact.success) return { kind: 'compact', line: compact.data };
    const failed = batch.errorDeclaration.safeParse(record);
    if (failed.success) return { kind: 'error', line: failed.data };
    if (batch.partEndDeclaration.safeParse(record).success) return undefined;
  }
  const [issue] = whole.error.issues;
  throw dataProblem({
    code: 'no-result',
    message: `this is no result: ${issue!.path.join('.') || 'the whole'}: ${issue!.message}`,
    place,
    hint: 'give what --format json or keepsum batch wrote, unchanged',
  });
}

/** For what only whole results hold. @throws Problem (data) `no-whole-result` */
export function wholeOf(saved: SavedLine, place: string): Result {
  if (saved.kind === 'whole') return saved.line;
  throw dataProblem({
    code: 'no-whole-result',
    message:
      saved.kind === 'compact'
        ? 'this is a compact line of a batch, which lacks what is asked for'
        : `this table could not be used: ${saved.line.error.message}`,
    place,
    hint:
      saved.kind === 'compact'
        ? 'run keepsum batch --full, or leave --format and --citations out: html shows compact lines as a table'
        : 'take its line out, or leave --format and --citations out: html shows it apart',
  });
}
