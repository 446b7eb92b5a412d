// One published source, and the two ways to write it: a line of a reference list, and an entry for BibTeX.
import { sourcesOfMethods } from './of-methods.js';
import { sourcesOfTests } from './of-tests.js';

export interface Source {
  /** As cited: "Freeman & Halton". */
  readonly cited: string;
  readonly year: string;
  /** Cited alike in two kinds of result; this one belongs to pairs. */
  readonly ofPairs: boolean;
  /** "Freeman, G. H." and so on. */
  readonly authors: readonly string[];
  readonly title: string;
  readonly journal?: string;
  readonly publisher?: string;
  readonly volume?: string;
  readonly number?: string;
  readonly pages?: string;
}

/** Every source there is, by year and name. */
export const sources: readonly Source[] = `${sourcesOfTests}${sourcesOfMethods}`
  .split('\n')
  .filter((line) => line !== '')
  .map(read)
  .sort((a, b) => `${a.authors[0]!} ${a.year}`.localeCompare(`${b.authors[0]!} ${b.year}`, 'en'));

function read(line: string): Source {
  const [as, authors, title, where, volume, number, pages] = line.split('|').map((part) => part.trim());
  const [, cited, year, pairs] = /^(.*) (\d{4})( \(pairs\))?$/.exec(as!)!;
  const part = (name: string, value: string | undefined): object => (value ? { [name]: value } : {});
  return {
    cited: cited!,
    year: year!,
    ofPairs: pairs !== undefined,
    authors: authors!.split(' and '),
    title: title!,
    ...(where!.startsWith('book: ') ? { publisher: where!.slice(6) } : { journal: where! }),
    ...part('volume', volume),
    ...part('number', number),
    ...part('pages', pages),
  };
}

/** "Freeman, G. H., Halton, J. H. (1951). Note on ... Biometrika 38(1/2), 141-149." */
export function asText({ authors, year, title, journal, publisher, volume, number, pages }: Source): string {
  const issue = number === undefined ? '' : `(${number})`;
  const place = publisher ?? `${journal!} ${volume ?? ''}${issue}${pages === undefined ? '' : `, ${pages}`}`;
  return `${authors.join(', ')} (${year}). ${title}. ${place}.`;
}

/** Names the entry: freeman-halton-1951. */
export const keyOf = ({ cited, year, ofPairs }: Source): string =>
  `${cited.toLowerCase().replace(/[^a-z]+/g, '-')}-${year}${ofPairs ? '-pairs' : ''}`.replace(/-+/g, '-');

/** A title is held in braces twice, so that no style changes its capitals. */
export function asBibtex(source: Source): string {
  const { authors, year, title, journal, publisher, volume, number, pages } = source;
  const fields = [
    ['author', authors.join(' and ')],
    ['title', `{${title}}`],
    ['journal', journal],
    ['publisher', publisher],
    ['year', year],
    ['volume', volume],
    ['number', number],
    ['pages', pages?.replace(/^(\d+)-(\d+)$/, '$1--$2')],
  ].filter((pair): pair is [string, string] => pair[1] !== undefined);
  const body = fields.map(([name, value]) => `  ${name} = {${value.replace(/&/g, '\\&')}}`).join(',\n');
  return `@${journal === undefined ? 'book' : 'article'}{${keyOf(source)},\n${body}\n}`;
}
