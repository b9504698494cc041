import { readFile } from 'node:fs/promises';
import path from 'node:path';
import { root } from '../../server/launch/root.mjs';
import { admits } from './node-range.mjs';

/** The oldest Node that the product promises to run on. */
const OLDEST_NODE = '20.19.0';

/** Packages that declare a newer Node and are known to work all the same, with the reason. */
const ALLOWED = new Map([]);

/** Every package in the lock file admits the promised Node: npm itself only warns. */
export async function lock() {
  const { packages } = JSON.parse(await readFile(path.join(root, 'package-lock.json'), 'utf8'));
  const failures = refused(packages);
  return {
    passed: failures.length === 0 ? 1 : 0,
    failed: failures.length === 0 ? 0 : 1,
    output: failures.join('\n'),
  };
}

/** One line for each package that does not admit the promised Node and is not allowed to. */
export function refused(packages, allowed = ALLOWED) {
  const lines = [];
  for (const [place, { version, engines }] of Object.entries(packages)) {
    const range = engines?.node;
    if (!range || admits(range, OLDEST_NODE)) continue;
    const name = place.slice(place.lastIndexOf('node_modules/') + 'node_modules/'.length);
    if (allowed.has(name)) continue;
    lines.push(
      `${place} ${version} wants Node ${range}, which does not admit ${OLDEST_NODE}: pin an older one, or allow it in test/gates/lock.mjs with the reason`,
    );
  }
  return lines;
}
