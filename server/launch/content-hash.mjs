import { createHash } from 'node:crypto';
import { readdir, readFile, stat } from 'node:fs/promises';
import path from 'node:path';
import { root } from './root.mjs';

/**
 * One hash over the names and contents of files and folders under the root. Names that are missing count as empty. Specs
 * are left out: no build contains them.
 */
export async function contentHash(names) {
  const hash = createHash('sha256');
  for (const name of names) {
    for (const file of (await filesOf(path.join(root, name))).sort()) {
      hash.update(`${path.relative(root, file)}\0`);
      hash.update(
        createHash('sha256')
          .update(await readFile(file))
          .digest(),
      );
    }
  }
  return hash.digest('hex');
}

async function filesOf(place) {
  const kind = await stat(place).catch(() => null);
  if (kind === null) return [];
  if (kind.isFile()) return [place];
  const entries = await readdir(place, { withFileTypes: true, recursive: true });
  return entries
    .filter((entry) => entry.isFile() && !entry.name.endsWith('.spec.ts'))
    .map((entry) => path.join(entry.parentPath ?? entry.path, entry.name));
}
