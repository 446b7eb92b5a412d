// The headline p-values where not both margins are fixed; nothing where they are.
import type { Choices, Roles, Statistic } from '../statistic/contract.js';
import type { DesignKind } from '../plan/design.js';
import type { Plan } from '../plan/plan.js';
import type { PValueEntry, Question } from '../pvalue/contract.js';
import type { LiveTable } from '../table/live-table.js';
import type { Table } from '../table/table.js';
import { bootstrapEntries } from './bootstrap-entries.js';
import { multinomialEntries, twoGroupsEntries } from './unconditional-entries.js';

export interface DesignParts {
  readonly kind: Exclude<DesignKind, 'null-value'>;
  readonly table: Table;
  readonly live: LiveTable;
  readonly statistic: Statistic;
  readonly roles: Roles;
  readonly choices: Choices;
  readonly plan: Plan;
  readonly onProgress?: (draws: number, most: number) => void;
}

export async function designAnswer(questions: readonly Question[], parts: DesignParts): Promise<PValueEntry[]> {
  switch (parts.kind) {
    case 'conditional':
      return [];
    case 'two-groups':
      return twoGroupsEntries(questions, parts.table, parts.plan);
    case 'multinomial':
      return multinomialEntries(questions, parts.table, parts.plan);
    case 'bootstrap':
      return bootstrapEntries(questions, parts);
  }
}
