// The one document that goes out: the report in its format, its one line, or the sources of what was used.
import { usageProblem, type Problem } from '../../problem/problem.js';
import { render, type ReportFormat } from '../../report/formats.js';
import type { CitationForm, Cited } from '../../result/citations.js';
import type { Result } from '../../result/result.js';
import type { Shell } from '../shell.js';
import { lookFor, type LookValues } from './look.js';

export interface DocumentValues extends LookValues {
  readonly format?: ReportFormat;
  readonly brief?: true;
  readonly citations?: CitationForm;
}

interface DocumentWishes {
  readonly format?: string;
  readonly brief?: true;
  readonly citations?: CitationForm;
}

/** One document at a time. @throws Problem (usage) `two-documents`. */
export function checkDocument({ format, brief, citations }: DocumentWishes): void {
  if (brief && citations !== undefined) throw twoDocuments('--brief', '--citations');
  if (citations !== undefined && format !== undefined) throw twoDocuments('--citations', '--format');
  if (brief && format !== undefined && format !== 'text') throw twoDocuments('--brief', `--format ${format}`);
}

export async function documentOf(result: Result, values: DocumentValues, shell: Shell): Promise<string> {
  const citations = await citationsIn([result], values);
  if (citations !== undefined) return citations;
  if (values.brief) return (await import('../../report/brief.js')).briefLine(result);
  if (values.format === 'html') return (await import('../../report/html/report.js')).htmlReport([result]);
  return render(result, values.format ?? 'text', await lookFor(values, shell));
}

/** The sources of what was used, where they are asked for. */
export async function citationsIn(
  records: readonly Cited[],
  { citations }: Pick<DocumentWishes, 'citations'>,
): Promise<string | undefined> {
  return citations === undefined
    ? undefined
    : (await import('../../result/citations.js')).citationsOf(records, citations);
}

const twoDocuments = (one: string, other: string): Problem =>
  usageProblem({
    code: 'two-documents',
    message: `${one} and ${other} ask for two documents`,
    hint: `give one of them; a second run with the same seed gives the other`,
  });
