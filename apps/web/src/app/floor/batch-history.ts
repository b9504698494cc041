import { ChangeDetectionStrategy, Component, effect, inject, input, signal } from '@angular/core';
import { clockWords } from '#shared/time/words';
import { parseInstant } from '#shared/time/instant';
import { Apollo } from 'apollo-angular';
import { firstValueFrom } from 'rxjs';
import { BatchHistoryDocument, type BatchHistoryQuery } from '../graphql/generated/graphql';
import { ServerClock } from '../graphql/server-clock';
import { failureSentence } from '../ui/failure-sentence';
import { Skeleton } from '../ui/skeleton';
import { mergeHistory } from './history-pages';

type Page = BatchHistoryQuery['batchHistory'];

/** From this difference on it is worth saying that something was recorded later than it happened, in milliseconds. */
const RECORDED_LATE = 60_000;

/** What happened to a batch, the newest first. */
@Component({
  selector: 'app-batch-history',
  imports: [Skeleton],
  template: `
    @if (page(); as page) {
      <ol>
        @for (event of page.nodes; track event.seq) {
          <li>
            <span class="when">{{ clock(event.happenedAt) }}</span>
            <span>
              {{ event.sentence }}
              @if (late(event); as words) {
                <span class="ct-quiet">{{ words }}</span>
              }
            </span>
          </li>
        }
      </ol>
      @if (page.pageInfo.hasNextPage) {
        <button
          type="button"
          class="ct-button"
          [attr.aria-disabled]="busy()"
          (click)="older(page.pageInfo.endCursor)"
        >
          {{ busy() ? 'Reading …' : 'Older' }}
        </button>
      }
    } @else if (!failure()) {
      <app-skeleton height="160px" />
    }
    @if (failure(); as words) {
      <p class="failure" role="alert">
        {{ words }}
        <button type="button" class="ct-button" (click)="read()">Try again</button>
      </p>
    }
  `,
  styles: `
    ol {
      margin: 0 0 12px;
      padding: 0;
      list-style: none;
    }
    li {
      display: grid;
      grid-template-columns: 104px 1fr;
      gap: 12px;
      padding: 8px 0;
      border-bottom: 1px solid var(--ct-line);
      overflow-wrap: anywhere;
    }
    .when {
      color: var(--ct-quiet);
      font-weight: 600;
    }
    .failure {
      color: var(--ct-madder);
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class BatchHistory {
  private readonly apollo = inject(Apollo);
  private readonly now = inject(ServerClock).minute;

  readonly batchId = input.required<string>();
  /** The batch's version: when it changes, something has happened. */
  readonly version = input.required<number>();
  readonly zone = input.required<string>();

  protected readonly page = signal<Page | null>(null);
  protected readonly failure = signal<string | null>(null);
  protected readonly busy = signal(false);

  constructor() {
    effect(() => {
      this.version();
      this.batchId();
      void this.read();
    });
  }

  protected async read(): Promise<void> {
    const newest = await this.ask(null);
    if (newest) this.page.update((known) => mergeHistory(known, newest));
  }

  protected async older(after: string | null): Promise<void> {
    if (this.busy() || after === null) return;
    const page = await this.ask(after);
    if (!page) return;
    this.page.update((known) => ({
      nodes: [...(known?.nodes ?? []), ...page.nodes],
      pageInfo: page.pageInfo,
    }));
  }

  protected clock(at: string): string {
    return clockWords(this.zone(), this.now(), parseInstant(at));
  }

  protected late(event: Page['nodes'][number]): string {
    const [happened, recorded] = [parseInstant(event.happenedAt), parseInstant(event.recordedAt)];
    return recorded - happened < RECORDED_LATE ? '' : `(recorded ${this.clock(event.recordedAt)})`;
  }

  private async ask(after: string | null): Promise<Page | null> {
    this.busy.set(true);
    try {
      const { data } = await firstValueFrom(
        this.apollo.query({
          query: BatchHistoryDocument,
          variables: { batchId: this.batchId(), after },
          fetchPolicy: 'no-cache',
        }),
      );
      this.failure.set(null);
      return data?.batchHistory ?? null;
    } catch (error) {
      this.failure.set(failureSentence(error));
      return null;
    } finally {
      this.busy.set(false);
    }
  }
}
