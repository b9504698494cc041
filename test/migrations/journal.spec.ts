import { createHash } from 'node:crypto';
import { readdirSync, readFileSync } from 'node:fs';
import path from 'node:path';
import pg from 'pg';
import { describe, expect, it } from 'vitest';
import { freshDatabase, setUp } from '../database';
import { repository } from '../server';
import { journalProblems, type JournalEntry } from './journal';

const folder = path.join(repository, 'drizzle/migrations');
const { entries } = JSON.parse(readFileSync(path.join(folder, 'meta/_journal.json'), 'utf8')) as {
  entries: JournalEntry[];
};

describe('the journal of migrations', () => {
  it('is in order and names every file once', () => {
    const files = readdirSync(folder).filter((name) => name.endsWith('.sql'));
    expect(journalProblems(entries, files)).toEqual([]);
  });

  it.each<[string, JournalEntry[], string[]]>([
    ['a gap', [entry(0, 10, 'a'), entry(2, 20, 'b')], ['a.sql', 'b.sql']],
    ['an older one after a newer', [entry(0, 20, 'a'), entry(1, 10, 'b')], ['a.sql', 'b.sql']],
    ['two of the same moment', [entry(0, 10, 'a'), entry(1, 10, 'b')], ['a.sql', 'b.sql']],
    ['a missing file', [entry(0, 10, 'a')], []],
    ['a file that nobody applies', [entry(0, 10, 'a')], ['a.sql', 'b.sql']],
  ])('refuses %s', (_, bad, files) => {
    expect(journalProblems(bad, files)).not.toEqual([]);
  });
});

describe('migrating an empty database', () => {
  it('applies every migration as it is journalled, and nothing the second time', async () => {
    const database = await freshDatabase();
    try {
      await setUp(database.adminUrl);
      const first = await applied(database.adminUrl);
      const hashes = entries.map(({ tag }) =>
        createHash('sha256')
          .update(readFileSync(path.join(folder, `${tag}.sql`)))
          .digest('hex'),
      );
      expect(first).toEqual(hashes);
      await setUp(database.adminUrl);
      expect(await applied(database.adminUrl)).toEqual(first);
    } finally {
      await database.drop();
    }
  });
});

function entry(idx: number, when: number, tag: string): JournalEntry {
  return { idx, when, tag };
}

async function applied(adminUrl: string): Promise<string[]> {
  const client = new pg.Client({ connectionString: adminUrl });
  await client.connect();
  try {
    const { rows } = await client.query<{ hash: string }>(
      'select hash from drizzle.__drizzle_migrations order by created_at',
    );
    return rows.map((row) => row.hash);
  } finally {
    await client.end();
  }
}
