import { ChangeDetectionStrategy, Component, input, output } from '@angular/core';
import { StatePanel } from './state-panel';

/** Something could not be read: what happened, what is safe, try again. */
@Component({
  selector: 'app-failed-panel',
  imports: [StatePanel],
  template: `
    <app-state-panel [heading]="heading()" icon="warning">
      <p>{{ text() }}</p>
      <button actions type="button" class="ct-button primary" (click)="retry.emit()">
        Try again
      </button>
    </app-state-panel>
  `,
  host: { role: 'alert' },
  styles: `
    p {
      margin: 0;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class FailedPanel {
  readonly heading = input('This could not be read.');
  readonly text = input(
    'The server did not answer. Nothing was changed, and what was saved before is safe.',
  );
  readonly retry = output();
}
