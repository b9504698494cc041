import {
  afterNextRender,
  ChangeDetectionStrategy,
  Component,
  type ElementRef,
  input,
  output,
  viewChild,
} from '@angular/core';
import { Icon } from '../ui/icon';

/** A dialog around what the Floor asks or explains. The browser gives the focus back to where it was. */
@Component({
  selector: 'app-panel-frame',
  imports: [Icon],
  template: `
    <dialog #dialog aria-labelledby="panel-heading" (close)="closed.emit()">
      <header>
        <h2 id="panel-heading">{{ heading() }}</h2>
        <button type="button" class="ct-button bare" aria-label="Close" (click)="close()">
          <app-icon name="close" />
        </button>
      </header>
      <ng-content />
    </dialog>
  `,
  styles: `
    dialog {
      width: min(520px, calc(100vw - 24px));
      max-height: calc(100dvh - 24px);
      box-sizing: border-box;
      padding: 0 20px 20px;
      border: 1px solid var(--ct-line);
      border-radius: 14px;
      background: var(--ct-surface);
      color: var(--ct-ink);
      box-shadow: 0 14px 40px color-mix(in srgb, var(--ct-shadow) 28%, transparent);
    }
    dialog::backdrop {
      background: color-mix(in srgb, var(--ct-shadow) 45%, transparent);
    }
    header {
      position: sticky;
      z-index: 1;
      top: 0;
      display: flex;
      align-items: center;
      justify-content: space-between;
      gap: 12px;
      margin: 0 -8px 4px 0;
      padding: 12px 0 8px;
      background: inherit;
    }
    h2 {
      margin: 0;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PanelFrame {
  readonly heading = input.required<string>();
  readonly closed = output();

  private readonly dialog = viewChild.required<ElementRef<HTMLDialogElement>>('dialog');

  constructor() {
    afterNextRender(() => this.dialog().nativeElement.showModal());
  }

  close(): void {
    this.dialog().nativeElement.close();
  }
}
