import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import { Mark } from '../ui/mark';

/** What stands around the pages of somebody who is not signed in yet. */
@Component({
  selector: 'app-entry-frame',
  imports: [Mark],
  template: `
    <main>
      <div class="brand"><app-mark /> Clamptide</div>
      <h1>{{ heading() }}</h1>
      <ng-content />
    </main>
  `,
  styles: `
    :host {
      display: grid;
      place-items: start center;
      min-height: 100dvh;
      box-sizing: border-box;
      padding: min(12vh, 96px) 16px 32px;
    }
    main {
      display: grid;
      gap: 16px;
      width: min(420px, 100%);
      box-sizing: border-box;
      padding: 28px;
      border: 1px solid var(--ct-line);
      border-radius: 14px;
      background: var(--ct-surface);
    }
    .brand {
      display: flex;
      align-items: center;
      gap: 10px;
      font-size: 1.0625rem;
      font-weight: 800;
      letter-spacing: -0.01em;
    }
    h1 {
      margin: 0;
    }
    @media (max-width: 480px) {
      main {
        padding: 20px;
      }
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class EntryFrame {
  readonly heading = input.required<string>();
}
