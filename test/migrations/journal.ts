/** One line of drizzle/migrations/meta/_journal.json. */
export interface JournalEntry {
  idx: number;
  /** Milliseconds since 1970; the migrator applies only what is later than the newest applied one. */
  when: number;
  /** The file's name without its ending. */
  tag: string;
}

/**
 * What keeps a journal from being applied whole and in order. The migrator skips an entry that is older than the newest
 * applied one without a word, which an empty database never shows.
 */
export function journalProblems(
  entries: readonly JournalEntry[],
  files: readonly string[],
): string[] {
  const problems = entries.flatMap((entry, index) => {
    const before = entries[index - 1];
    return [
      ...(entry.idx === index ? [] : [`${entry.tag} has the number ${entry.idx}, not ${index}`]),
      ...(before && entry.when <= before.when
        ? [`${entry.tag} is not later than ${before.tag}: generate it again`]
        : []),
      ...(files.includes(`${entry.tag}.sql`) ? [] : [`${entry.tag}.sql is missing`]),
    ];
  });
  const tags = new Set(entries.map((entry) => `${entry.tag}.sql`));
  const unknown = files.filter((file) => !tags.has(file));
  return [...problems, ...unknown.map((file) => `${file} is not in the journal`)];
}
