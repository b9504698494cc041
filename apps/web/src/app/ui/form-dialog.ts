import {
  afterNextRender,
  ChangeDetectionStrategy,
  Component,
  type ElementRef,
  inject,
  input,
  output,
  viewChild,
} from '@angular/core';
import { Ask } from './ask';
import { Icon } from './icon';

/**
 * A form over the page. It opens when it is rendered and tells when it was closed; the page then takes it away. The form
 * inside calls `close()` when it is done. What was typed is not thrown away unasked.
 */
@Component({
  selector: 'app-form-dialog',
  imports: [Icon],
  template: `
    <dialog
      #dialog
      aria-labelledby="form-dialog-heading"
      (cancel)="cancel($event)"
      (close)="closed.emit()"
    >
      <header>
        <h2 id="form-dialog-heading">{{ heading() }}</h2>
        <button type="button" class="ct-button bare" aria-label="Close" (click)="leave()">
          <app-icon name="close" />
        </button>
      </header>
      <div class="body"><ng-content /></div>
    </dialog>
  `,
  styles: `
    dialog {
      width: min(var(--form-dialog-width, 560px), calc(100vw - 24px));
      max-height: calc(100dvh - 24px);
      box-sizing: border-box;
      padding: 0;
      overflow: auto;
      overscroll-behavior: contain;
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
      padding: 10px 10px 10px 20px;
      border-bottom: 1px solid var(--ct-line);
      background: var(--ct-surface);
    }
    h2 {
      margin: 0;
    }
    .body {
      padding: 18px 20px 20px;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class FormDialog {
  private readonly ask = inject(Ask);
  private readonly dialog = viewChild.required<ElementRef<HTMLDialogElement>>('dialog');

  readonly heading = input.required<string>();
  /** Asked when somebody wants to leave: whether something was typed that would be lost. */
  readonly dirty = input<() => boolean>(() => false);
  readonly closed = output();

  constructor() {
    const focused = document.activeElement;
    afterNextRender(() => this.dialog().nativeElement.showModal());
    this.closed.subscribe(() => {
      if (focused instanceof HTMLElement && focused.isConnected) focused.focus();
    });
  }

  close(): void {
    this.dialog().nativeElement.close();
  }

  protected cancel(event: Event): void {
    // A file or date chooser inside is cancelled, not the dialog.
    if (event.target !== this.dialog().nativeElement) return;
    event.preventDefault();
    void this.leave();
  }

  protected async leave(): Promise<void> {
    if (this.dirty()()) {
      const answer = await this.ask.ask({
        heading: 'Throw away what you typed?',
        text: 'It has not been saved.',
        action: 'Throw it away',
        dangerous: true,
      });
      if (!answer) return;
    }
    this.close();
  }
}
