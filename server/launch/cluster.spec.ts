import { describe, expect, it } from 'vitest';
import { setUpProblem } from './cluster.mjs';

describe("PostgreSQL's words", () => {
  it.each([
    'initdb: error: could not write file "x": No space left on device',
    // What it says when only part of a page could still be written.
    'FATAL:  could not extend file "base/1/2691": wrote only 4096 of 8192 bytes at block 18\nHINT:  Check free disk space.',
    'PANIC:  could not write to file "pg_wal/xlogtemp.71": Disk quota exceeded',
  ])('about a full disk become a sentence: %s', (output) => {
    expect(setUpProblem(output, '/data')?.message).toMatch(/^The disk that holds \/data is full/);
  });

  it('about data of another version become a sentence', () => {
    const output =
      'FATAL:  database files are incompatible with server\nDETAIL:  The data directory was initialized by PostgreSQL version 14, which is not compatible with this version 15.18.';
    expect(setUpProblem(output, '/data')?.message).toMatch(/another version/);
  });

  it('about anything else are shown as they are', () => {
    expect(setUpProblem('FATAL:  could not load library', '/data')).toBeNull();
  });
});
