import { runOf } from '#shared/floor/progress';
import { MINUTE_MS, type Instant } from '#shared/time/instant';
import type { WaitStep, WorkStep } from '#shared/route/route';
import type { BatchPieces } from './batch-pieces';
import type { Link } from './model';

/**
 * What a work step on a piece comes after: the steps before it, and the waits between, on the pieces it is made of. It
 * goes back only as far as work that is all still free, because that has the earlier ones before it.
 */
export function linksBefore(of: BatchPieces, index: number, piece: number, now: Instant): Link[] {
  const { steps } = of.batch.route;
  const target = steps[index];
  if (!target) return [];
  const links: Link[] = [];
  let isNextWork = true;
  for (let i = index - 1; i >= 0; i--) {
    const before = steps[i];
    if (!before) continue;
    const related = of.relatedTo(before.scope, target.scope, piece);
    if (before.kind === 'WAIT') {
      for (const on of related) links.push(...waitLinks(of, before, on, isNextWork, now));
      continue;
    }
    isNextWork = false;
    for (const on of related) {
      const finishedAt = runOf(of.batch, before.key, on)?.finishedAt ?? null;
      if (finishedAt !== null && finishedAt <= now) continue;
      links.push({
        activity: of.id(before, on),
        minMinutes: 0,
        maxMinutes: null,
        wait: null,
      });
    }
    if (related.every((on) => of.state(before, on) === 'FREE')) break;
  }
  return links;
}

/** The waits after the last work of the route: they keep the batch from being ready. */
export function tailLinks(of: BatchPieces, now: Instant): Link[] {
  const { steps } = of.batch.route;
  const last = steps.findLastIndex((step) => step.kind === 'WORK');
  return steps
    .slice(last + 1)
    .flatMap((step) =>
      step.kind === 'WAIT'
        ? of.pieces(step).flatMap((piece) => waitLinks(of, step, piece, false, now))
        : [],
    );
}

/**
 * A wait on one piece, as links from each activity that it counts from. An override that cut it leaves no minimum; a
 * maximum that has run out already is a fact and binds nothing; only the next work is bound by one.
 */
function waitLinks(
  of: BatchPieces,
  wait: WaitStep,
  piece: number,
  isNextWork: boolean,
  now: Instant,
): Link[] {
  const from = sourceOf(of, wait);
  if (!from) return [];
  const isCut = (runOf(of.batch, wait.key, piece)?.cutAt ?? null) !== null;
  return of.relatedTo(from.scope, wait.scope, piece).flatMap((on): Link[] => {
    const finishedAt = runOf(of.batch, from.key, on)?.finishedAt ?? null;
    const isOver =
      isCut || (finishedAt !== null && finishedAt + wait.minMinutes * MINUTE_MS <= now);
    const isMissed =
      finishedAt !== null && finishedAt + (wait.maxMinutes ?? Infinity) * MINUTE_MS < now;
    const maxMinutes = isNextWork && !isMissed ? wait.maxMinutes : null;
    if (isOver && maxMinutes === null) return [];
    return [
      {
        activity: of.id(from, on),
        minMinutes: isOver ? 0 : wait.minMinutes,
        maxMinutes,
        wait: { step: wait.key, piece, hold: wait.hold },
      },
    ];
  });
}

function sourceOf(of: BatchPieces, wait: WaitStep): WorkStep | null {
  const from = of.batch.route.steps.find((step) => step.key === wait.after);
  return from?.kind === 'WORK' ? from : null;
}

/** The first step that can never be done as the route is written: it refers to what is not there, or comes later. */
export function brokenStep(of: BatchPieces): string | null {
  const { steps } = of.batch.route;
  const at = new Map(steps.map((step, index) => [step.key, { step, index }]));
  for (const [index, step] of steps.entries()) {
    if (step.kind === 'WAIT') {
      const from = at.get(step.after);
      if (from?.step.kind !== 'WORK' || from.index > index) return step.key;
      continue;
    }
    for (const take of step.takes) {
      const until = at.get(take.until);
      if (until?.step.kind !== 'WORK' || until.index < index) return step.key;
    }
  }
  return null;
}
