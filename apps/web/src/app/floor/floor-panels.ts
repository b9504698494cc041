import { Injectable, signal } from '@angular/core';
import type { CautionCode } from '#shared/route/route';

/** A dialog of the Floor. */
export type FloorPanel =
  | { readonly kind: 'MOVE' | 'GIVE' | 'EARLIER'; readonly batchId: string }
  | { readonly kind: 'CAUTION'; readonly code: CautionCode }
  | { readonly kind: 'NEW_BATCH' };

/** Which dialog is open; cards and menus ask for one, the page shows it. */
@Injectable()
export class FloorPanels {
  private readonly openNow = signal<FloorPanel | null>(null);
  readonly panel = this.openNow.asReadonly();

  open(panel: FloorPanel): void {
    this.openNow.set(panel);
  }

  close(): void {
    this.openNow.set(null);
  }
}
