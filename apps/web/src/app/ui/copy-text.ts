import {
  ChangeDetectionStrategy,
  Component,
  type ElementRef,
  input,
  signal,
  viewChild,
} from '@angular/core';
import { Icon } from './icon';

/** A text to take elsewhere, with a button that copies it. Where the browser does not copy, it selects the text. */
@Component({
  selector: 'app-copy-text',
  imports: [Icon],
  template: `
    <pre
      #shown
      tabindex="0"
      role="region"
      [attr.aria-label]="label()"
    ><code>{{ text() }}</code></pre>
    <button type="button" class="ct-button" (click)="copy()">
      <app-icon [name]="told() === 'Copied.' ? 'check' : 'copy'" /> Copy
    </button>
    <span class="told" role="status">{{ told() }}</span>
  `,
  styles: `
    :host {
      display: flex;
      flex-wrap: wrap;
      align-items: center;
      gap: 8px;
    }
    pre {
      flex: 1 1 100%;
      box-sizing: border-box;
      min-width: 0;
      margin: 0;
      padding: 12px;
      overflow: auto;
      border: 1px solid var(--ct-line);
      border-radius: 8px;
      background: var(--ct-shade);
      font:
        0.875rem/1.5 ui-monospace,
        monospace;
      white-space: pre-wrap;
      overflow-wrap: anywhere;
    }
    .told {
      color: var(--ct-quiet);
      font-weight: 600;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class CopyText {
  readonly text = input.required<string>();
  readonly label = input.required<string>();
  protected readonly told = signal('');
  private readonly shown = viewChild.required<ElementRef<HTMLElement>>('shown');

  protected async copy(): Promise<void> {
    try {
      await navigator.clipboard.writeText(this.text());
      this.told.set('Copied.');
    } catch {
      // Not allowed, or a page that came over plain http: the person copies by hand what is selected now.
      getSelection()?.selectAllChildren(this.shown().nativeElement);
      this.told.set('It is selected: copy it by hand.');
    }
  }
}
