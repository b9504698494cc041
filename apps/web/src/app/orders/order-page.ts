import {
  ChangeDetectionStrategy,
  Component,
  computed,
  effect,
  inject,
  input,
  signal,
  untracked,
} from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { RouterLink } from '@angular/router';
import { Apollo } from 'apollo-angular';
import { auditTime, firstValueFrom } from 'rxjs';
import { OrderDocument, type OrderFieldsFragment } from '../graphql/generated/graphql';
import { LiveFeed } from '../graphql/live-feed';
import { ServerClock } from '../graphql/server-clock';
import { Session } from '../session/session';
import { FailedPanel } from '../ui/failed-panel';
import { failureKind, type FailureKind } from '../ui/failure-kind';
import { Icon } from '../ui/icon';
import { ProgressBar } from '../ui/progress-bar';
import { Skeleton } from '../ui/skeleton';
import { StatePanel } from '../ui/state-panel';
import { Swatch } from '../ui/swatch';
import { dateName, dayName, localDate } from '../ui/when';
import { LineBatch } from './line-batch';
import { OrderDesigns } from './order-designs';
import { OrderForecast } from './order-forecast';
import { OrderStatusBadge } from './order-status';
import { boardCount, stageName, statusMeaning } from './order-words';

type Line = OrderFieldsFragment['lines'][number];
const SETTLE = 2_000;

/** One order: for whom, until when, how far each line is, and which batches make it. */
@Component({
  selector: 'app-order-page',
  imports: [
    FailedPanel,
    Icon,
    LineBatch,
    OrderForecast,
    OrderStatusBadge,
    ProgressBar,
    RouterLink,
    Skeleton,
    StatePanel,
    Swatch,
  ],
  templateUrl: './order-page.html',
  styleUrl: './order-page.scss',
  host: { class: 'ct-page' },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class OrderPage {
  private readonly apollo = inject(Apollo);
  private readonly clock = inject(ServerClock);
  private readonly session = inject(Session);
  protected readonly designs = inject(OrderDesigns);
  private reading = 0;

  /** From the address. */
  readonly code = input.required<string>();

  /** Undefined while it is read; null when there is none with this code. */
  protected readonly order = signal<OrderFieldsFragment | null | undefined>(undefined);
  protected readonly failure = signal<FailureKind | null>(null);
  /** The line a batch is being made for. */
  protected readonly making = signal<Line | null>(null);
  protected readonly made = signal<string | null>(null);
  protected readonly seesCustomers = computed(() => this.session.may('seeCustomers'));
  protected readonly seesFloor = computed(() => this.session.may('seeFloor'));
  protected readonly makesBatches = computed(() => this.session.may('makeBatches'));
  protected readonly today = computed(() => localDate(this.clock.minute(), this.session.zone()));
  protected readonly boardCount = boardCount;
  protected readonly stageName = stageName;
  protected readonly statusMeaning = statusMeaning;

  constructor() {
    void this.designs.read();
    effect(() => {
      this.code();
      untracked(() => {
        this.order.set(undefined);
        this.made.set(null);
        void this.read();
      });
    });
    inject(LiveFeed)
      .changes$.pipe(auditTime(SETTLE), takeUntilDestroyed())
      .subscribe(() => void this.read());
  }

  protected async read(): Promise<void> {
    const mine = (this.reading += 1);
    try {
      const variables = { code: this.code() };
      const { data } = await firstValueFrom(this.apollo.query({ query: OrderDocument, variables }));
      if (mine !== this.reading) return;
      if (!data) throw new Error('The server gave no answer.');
      this.clock.observe(data.now);
      this.failure.set(null);
      this.order.set(data.order ?? null);
    } catch (error) {
      if (mine === this.reading) this.failure.set(failureKind(error));
    }
  }

  protected day(date: string): string {
    return dateName(date, this.today());
  }

  protected enteredOn(at: string): string {
    return dayName(at, this.session.zone(), this.clock.minute());
  }

  /** Whether there is still something to make for the line. */
  protected isOpen(line: Line): boolean {
    return line.status !== 'READY' && line.status !== 'SHIPPED';
  }

  protected batchMade(code: string): void {
    this.made.set(code);
    void this.read();
  }
}
