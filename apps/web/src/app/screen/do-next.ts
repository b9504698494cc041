import { cardOf, type NextAction } from '#shared/floor/card';
import { piecesOf } from '#shared/floor/pieces';
import type { WorkStep } from '#shared/route/route';
import { MINUTE_MS, type Instant } from '#shared/time/instant';
import { clockWords } from '#shared/time/words';
import { piecesName } from '#shared/words/command-words';
import type { BoardBatch } from '../floor/floor-view';

/** A maximum that runs out within so many minutes goes before everything else. */
export const PRESSING_MINUTES = 120;
/** Steps of one batch that are listed at most; more are done one after the other anyway. */
const STEPS_EACH = 2;
/** Pieces that are named one by one at most. */
const MOST_NAMED = 3;

export type Pressure = 'over' | 'pressing' | 'now' | 'later';

/** One thing to do: who, what, on what, and when. */
export interface DoNextRow {
  readonly id: string;
  readonly batch: BoardBatch;
  /** "Wipe CT-014", "Glue CT-026 panel 2" */
  readonly what: string;
  readonly step: WorkStep;
  /** Member ids of whoever it is given to. */
  readonly people: readonly string[];
  /** "now", "14:20", "by 15:40", "was due by 13:00" */
  readonly when: string;
  readonly pressure: Pressure;
}

interface Candidate {
  readonly batch: BoardBatch;
  readonly step: WorkStep;
  readonly pieces: readonly number[];
  readonly startAt: Instant;
  readonly latestAt: Instant | null;
  readonly people: readonly string[];
}

/**
 * What to start next: what a maximum presses on first, then in the plan's order, which is the forecast's next start of
 * each batch. Work under way is not in it: whoever does it knows.
 */
export function doNext(batches: readonly BoardBatch[], zone: string, now: Instant): DoNextRow[] {
  return batches
    .flatMap((batch) => candidatesOf(batch, now))
    .sort((a, b) => compare(a, b, now))
    .map((candidate) => toRow(candidate, zone, now));
}

/** The people at work now, with the codes of what they work on: "OL CT-029". By member id. */
export function atWork(
  batches: readonly BoardBatch[],
  now: Instant,
): { memberId: string; codes: string[] }[] {
  const codes = new Map<string, string[]>();
  for (const { floor } of batches) {
    const card = cardOf(floor, now);
    if (card.shelf !== 'WORKING') continue;
    for (const memberId of card.people) {
      codes.set(memberId, [...(codes.get(memberId) ?? []), floor.code]);
    }
  }
  return [...codes].map(([memberId, list]) => ({ memberId, codes: list.sort() }));
}

function candidatesOf(batch: BoardBatch, now: Instant): Candidate[] {
  const card = cardOf(batch.floor, now);
  const people = card.shelf === 'WORKING' ? [] : card.people;
  const planned = plannedStart(batch);
  const startable = groupByStep(card.actions);
  if (startable.length > 0) {
    return startable.slice(0, STEPS_EACH).map((group, index) => ({
      ...group,
      batch,
      people,
      // The plan's next start is that of the first; what may follow it comes no earlier.
      startAt: Math.max(now, planned ?? (card.place === 'QUEUED' ? Infinity : now)) + index,
    }));
  }
  if (card.shelf !== 'HOLDING') return [];
  for (const clearAt of new Set(card.holds.map((hold) => hold.clearAt))) {
    const [next] = groupByStep(cardOf(batch.floor, clearAt).actions);
    if (next) return [{ ...next, batch, people, startAt: Math.max(clearAt, planned ?? clearAt) }];
  }
  return [];
}

/** Starts of one step on several pieces are one thing to do. */
function groupByStep(
  actions: readonly NextAction[],
): Pick<Candidate, 'step' | 'pieces' | 'latestAt'>[] {
  const groups = new Map<string, { step: WorkStep; pieces: number[]; latestAt: Instant | null }>();
  for (const { kind, step, piece, latestAt } of actions) {
    if (kind !== 'START') continue;
    const group = groups.get(step.key) ?? { step, pieces: [], latestAt: null };
    group.pieces.push(piece);
    if (latestAt !== null) group.latestAt = Math.min(latestAt, group.latestAt ?? latestAt);
    groups.set(step.key, group);
  }
  return [...groups.values()].map((group) => ({
    ...group,
    pieces: group.pieces.sort((a, b) => a - b),
  }));
}

function plannedStart(batch: BoardBatch): Instant | null {
  const at = batch.forecast?.nextStartAt ?? null;
  return at === null ? null : Date.parse(at);
}

function compare(a: Candidate, b: Candidate, now: Instant): number {
  const pressing = (each: Candidate) =>
    isPressing(each.latestAt, now) && each.latestAt !== null ? each.latestAt : Infinity;
  return (
    order(pressing(a), pressing(b)) ||
    order(a.startAt, b.startAt) ||
    order(a.batch.floor.shipBy ?? '9999', b.batch.floor.shipBy ?? '9999') ||
    order(a.batch.floor.code, b.batch.floor.code)
  );
}

function isPressing(latestAt: Instant | null, now: Instant): boolean {
  return latestAt !== null && latestAt - now <= PRESSING_MINUTES * MINUTE_MS;
}

function toRow(candidate: Candidate, zone: string, now: Instant): DoNextRow {
  const { batch, step, pieces, startAt, latestAt, people } = candidate;
  const { floor } = batch;
  const on = piecesWords(step, pieces, piecesOf(floor, step.scope).length);
  const [verb = '', ...rest] = step.verb.split(' ');
  const what = [capital(verb), floor.code, on, ...rest].filter((word) => word !== '').join(' ');
  return {
    id: `${floor.id}/${step.key}`,
    batch,
    what,
    step,
    people,
    ...whenWords(startAt, latestAt, zone, now),
  };
}

/** "panel 2", "panels 1 and 3", "both panels", "all 12 blocks"; many but not all are only counted. */
function piecesWords(step: WorkStep, pieces: readonly number[], of: number): string {
  if (pieces.length === of) {
    return piecesName(step.scope, pieces, true).replace('all 2', 'both');
  }
  if (pieces.length <= MOST_NAMED) return piecesName(step.scope, pieces);
  return `${pieces.length} ${step.scope === 'PANEL' ? 'panels' : 'blocks'}`;
}

function whenWords(
  startAt: Instant,
  latestAt: Instant | null,
  zone: string,
  now: Instant,
): Pick<DoNextRow, 'when' | 'pressure'> {
  if (latestAt !== null && latestAt < now) {
    return { when: `was due by ${clockWords(zone, now, latestAt)}`, pressure: 'over' };
  }
  if (latestAt !== null && isPressing(latestAt, now)) {
    return { when: `by ${clockWords(zone, now, latestAt)}`, pressure: 'pressing' };
  }
  if (startAt === Infinity) return { when: 'queued', pressure: 'later' };
  if (startAt - now < MINUTE_MS) return { when: 'now', pressure: 'now' };
  return { when: clockWords(zone, now, startAt), pressure: 'later' };
}

function capital(word: string): string {
  return word.charAt(0).toUpperCase() + word.slice(1);
}

function order<T extends string | number>(a: T, b: T): number {
  return a < b ? -1 : a > b ? 1 : 0;
}
