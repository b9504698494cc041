import { ChangeDetectionStrategy, Component } from '@angular/core';
import { RouterLink } from '@angular/router';
import { StatePanel } from '../ui/state-panel';

@Component({
  selector: 'app-not-found-page',
  imports: [RouterLink, StatePanel],
  template: `
    <h1 class="ct-hidden">Not found</h1>
    <app-state-panel heading="There is no page at this address." icon="info">
      It may have been typed wrong, or what it showed is gone.
      <a actions class="ct-button primary" routerLink="/">To the first page</a>
    </app-state-panel>
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class NotFoundPage {}
