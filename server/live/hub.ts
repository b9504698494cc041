import { randomUUID } from 'node:crypto';
import type { Logger } from 'pino';
import type { Doors } from '#server/db/doors';
import { endable } from './endable';
import { FeedQueue } from './feed-queue';
import { currentSeq, projectEvents, RESET_AFTER, type ShopMessage } from './project';
import { Wire } from './wire';

/** One shop's stream as this process follows it. */
interface Feed {
  /** Everything up to here was delivered to the queues. */
  seq: number;
  ready: Promise<void>;
  queues: Set<FeedQueue>;
}

/**
 * Turns committed events into messages for subscribers. Each process reads a shop's events once, however many watch, and
 * projects them once; a wake-up through the database makes it prompt, a poll behind it makes it certain.
 */
export class Hub {
  private readonly feeds = new Map<string, Feed>();
  private readonly wire: Wire;
  private readonly revocations = new Set<(credential: string) => void>();
  private readonly wakings = new Set<() => void>();
  private readonly elsewhere = new Map<string, { counts: Record<string, number>; at: number }>();
  private readonly processId = randomUUID();
  private reading = false;
  private again = false;
  private closed = false;
  private readonly timers: NodeJS.Timeout[] = [];

  constructor(
    private readonly doors: Doors,
    private readonly log: Logger,
    private readonly now: () => Date,
    listenUrl: string,
  ) {
    this.wire = new Wire(listenUrl, doors.relay, log, {
      woken: () => this.woken(),
      revoked: (credential) => this.tellRevoked(credential),
      watchers: (from, counts) => this.elsewhere.set(from, { counts, at: Date.now() }),
    });
    this.timers.push(setInterval(() => this.read(), 2_000));
    this.timers.push(setInterval(() => this.shareWatchers(), 5_000));
    for (const timer of this.timers) timer.unref();
  }

  /** Called after a commit: tells this process at once and the others within a few milliseconds. */
  wake(): void {
    if (this.closed) return;
    this.woken();
    this.wire.poke();
  }

  /** Calls back whenever something may have been committed, here or in another process. */
  onWoken(listener: () => void): () => void {
    this.wakings.add(listener);
    return () => this.wakings.delete(listener);
  }

  /** A credential has ended: whatever was opened with it closes, in every process. */
  revoke(credential: string): void {
    this.tellRevoked(credential);
    this.wire.revoke(credential);
  }

  onRevoked(listener: (credential: string) => void): () => void {
    this.revocations.add(listener);
    return () => this.revocations.delete(listener);
  }

  /** How many subscriptions watch a shop, in all processes. */
  watchers(shopId: string): number {
    let sum = this.feeds.get(shopId)?.queues.size ?? 0;
    for (const [from, { counts, at }] of this.elsewhere) {
      if (Date.now() - at > 15_000) this.elsewhere.delete(from);
      else if (from !== this.processId) sum += counts[shopId] ?? 0;
    }
    return sum;
  }

  /**
   * A shop's messages after a place in its stream (null: from now on), each event once and in order. Whoever is more
   * than a thousand events behind, or ahead of what there is, gets a reset.
   */
  follow(shopId: string, after: number | null): AsyncGenerator<ShopMessage, void, undefined> {
    const queue = new FeedQueue();
    return endable(this.messages(shopId, after, queue), () => queue.end());
  }

  /** How many subscriptions this process serves, over all shops. */
  get subscriptions(): number {
    let sum = 0;
    for (const feed of this.feeds.values()) sum += feed.queues.size;
    return sum;
  }

  /** How many shops this process follows. */
  get followed(): number {
    return this.feeds.size;
  }

  async close(): Promise<void> {
    this.closed = true;
    for (const timer of this.timers) clearInterval(timer);
    for (const feed of this.feeds.values()) for (const queue of feed.queues) queue.end();
    await this.wire.close();
  }

  private woken(): void {
    this.read();
    for (const listener of this.wakings) listener();
  }

  private async *messages(
    shopId: string,
    after: number | null,
    queue: FeedQueue,
  ): AsyncGenerator<ShopMessage, void, undefined> {
    const feed = this.feedOf(shopId);
    feed.queues.add(queue);
    try {
      await feed.ready;
      queue.since = feed.seq;
      if (after !== null && after > feed.seq) {
        // Told by another process of what this one has not read yet, or of what there never was.
        const seq = await currentSeq(this.doors, shopId);
        queue.since = Math.min(after, seq);
        if (after > seq) yield this.resetMessage(shopId, seq);
      } else if (after !== null && after < feed.seq) {
        yield await this.catchUp(shopId, after, queue.since);
      }
      yield* queue.drain(() => this.resetMessage(shopId, feed.seq));
    } finally {
      feed.queues.delete(queue);
      if (feed.queues.size === 0) this.forget(shopId, feed);
    }
  }

  /** A shop may have a new feed by the time the last follower of the old one is gone. */
  private forget(shopId: string, feed: Feed): void {
    if (this.feeds.get(shopId) === feed) this.feeds.delete(shopId);
  }

  private feedOf(shopId: string): Feed {
    const known = this.feeds.get(shopId);
    if (known) return known;
    const feed: Feed = { seq: 0, queues: new Set(), ready: Promise.resolve() };
    feed.ready = currentSeq(this.doors, shopId).then((seq) => {
      feed.seq = seq;
    });
    feed.ready.catch(() => this.forget(shopId, feed));
    this.feeds.set(shopId, feed);
    return feed;
  }

  private async catchUp(shopId: string, after: number, upTo: number): Promise<ShopMessage> {
    if (upTo - after > RESET_AFTER) return this.resetMessage(shopId, upTo);
    const message = await projectEvents(this.doors, shopId, after, upTo, this.now());
    return message ?? this.resetMessage(shopId, upTo);
  }

  private resetMessage(shopId: string, seq: number): ShopMessage {
    return {
      shopId,
      seq,
      now: this.now(),
      reset: true,
      shopChanged: false,
      batches: [],
      by: null,
    };
  }

  private read(): void {
    if (this.reading) {
      this.again = true;
      return;
    }
    this.reading = true;
    void this.readAll()
      .catch((error: unknown) => this.log.warn({ error }, 'reading events failed; trying again'))
      .finally(() => {
        this.reading = false;
        if (this.again && !this.closed) {
          this.again = false;
          this.read();
        }
      });
  }

  private async readAll(): Promise<void> {
    const shops = [...this.feeds.keys()];
    if (shops.length === 0) return;
    const { rows } = await this.doors.relay.query<{ shop_id: string; seq: number }>(
      'select shop_id, seq from shop_counter where shop_id = any($1)',
      [shops],
    );
    for (const { shop_id: shopId, seq } of rows) {
      // What cannot be read in one shop keeps no other shop waiting; the poll tries it again.
      await this.readShop(shopId, seq).catch((error: unknown) =>
        this.log.warn({ error, shopId }, 'the events of a shop were not read; trying again'),
      );
    }
  }

  private async readShop(shopId: string, seq: number): Promise<void> {
    const feed = this.feeds.get(shopId);
    if (!feed) return;
    await feed.ready;
    if (seq <= feed.seq) return;
    const message =
      seq - feed.seq > RESET_AFTER
        ? this.resetMessage(shopId, seq)
        : await projectEvents(this.doors, shopId, feed.seq, seq, this.now());
    feed.seq = seq;
    for (const queue of feed.queues) queue.push(message ?? this.resetMessage(shopId, seq));
  }

  private tellRevoked(credential: string): void {
    for (const listener of this.revocations) listener(credential);
  }

  private shareWatchers(): void {
    const counts = Object.fromEntries(
      [...this.feeds].map(([shopId, feed]) => [shopId, feed.queues.size]),
    );
    this.wire.share(this.processId, counts);
  }
}
