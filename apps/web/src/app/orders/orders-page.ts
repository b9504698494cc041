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
import { Router, RouterLink } from '@angular/router';
import { auditTime } from 'rxjs';
import type { OrderFieldsFragment, OrderStatus } from '../graphql/generated/graphql';
import { LiveFeed } from '../graphql/live-feed';
import { ServerClock } from '../graphql/server-clock';
import { Session } from '../session/session';
import { FailedPanel } from '../ui/failed-panel';
import { Icon } from '../ui/icon';
import { ProgressBar } from '../ui/progress-bar';
import { Skeleton } from '../ui/skeleton';
import { StatePanel } from '../ui/state-panel';
import { Swatch } from '../ui/swatch';
import { dateName, localDate } from '../ui/when';
import { NewOrder } from './new-order';
import { OrderDesigns } from './order-designs';
import { OrderForecast } from './order-forecast';
import { OrderStatusBadge } from './order-status';
import { boardCount, statusName, STATUSES } from './order-words';
import {
  MOST_PAGES,
  readView,
  sortedBy,
  sortRows,
  writeView,
  type OrdersView,
  type SortKey,
} from './orders-address';
import { OrdersList } from './orders-list';

/** Milliseconds between two changes on the floor and reading the orders they may have moved. */
const SETTLE = 2_000;

const COLUMNS: readonly { readonly key: SortKey | null; readonly name: string }[] = [
  { key: 'code', name: 'Order' },
  { key: null, name: 'Customer' },
  { key: 'due', name: 'Due' },
  { key: 'ship-by', name: 'Ship by' },
  { key: null, name: 'Boards' },
  { key: 'status', name: 'Status' },
  { key: 'progress', name: 'Progress' },
  { key: 'forecast', name: 'Forecast' },
];

/** The shop's orders, as the address says: which, in which order, how many. */
@Component({
  selector: 'app-orders-page',
  imports: [
    FailedPanel,
    Icon,
    NewOrder,
    OrderForecast,
    OrderStatusBadge,
    ProgressBar,
    RouterLink,
    Skeleton,
    StatePanel,
    Swatch,
  ],
  providers: [OrdersList],
  templateUrl: './orders-page.html',
  styleUrl: './orders-page.scss',
  host: { class: 'ct-page' },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class OrdersPage {
  private readonly router = inject(Router);
  private readonly session = inject(Session);
  private readonly clock = inject(ServerClock);
  protected readonly list = inject(OrdersList);
  protected readonly designs = inject(OrderDesigns);

  /** From the address. */
  readonly status = input<string>();
  readonly sort = input<string>();
  readonly pages = input<string>();

  protected readonly view = computed(() =>
    readView({ status: this.status(), sort: this.sort(), pages: this.pages() }),
  );
  protected readonly rows = computed(() => {
    const rows = this.list.rows();
    return rows && sortRows(rows, this.view());
  });
  protected readonly columns = computed(() =>
    COLUMNS.filter((column) => column.name !== 'Customer' || this.seesCustomers()),
  );
  protected readonly seesCustomers = computed(() => this.session.may('seeCustomers'));
  protected readonly mayEnter = computed(() => this.session.may('editOrders'));
  protected readonly today = computed(() => localDate(this.clock.minute(), this.session.zone()));
  protected readonly canAskForMore = computed(
    () => this.list.hasMore() && this.view().pages < MOST_PAGES,
  );
  protected readonly adding = signal(false);
  protected readonly entered = signal<OrderFieldsFragment | null>(null);
  protected readonly statuses = STATUSES;
  protected readonly statusName = statusName;
  protected readonly boardCount = boardCount;
  protected readonly skeletons = [1, 2, 3, 4, 5, 6, 7, 8];

  constructor() {
    void this.designs.read();
    const wanted = computed(() => [this.view().status, this.view().pages] as const, {
      equal: (a, b) => a[0] === b[0] && a[1] === b[1],
    });
    effect(() => {
      const [status, pages] = wanted();
      untracked(() => void this.list.show(status, pages));
    });
    inject(LiveFeed)
      .changes$.pipe(auditTime(SETTLE), takeUntilDestroyed())
      .subscribe(() => void this.list.again());
  }

  protected filter(status: OrderStatus | null): void {
    this.go({ ...this.view(), status, pages: 1 });
  }

  protected sortBy(key: SortKey): void {
    this.go(sortedBy(this.view(), key));
  }

  protected chooseSort(text: string): void {
    const { sort, descending } = readView({ sort: text });
    this.go({ ...this.view(), sort, descending });
  }

  protected more(): void {
    this.go({ ...this.view(), pages: this.view().pages + 1 });
  }

  protected ariaSort(key: SortKey | null): 'ascending' | 'descending' | null {
    const { sort, descending } = this.view();
    return key !== sort ? null : descending ? 'descending' : 'ascending';
  }

  protected day(date: string): string {
    return dateName(date, this.today());
  }

  protected orderMade(order: OrderFieldsFragment): void {
    this.entered.set(order);
    void this.list.again();
  }

  private go(view: OrdersView): void {
    void this.router.navigate([], { queryParams: writeView(view), queryParamsHandling: 'merge' });
  }
}
