import { inject, Injectable, signal } from '@angular/core';
import { Apollo } from 'apollo-angular';
import { firstValueFrom } from 'rxjs';
import {
  OrdersDocument,
  type OrderFieldsFragment,
  type OrderStatus,
} from '../graphql/generated/graphql';
import { ServerClock } from '../graphql/server-clock';
import { failureKind, type FailureKind } from '../ui/failure-kind';
import { PAGE_SIZE } from './orders-address';

/** The orders that were read so far, page after page; the page that shows them provides it. */
@Injectable()
export class OrdersList {
  private readonly apollo = inject(Apollo);
  private readonly clock = inject(ServerClock);
  private status: OrderStatus | null = null;
  private pages: OrderFieldsFragment[][] = [];
  private cursor: string | null = null;
  private reading = 0;

  private readonly rowsNow = signal<readonly OrderFieldsFragment[] | null>(null);
  private readonly totalNow = signal(0);
  private readonly hasMoreNow = signal(false);
  private readonly failureNow = signal<FailureKind | null>(null);
  private readonly busyNow = signal(false);

  /** Null while the first page is read. */
  readonly rows = this.rowsNow.asReadonly();
  readonly total = this.totalNow.asReadonly();
  readonly hasMore = this.hasMoreNow.asReadonly();
  readonly failure = this.failureNow.asReadonly();
  readonly busy = this.busyNow.asReadonly();

  /** Shows so many pages of the orders with this status: reads what is missing, drops what is too much. */
  async show(status: OrderStatus | null, pages: number): Promise<void> {
    if (status !== this.status) {
      this.forget(status);
    }
    if (this.pages.length >= pages) {
      this.keep(this.pages.slice(0, pages));
      return;
    }
    await this.read(status, pages, [...this.pages]);
  }

  /** Reads anew what is shown, without taking it away meanwhile. */
  async again(): Promise<void> {
    await this.read(this.status, Math.max(1, this.pages.length), []);
  }

  private async read(
    status: OrderStatus | null,
    count: number,
    pages: OrderFieldsFragment[][],
  ): Promise<void> {
    const mine = (this.reading += 1);
    this.busyNow.set(true);
    let cursor = pages.length > 0 ? this.cursor : null;
    try {
      do {
        const variables = { first: PAGE_SIZE, after: cursor, status };
        const { data } = await firstValueFrom(
          this.apollo.query({ query: OrdersDocument, variables }),
        );
        if (mine !== this.reading) return;
        if (!data) throw new Error('The server gave no answer.');
        this.clock.observe(data.now);
        pages.push(data.orders.nodes);
        cursor = data.orders.pageInfo.endCursor;
        this.totalNow.set(data.orders.totalCount);
        this.hasMoreNow.set(data.orders.pageInfo.hasNextPage);
      } while (pages.length < count && this.hasMoreNow());
      this.cursor = cursor;
      this.failureNow.set(null);
      this.keep(pages);
    } catch (error) {
      if (mine === this.reading) this.failureNow.set(failureKind(error));
    } finally {
      if (mine === this.reading) this.busyNow.set(false);
    }
  }

  private keep(pages: OrderFieldsFragment[][]): void {
    if (pages.length < this.pages.length) {
      // The next page begins after the last row that is left; its cursor is not known any more, so all is read anew.
      this.pages = pages;
      this.rowsNow.set(pages.flat());
      void this.again();
      return;
    }
    this.pages = pages;
    this.rowsNow.set(pages.flat());
  }

  private forget(status: OrderStatus | null): void {
    this.status = status;
    this.pages = [];
    this.cursor = null;
    this.rowsNow.set(null);
    this.failureNow.set(null);
  }
}
