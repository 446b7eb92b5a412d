// Several outcomes of the same subjects against one grouping, as counts: one for each group and outcome profile.

export interface JointOutcome {
  readonly label: string;
  readonly levels: readonly string[];
}

export interface JointCounts {
  readonly groups: readonly string[];
  readonly outcomes: readonly JointOutcome[];
  /** For each profile, the level of every outcome. */
  readonly profiles: readonly (readonly number[])[];
  /** counts[group][profile]. */
  readonly counts: readonly (readonly number[])[];
}
