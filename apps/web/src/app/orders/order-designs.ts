import { inject, Injectable, signal } from '@angular/core';
import { Apollo } from 'apollo-angular';
import { firstValueFrom } from 'rxjs';
import { OrderDesignsDocument, type OrderDesignsQuery } from '../graphql/generated/graphql';

export type OrderDesign = OrderDesignsQuery['designs'][number];

/** The designs that orders are for: their names and faces. */
@Injectable({ providedIn: 'root' })
export class OrderDesigns {
  private readonly apollo = inject(Apollo);
  private readonly known = signal<readonly OrderDesign[] | null>(null);

  /** By name; null until they were read. */
  readonly all = this.known.asReadonly();

  /** Reads them anew; an order without its swatches still says everything, so a failure is left at that. */
  async read(): Promise<void> {
    try {
      const { data } = await firstValueFrom(this.apollo.query({ query: OrderDesignsDocument }));
      if (data) this.known.set(data.designs);
    } catch {
      // What was read before stays.
    }
  }

  byId(id: string): OrderDesign | null {
    return this.known()?.find((design) => design.id === id) ?? null;
  }
}
