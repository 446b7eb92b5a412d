// The sources of the methods used in one result: those that its methods paragraph cites, looked up in the one table of sources.
import { asBibtex, asText, sources, type Source } from './sources/source.js';
import { version } from './version.js';

export type CitationForm = 'text' | 'bibtex';

export interface Mention {
  /** The last author named, with "et al." where it is said. */
  readonly name: string;
  readonly year: string;
}

/** Every "Author year" and "Author (year)" of a paragraph. What stands in double quotes is a label or a seed. */
export function mentionsIn(paragraph: string): Mention[] {
  const prose = paragraph.replace(/"[^"]*"/g, '""');
  const pattern = /(\p{Lu}[\p{L}'-]*(?: et al\.)?) \(?((?:1[89]|20)\d\d)((?:, (?:1[89]|20)\d\d)*)\b/gu;
  return [...prose.matchAll(pattern)].flatMap(([, name, first, more]) =>
    [first!, ...more!.split(', ').slice(1)].map((year) => ({ name: name!, year })),
  );
}

/** The source that is meant; undefined where the table has none. */
export function sourceOf({ name, year }: Mention, paired: boolean): Source | undefined {
  const meant = sources.filter((source) => {
    if (source.year !== year) return false;
    const { cited } = source;
    return cited === name || cited.endsWith(` ${name}`) || cited.replace(' & ', '-') === name;
  });
  return meant.find(({ ofPairs }) => ofPairs === paired) ?? meant[0];
}

/** Whatever has a methods paragraph; a plan tells pairs apart, whose sources can share a name and year with others. */
export interface Cited {
  readonly methods: string;
  readonly plan?: object;
}

const isOfPairs = (plan: object | undefined): boolean => plan !== undefined && 'paired' in plan && plan.paired === true;

/** In alphabetical order, each once. */
export function sourcesUsed(...records: readonly Cited[]): Source[] {
  const used = new Set(
    records.flatMap(({ methods, plan }) => mentionsIn(methods).map((mention) => sourceOf(mention, isOfPairs(plan)))),
  );
  return sources.filter((source) => used.has(source));
}

/** One document: a reference a line, or BibTeX entries; the program itself comes last. */
export function citationsOf(records: readonly Cited[], form: CitationForm): string {
  const used = sourcesUsed(...records);
  if (form === 'text') return `${[...used.map(asText), `keepsum ${version} (software).`].join('\n')}\n`;
  const software = `@misc{keepsum,\n  title = {{keepsum}},\n  note = {software, version ${version}}\n}`;
  return `${[...used.map(asBibtex), software].join('\n\n')}\n`;
}
