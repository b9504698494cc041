import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { ServerClock } from '../graphql/server-clock';
import { Session } from '../session/session';
import { dayTime } from '../ui/when';

/** When the plan expects it to be ready, and whether that keeps the ship-by date: a word and a shape. */
@Component({
  selector: 'app-order-forecast',
  template: `
    @if (when(); as text) {
      <span class="when">{{ text }}</span>
      @if (onTime() !== null) {
        <span class="mark" [class.late]="!onTime()">
          <svg viewBox="0 0 10 10" aria-hidden="true" focusable="false">
            @if (onTime()) {
              <circle cx="5" cy="5" r="4" />
            } @else {
              <path d="M5 0.5l4.800 8.700h-9.600z" />
            }
          </svg>
          {{ onTime() ? 'on time' : 'late' }}
        </span>
      }
    } @else {
      <span class="none">none yet</span>
    }
  `,
  styles: `
    :host {
      display: inline-flex;
      flex-wrap: wrap;
      align-items: baseline;
      gap: 2px 8px;
    }
    .when {
      white-space: nowrap;
    }
    .none {
      color: var(--ct-quiet);
    }
    .mark {
      display: inline-flex;
      align-items: center;
      gap: 5px;
      color: var(--ct-leaf);
      font-weight: 650;
      white-space: nowrap;
    }
    .mark.late {
      color: var(--ct-madder);
    }
    svg {
      flex: none;
      width: 10px;
      height: 10px;
      fill: currentColor;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class OrderForecast {
  private readonly clock = inject(ServerClock);
  private readonly session = inject(Session);

  readonly readyAt = input.required<string | null>();
  /** Null where it is said elsewhere or not known. */
  readonly onTime = input<boolean | null>(null);

  protected readonly when = computed(() => {
    const at = this.readyAt();
    return at === null ? null : dayTime(at, this.session.zone(), this.clock.minute());
  });
}
