import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { Icon } from '../ui/icon';
import { Notices } from './notices';

/** At the foot of the page: what was done, with the way back; or why something may not be done. */
@Component({
  selector: 'app-notice-bar',
  imports: [Icon],
  template: `
    <div class="place" [attr.role]="'status'" aria-live="polite" aria-atomic="true">
      @if (notices.notice(); as notice) {
        <div class="notice" [class.refusal]="notice.isRefusal">
          <app-icon [name]="notice.isRefusal ? 'warning' : 'check'" />
          <span class="text">{{ notice.text }}</span>
          @if (notice.action; as action) {
            <button type="button" class="ct-button" (click)="act(action.run)">
              {{ action.name }}
            </button>
          }
          <button
            type="button"
            class="ct-button bare"
            aria-label="Close this message"
            (click)="notices.close()"
          >
            <app-icon name="close" />
          </button>
        </div>
      }
    </div>
  `,
  styles: `
    .place {
      position: fixed;
      z-index: 20;
      inset: auto 0 calc(var(--tabs, 0px) + 14px) 0;
      display: flex;
      justify-content: center;
      padding: 0 12px;
      pointer-events: none;
    }
    .notice {
      display: flex;
      align-items: center;
      gap: 10px;
      max-width: 720px;
      padding: 8px 8px 8px 14px;
      border: 1px solid var(--ct-line);
      border-left: 5px solid var(--ct-spruce);
      border-radius: 10px;
      background: var(--ct-surface);
      color: var(--ct-ink);
      box-shadow: 0 10px 30px color-mix(in srgb, var(--ct-shadow) 26%, transparent);
      font-weight: 600;
      pointer-events: auto;
    }
    .notice > app-icon {
      color: var(--ct-spruce);
    }
    .refusal {
      border-left-color: var(--ct-madder);
    }
    .refusal > app-icon {
      color: var(--ct-madder);
    }
    .text {
      flex: 1;
    }
    .ct-button:not(.bare) {
      flex: none;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class NoticeBar {
  protected readonly notices = inject(Notices);

  protected act(run: () => void): void {
    this.notices.close();
    run();
  }
}
