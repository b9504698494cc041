import { execFileSync } from 'node:child_process';
import { readFileSync, statSync } from 'node:fs';
import path from 'node:path';
import { repository } from '../server';
import type { RepositoryFile } from './rule';

const TEXT =
  /\.(ts|mjs|js|json|html|scss|css|graphql|md|sql|svg|yml|yaml|webmanifest|npmrc|gitignore|prettierignore)$/;

/** Every file that is committed or would be, with the text of those that have one. */
export function repositoryFiles(): RepositoryFile[] {
  const args = ['ls-files', '-z', '--cached', '--others', '--exclude-standard'];
  const names = execFileSync('git', args, { cwd: repository, encoding: 'utf8' }).split('\0');
  return names.filter(Boolean).flatMap((name) => {
    const file = path.join(repository, name);
    const kind = statSync(file, { throwIfNoEntry: false });
    // Deleted in the work tree, or a folder of its own.
    if (!kind?.isFile()) return [];
    const isText = TEXT.test(name) || name === '.ci/run';
    return [{ path: name, text: isText ? readFileSync(file, 'utf8') : '' }];
  });
}
