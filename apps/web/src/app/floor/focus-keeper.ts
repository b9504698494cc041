import { afterRenderEffect, DestroyRef, Directive, ElementRef, inject, input } from '@angular/core';

/**
 * Keeps the focus on the same part of the same card when the card is drawn anew in another column. Parts say who they are
 * by `data-part`, inside an element with `data-batch`.
 */
@Directive({
  selector: '[appFocusKeeper]',
  host: { '(focusin)': 'remember($event)', '(focusout)': 'forget($event)' },
})
export class FocusKeeper {
  private readonly root = inject<ElementRef<HTMLElement>>(ElementRef).nativeElement;
  private kept: { batchId: string; part: string } | null = null;
  private timer: ReturnType<typeof setTimeout> | undefined;

  /** Anything that is a new object when cards are drawn anew. */
  readonly appFocusKeeper = input.required<unknown>();

  constructor() {
    inject(DestroyRef).onDestroy(() => clearTimeout(this.timer));
    afterRenderEffect({
      read: () => {
        this.appFocusKeeper();
        this.restore();
      },
    });
  }

  protected remember(event: FocusEvent): void {
    clearTimeout(this.timer);
    const part = (event.target as Element).closest('[data-part]');
    const card = part?.closest('[data-batch]');
    this.kept =
      part && card
        ? {
            batchId: card.getAttribute('data-batch') ?? '',
            part: part.getAttribute('data-part') ?? '',
          }
        : null;
  }

  /** Somebody who goes elsewhere is not called back; an element that is taken away has not gone anywhere. */
  protected forget(event: FocusEvent): void {
    const left = event.target as Element;
    clearTimeout(this.timer);
    this.timer = setTimeout(() => {
      if (left.isConnected) this.kept = null;
    });
  }

  private restore(): void {
    const { kept } = this;
    if (!kept || (document.activeElement && document.activeElement !== document.body)) return;
    const card = this.root.querySelector(`[data-batch="${CSS.escape(kept.batchId)}"]`);
    const part = card?.querySelector<HTMLElement>(`[data-part="${CSS.escape(kept.part)}"]`);
    (part ?? card?.querySelector<HTMLElement>('[data-part="card"]'))?.focus();
  }
}
