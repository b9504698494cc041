import { ChangeDetectionStrategy, Component } from '@angular/core';

/** The product's mark: an end-grain block, four of them turned into a two-by-two board. */
@Component({
  selector: 'app-mark',
  template: '<img src="favicon.svg" alt="" width="28" height="28" />',
  styles: `
    :host,
    img {
      display: block;
      flex: none;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class Mark {}
