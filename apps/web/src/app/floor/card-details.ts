import type { NextAction } from '#shared/floor/card';
import type { FloorBatch, Hold } from '#shared/floor/model';
import { piecesOf } from '#shared/floor/pieces';
import type { Refusal } from '#shared/floor/refusal';
import type { WorkStep } from '#shared/route/route';
import { MINUTE_MS, type Instant } from '#shared/time/instant';
import { clockWords, durationWords } from '#shared/time/words';
import { actionWords } from '#shared/words/card-words';

/** Pieces on which the same may be done next. */
export interface ActionGroup {
  readonly kind: NextAction['kind'];
  readonly step: WorkStep;
  readonly pieces: readonly number[];
  /** Whether these are all the pieces that the batch has for the step. */
  readonly isAll: boolean;
  /** When it comes too late, for the first of them. */
  readonly latestAt: Instant | null;
}

/** What may be done, the most pressing first, with the same work on several pieces together. */
export function groupActions(
  batch: FloorBatch,
  actions: readonly NextAction[],
): readonly ActionGroup[] {
  const groups = new Map<string, ActionGroup>();
  for (const { kind, step, piece, latestAt } of actions) {
    const key = `${kind}/${step.key}`;
    const known = groups.get(key);
    const pieces = [...(known?.pieces ?? []), piece].sort((a, b) => a - b);
    const isAll = pieces.length === piecesOf(batch, step.scope).length;
    groups.set(key, { kind, step, pieces, isAll, latestAt: known ? known.latestAt : latestAt });
  }
  return [...groups.values()];
}

/** The button for a group: with the piece where there is one, without where the menu asks for it. */
export function groupWords(group: ActionGroup, zone: string, now: Instant): string {
  const { kind, step, latestAt } = group;
  const [piece = 0] = group.pieces;
  // A maximum that was missed cannot be kept any more; the card says since when.
  const inTime = latestAt !== null && latestAt > now ? latestAt : null;
  const on = group.pieces.length === 1 ? step : { ...step, scope: 'BATCH' as const };
  return actionWords({ kind, step: on, piece, latestAt: inTime }, zone, now);
}

/** From when on a maximum that runs out is drawn as urgent, in minutes. */
export const URGENT_MINUTES = 10;

export interface Limit {
  readonly words: string;
  readonly isUrgent: boolean;
}

/** "wipe by 15:40, 10 min left", or since when it is too late. Null when the hold limits nothing. */
export function limitOf(batch: FloorBatch, hold: Hold, zone: string, now: Instant): Limit | null {
  if (hold.latestAt === null) return null;
  const { steps } = batch.route;
  const at = steps.findIndex((step) => step.key === hold.step);
  const next = steps.slice(at + 1).find((step) => step.kind === 'WORK');
  const verb = next?.kind === 'WORK' ? next.verb : 'go on';
  const clock = clockWords(zone, now, hold.latestAt);
  const left = hold.latestAt - now;
  if (left <= 0) return { words: `too late to ${verb} since ${clock}`, isUrgent: true };
  const minutes = Math.ceil(left / MINUTE_MS);
  if (minutes > URGENT_MINUTES) return { words: `${verb} by ${clock}`, isUrgent: false };
  return { words: `${verb} by ${clock}, ${durationWords(minutes)} left`, isUrgent: true };
}

/** How much of a hold has burned down, 0 to 100. */
export function burned(hold: Pick<Hold, 'since' | 'clearAt'>, now: Instant): number {
  const whole = hold.clearAt - hold.since;
  if (whole <= 0) return 100;
  return Math.min(100, Math.max(0, Math.round((100 * (now - hold.since)) / whole)));
}

/** "glue bench full until about 15:10 (CT-026)": what keeps a step from starting, short enough for a card; null for other reasons. */
export function fullWords(refusal: Refusal, zone: string, now: Instant): string | null {
  if (refusal.code !== 'STATION_FULL' && refusal.code !== 'CLAMPS_FULL') return null;
  const what = refusal.code === 'STATION_FULL' ? `${refusal.station} full` : 'not enough clamps';
  const { holder } = refusal;
  if (holder === null) return what;
  if (holder.freeAt === null) return `${what}: ${holder.batchCode} has it`;
  return `${what} until about ${clockWords(zone, now, holder.freeAt)} (${holder.batchCode})`;
}
