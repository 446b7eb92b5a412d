// What `keepsum help TOPIC` explains: entries under a name, each with its words, definition and source.

export interface TopicEntry {
  readonly name: string;
  /** Sentences or "label: text" lines, in reading order. */
  readonly lines: readonly string[];
}

export interface Topic {
  readonly name: string;
  /** For the list of topics. */
  readonly summary: string;
  readonly opening: string;
  readonly entries: readonly TopicEntry[];
}
