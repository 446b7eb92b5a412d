// Counts raw records by a group and several outcomes at once: one count for each group and outcome profile, so that memory follows
// the profiles that occur and not the records.
import { dataProblem, usageProblem, type Problem } from '../problem/problem.js';
import { notUtf8 } from './file-text.js';
import type { JointCounts } from './joint-counts.js';
import { Levels, fresh, missing, mostLevels } from './levels.js';
import { columnIndex, sameColumn, type RecordColumns } from './record-columns.js';
import { tooManyLevels } from './record-problems.js';
import { RecordTally, type Found, type MissingRule } from './record-tally.js';

export interface JointNames {
  /** Header name or number of the column of groups. */
  readonly groups: string;
  /** Of each outcome, at least one. */
  readonly outcomes: readonly string[];
  readonly count?: string | undefined;
}

interface Further {
  readonly field: number;
  readonly name: string;
  readonly levels: Levels;
}

export class JointTally extends RecordTally {
  /** Records left out because an outcome beyond the first was missing. */
  incomplete = 0;
  private further: readonly Further[] = [];
  private readonly profiles = new Map<string, { readonly levels: number[]; readonly counts: number[] }>();

  constructor(
    private readonly wanted: JointNames,
    rule: MissingRule,
    sourceName: string,
  ) {
    super(
      {
        rows: wanted.groups,
        columns: wanted.outcomes[0]!,
        count: wanted.count,
        sideOptions: ['--groups', '--outcomes'],
      },
      rule,
      sourceName,
    );
  }

  /** What was counted, groups and levels in their order of appearance. */
  joint(): JointCounts {
    const found = [...this.profiles.values()];
    return {
      groups: [...this.rows.labels],
      outcomes: [
        { label: this.used!.columnsName, levels: [...this.columns.labels] },
        ...this.further.map(({ name, levels }) => ({ label: name, levels: [...levels.labels] })),
      ],
      profiles: found.map(({ levels }) => levels),
      counts: this.rows.labels.map((_, group) => found.map(({ counts }) => counts[group] ?? 0)),
    };
  }

  protected override findMore(header: readonly string[], used: RecordColumns): void {
    const titles = header.map((name) => name.trim());
    const taken = new Map([used.rows, used.columns, used.count].map((index) => [index, titles[index] ?? '']));
    this.further = this.wanted.outcomes.slice(1).map((name) => {
      const field = columnIndex(titles, name, '--outcomes', this.sourceName);
      if (taken.has(field))
        throw sameColumn('--outcomes', field === used.rows ? '--groups' : '--outcomes', titles[field]!);
      taken.set(field, titles[field]!);
      return { field, name: titles[field] === '' ? `column ${field + 1}` : titles[field]!, levels: new Levels() };
    });
  }

  protected override count(record: readonly string[], found: Found, count: number): void {
    const { row, column } = found;
    const levels = [column];
    for (const { field, levels: own, name } of this.further) {
      const text = record[field]!;
      let level = own.find(text);
      if (level === missing) {
        if (this.rule === 'fail') return this.fail(field, missingOutcome);
        if (this.rule === 'drop') {
          this.incomplete += count;
          return;
        }
        level = own.addMissing();
      } else if (level === fresh) {
        if (text.includes('\ufffd')) return this.fail(field, notUtf8);
        if (own.labels.length === mostLevels) return this.fail(field, (place) => tooManyLevels(name, place));
        level = own.add(text);
      }
      levels.push(level);
    }
    const key = levels.join();
    let profile = this.profiles.get(key);
    if (profile === undefined) {
      if (this.profiles.size === mostProfiles) return this.fail(this.used!.columns, tooManyProfiles);
      this.profiles.set(key, (profile = { levels, counts: [] }));
    }
    profile.counts[row] = (profile.counts[row] ?? 0) + count;
    super.count(record, found, count);
  }
}

/** Beyond this many, a table of groups by profiles is no longer cheap to draw. */
const mostProfiles = 100_000;

const tooManyProfiles = (place: string): Problem =>
  usageProblem({
    code: 'too-many-profiles',
    message: `more than ${mostProfiles} different combinations of outcomes`,
    place,
    hint: 'name fewer outcomes, or ones with fewer levels',
  });

const missingOutcome = (place: string): Problem =>
  dataProblem({
    code: 'missing-outcome',
    message: 'the value of an outcome is missing',
    place,
    hint: 'add --missing drop to use complete records only, or --missing level to make missing a level of its own',
  });
