import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import { Icon } from './icon';
import type { IconName } from './icon-paths';

/**
 * What a page shows in place of its content: nothing there yet, nothing found, not for this person.
 * The body says what the page is for; actions go into `[actions]`.
 */
@Component({
  selector: 'app-state-panel',
  imports: [Icon],
  template: `
    <app-icon [name]="icon()" />
    <h2>{{ heading() }}</h2>
    <div class="body"><ng-content /></div>
    <div class="actions"><ng-content select="[actions]" /></div>
  `,
  styles: `
    :host {
      display: grid;
      justify-items: center;
      gap: 8px;
      max-width: 480px;
      margin: 48px auto;
      padding: 0 20px;
      text-align: center;
    }
    app-icon {
      width: 40px;
      height: 40px;
      color: var(--ct-quiet);
    }
    h2,
    .body {
      margin: 0;
    }
    .body {
      color: var(--ct-quiet);
    }
    .actions {
      display: flex;
      flex-wrap: wrap;
      justify-content: center;
      gap: 8px;
      margin-top: 8px;
    }
    .actions:empty {
      display: none;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class StatePanel {
  readonly heading = input.required<string>();
  readonly icon = input<IconName>('info');
}
