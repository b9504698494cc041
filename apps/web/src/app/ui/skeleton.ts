import { ChangeDetectionStrategy, Component, input } from '@angular/core';

/** A grey stand-in with the size of what will come. Lay out several of them like the page they stand for. */
@Component({
  selector: 'app-skeleton',
  template: '',
  host: { 'aria-hidden': 'true', '[style.width]': 'width()', '[style.height]': 'height()' },
  styles: `
    :host {
      display: block;
      border-radius: 8px;
      background: var(--ct-shade);
      animation: breathe 1.6s ease-in-out infinite alternate;
    }
    @keyframes breathe {
      to {
        opacity: 0.45;
      }
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class Skeleton {
  readonly width = input('100%');
  readonly height = input('1.2em');
}
