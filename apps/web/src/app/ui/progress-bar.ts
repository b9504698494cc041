import { ChangeDetectionStrategy, Component, input } from '@angular/core';

/** How much is done: a bar, and the same in figures. */
@Component({
  selector: 'app-progress-bar',
  template: `
    <span class="track" aria-hidden="true"><span [style.width.%]="percent()"></span></span>
    <span class="figure">{{ percent() }} %</span>
  `,
  styles: `
    :host {
      display: inline-flex;
      align-items: center;
      gap: 8px;
      width: 100%;
      min-width: 96px;
    }
    .track {
      flex: 1;
      height: 8px;
      overflow: hidden;
      border-radius: 4px;
      background: var(--ct-shade);
      box-shadow: inset 0 0 0 1px var(--ct-line);
    }
    .track > span {
      display: block;
      height: 100%;
      background: var(--ct-spruce);
    }
    .figure {
      min-width: 3.2em;
      font-weight: 600;
      text-align: end;
      white-space: nowrap;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ProgressBar {
  /** Whole percent, 0 to 100. */
  readonly percent = input.required<number>();
}
