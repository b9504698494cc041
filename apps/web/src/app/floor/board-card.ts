import { cardOf, pieceCounts, type Card, type PieceCount } from '#shared/floor/card';
import { workingSteps } from '#shared/floor/progress';
import type { Instant } from '#shared/time/instant';
import { latestFact } from './floor-rows';
import type { BoardBatch } from './floor-view';

/** A batch as the board shows it. A new one is made only when the batch changed or one of its holds cleared. */
export interface BoardCard {
  readonly id: string;
  readonly batch: BoardBatch;
  readonly card: Card;
  readonly counts: readonly PieceCount[];
  /** Everyone the card stands for: at work on it, or given it. */
  readonly people: readonly string[];
  /** Since when somebody works on it; null when nobody does. */
  readonly since: Instant | null;
  readonly isLate: boolean;
  /** When time alone makes it read differently; Infinity when never. */
  readonly changesAt: Instant;
}

/**
 * The instant to read or judge a batch at. Facts carry the server's time, which this browser knows only to within the
 * way of a message: something done just now must not count as still to come.
 */
export function momentOf(batch: BoardBatch, now: Instant): Instant {
  return Math.max(now, latestFact(batch.floor));
}

export function readCard(batch: BoardBatch, now: Instant): BoardCard {
  const at = momentOf(batch, now);
  const card = cardOf(batch.floor, at);
  const { assignedTo } = batch.floor;
  const starts = workingSteps(batch.floor).flatMap(({ run }) => run.startedAt ?? []);
  const { forecast } = batch;
  return {
    id: batch.floor.id,
    batch,
    card,
    counts: pieceCounts(batch.floor, at),
    people: [...new Set([...card.people, ...(assignedTo === null ? [] : [assignedTo])])],
    since: starts.length > 0 ? Math.min(...starts) : null,
    isLate: (forecast?.slackMinutes ?? 0) < 0,
    changesAt: Math.min(Infinity, ...card.holds.map((hold) => hold.clearAt)),
  };
}

/** Cards by their batch, read again only when they read differently. */
export class CardCache {
  private readonly cards = new WeakMap<BoardBatch, BoardCard>();

  read(batch: BoardBatch, now: Instant): BoardCard {
    const known = this.cards.get(batch);
    if (known && now < known.changesAt) return known;
    const card = readCard(batch, now);
    this.cards.set(batch, card);
    return card;
  }
}
