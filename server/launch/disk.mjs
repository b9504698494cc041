import { statfs } from 'node:fs/promises';
import { Stop } from './stop.mjs';

const MEGABYTE = 1024 * 1024;

/** Stops before a step that would fill the disk: half-written files are worse than none. */
export async function needFree(folder, megabytes, what) {
  const { bavail, bsize } = await statfs(folder);
  const free = Math.floor((bavail * bsize) / MEGABYTE);
  if (free >= megabytes) return;
  throw new Stop(
    `The disk that holds ${folder} has ${free} MB free and ${what} needs ${megabytes} MB: free some space and start again; no data was harmed.`,
  );
}

/** Whether an error, from here or in a child's words, says that the disk is full. */
export function saysDiskFull(error) {
  return (
    ['ENOSPC', 'EDQUOT'].includes(error?.code) ||
    /ENOSPC|No space left/.test(String(error?.message))
  );
}
