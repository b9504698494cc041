import { computed, effect, inject, Injectable, signal, untracked } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { Apollo } from 'apollo-angular';
import { firstValueFrom } from 'rxjs';
import { FloorDocument } from '../graphql/generated/graphql';
import { LiveFeed, type FloorChange } from '../graphql/live-feed';
import { ServerClock } from '../graphql/server-clock';
import { failureSentence } from '../ui/failure-sentence';
import { mergeRows, snapshotRows, type FloorRows } from './floor-rows';
import {
  toBoardBatch,
  toSurroundings,
  type ApiBatch,
  type BoardBatch,
  type FloorSurroundings,
} from './floor-view';

/**
 * The batches of the shop as they stand now: a snapshot, every change after it, and over both what this browser has just
 * done and the server has not confirmed yet. Provided by each page that shows them.
 */
@Injectable()
export class FloorStore {
  private readonly apollo = inject(Apollo);
  private readonly clock = inject(ServerClock);
  private readonly feed = inject(LiveFeed);

  private readonly rows = signal<FloorRows>(new Map());
  private readonly aroundNow = signal<FloorSurroundings | null>(null);
  private readonly guesses = signal<ReadonlyMap<string, BoardBatch>>(new Map());
  private readonly failureNow = signal<string | null>(null);
  private readonly readAtNow = signal(0);
  private reads = 0;
  private made = new WeakMap<ApiBatch, BoardBatch>();
  private madeIn: FloorSurroundings | null = null;

  /** Null until the Floor was read once. */
  readonly around = this.aroundNow.asReadonly();
  /** Why the Floor could not be read; null when it could. */
  readonly failure = this.failureNow.asReadonly();
  /** When the last message came, on the server's clock; 0 before the first. */
  readonly heardAt = this.readAtNow.asReadonly();

  /** All batches, also those that left the shop since the page was opened. Unchanged ones keep their object. */
  readonly all = computed<ReadonlyMap<string, BoardBatch>>(() => {
    const around = this.aroundNow();
    const batches = new Map<string, BoardBatch>();
    if (!around) return batches;
    if (this.madeIn !== around) {
      this.made = new WeakMap();
      this.madeIn = around;
    }
    const guesses = this.guesses();
    for (const row of this.rows().values()) {
      const batch = guesses.get(row.id) ?? this.boardBatch(row, around);
      if (batch) batches.set(row.id, batch);
    }
    return batches;
  });

  /** Those that have not left the shop. */
  readonly open = computed(() =>
    [...this.all().values()].filter((batch) => batch.floor.shippedAt === null),
  );

  constructor() {
    this.feed.changes$.pipe(takeUntilDestroyed()).subscribe((change) => this.follow(change));
    // A Floor that could not be read is read again as soon as the line is back.
    effect(() => {
      if (this.feed.state() === 'connected' && untracked(this.failureNow)) void this.read();
    });
    void this.read();
  }

  /** Reads the Floor anew. What is shown stays until the answer is there. */
  async read(): Promise<void> {
    const read = (this.reads += 1);
    try {
      const { data } = await firstValueFrom(
        this.apollo.query({ query: FloorDocument, fetchPolicy: 'no-cache' }),
      );
      if (read !== this.reads) return;
      if (!data) throw new Error('The server gave no answer.');
      this.clock.observe(data.floor.now);
      this.rows.update((known) => snapshotRows(known, data.floor.batches));
      this.aroundNow.set(toSurroundings(data.floor));
      this.readAtNow.set(Date.parse(data.floor.now));
      this.failureNow.set(null);
      this.feed.resumeAt(data.floor.cursor, data.floor.watchers);
    } catch (error) {
      if (read === this.reads) this.failureNow.set(failureSentence(error));
    }
  }

  /** Takes a batch as an answer of the server gives it. */
  take(batch: ApiBatch): void {
    this.rows.update((known) => mergeRows(known, [batch]));
    this.readWhenUnknown([batch]);
  }

  /** Shows a batch as a command will probably leave it, until `settle`. */
  guess(batch: BoardBatch): void {
    this.guesses.update((guesses) => new Map(guesses).set(batch.floor.id, batch));
  }

  settle(batchId: string): void {
    this.guesses.update((guesses) => {
      const left = new Map(guesses);
      left.delete(batchId);
      return left;
    });
  }

  private follow(change: FloorChange): void {
    this.readAtNow.set(Date.parse(change.now));
    if (change.reset || change.shopChanged) {
      void this.read();
      return;
    }
    this.rows.update((known) => mergeRows(known, change.batches));
    this.readWhenUnknown(change.batches);
  }

  /** A batch with a route or a design that was not there when the Floor was read. */
  private readWhenUnknown(batches: readonly ApiBatch[]): void {
    const around = this.aroundNow();
    const isUnknown = (batch: ApiBatch) =>
      batch.shippedAt === null && around !== null && toBoardBatch(batch, around) === null;
    if (batches.some(isUnknown)) void this.read();
  }

  private boardBatch(row: ApiBatch, around: FloorSurroundings): BoardBatch | null {
    const known = this.made.get(row);
    if (known) return known;
    const batch = toBoardBatch(row, around);
    if (batch) this.made.set(row, batch);
    return batch;
  }
}
