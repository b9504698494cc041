import type { Clamps } from '#shared/shop/clamps-schema';
import { MILLIMETRE } from '#shared/length/length';
import type { ClampClass } from '#shared/floor/model';
import { problemSentence, type GeneralProblem } from '#shared/words/problem-words';
import { problem, type Problem } from '#server/http/problem';

export type ClampChanges =
  | { ok: true; keep: ClampClass[]; add: ClampClass[]; remove: string[] }
  | { ok: false; problems: Problem[] };

/**
 * What turns the shop's clamps into those wanted, or why that cannot be: clamps that are on a piece now stay, so a class
 * in use keeps its length and at least as many. `inUse` counts clamps by the class's key.
 */
export function clampChanges(
  current: readonly ClampClass[],
  wanted: Clamps,
  inUse: ReadonlyMap<string, number>,
): ClampChanges {
  const problems: Problem[] = [];
  const refuse = (field: string, why: Extract<GeneralProblem, { code: 'CLAMPS_IN_USE' }>) =>
    problems.push(problem(why.code, problemSentence(why), field));
  const keys = new Set(current.map((each) => each.key));
  const keep: ClampClass[] = [];
  const fresh: ClampClass[] = [];
  wanted.forEach(({ key, length, count }, index) => {
    if (key === null) {
      const made = { key: freeKey(length, keys), length, count };
      keys.add(made.key);
      fresh.push(made);
      return;
    }
    const before = current.find((each) => each.key === key);
    if (!before) {
      const sentence = problemSentence({ code: 'NOT_FOUND' });
      problems.push(problem('NOT_FOUND', sentence, `clamps.${index}.key`));
      return;
    }
    const used = inUse.get(key) ?? 0;
    const inUseNow = { code: 'CLAMPS_IN_USE', count: used } as const;
    if (used > 0 && before.length !== length) {
      refuse(`clamps.${index}.length`, { ...inUseNow, change: 'LENGTH' });
    }
    if (count < used) refuse(`clamps.${index}.count`, { ...inUseNow, change: 'COUNT' });
    keep.push({ key, length, count });
  });
  const remove = current
    .map((each) => each.key)
    .filter((key) => !wanted.some((each) => each.key === key));
  for (const key of remove) {
    const used = inUse.get(key) ?? 0;
    const length = current.find((each) => each.key === key)?.length ?? 0n;
    if (used > 0) {
      refuse('clamps', {
        code: 'CLAMPS_IN_USE',
        count: used,
        change: 'REMOVAL',
        millimetres: wholeMillimetres(length),
      });
    }
  }
  return problems.length > 0 ? { ok: false, problems } : { ok: true, keep, add: fresh, remove };
}

function wholeMillimetres(length: bigint): string {
  return `${(length + MILLIMETRE / 2n) / MILLIMETRE}`;
}

/** A key that says the length in millimetres, such as c600; with a number behind it when that is taken. */
function freeKey(length: bigint, taken: ReadonlySet<string>): string {
  const key = `c${wholeMillimetres(length)}`;
  let number = 1;
  while (taken.has(number === 1 ? key : `${key}-${number}`)) number++;
  return number === 1 ? key : `${key}-${number}`;
}
