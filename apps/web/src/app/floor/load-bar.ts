import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import type { LoadBar as Load } from './resource-load';

/** Up to here every clamp or place is a segment of its own; beyond, segments would be hairs. */
const MOST_SEGMENTS = 40;

/** What of a station or of the clamps is under work, what is kept by waits, and what is free. The head says it in words. */
@Component({
  selector: 'app-load-bar',
  template: '',
  host: {
    'aria-hidden': 'true',
    '[style.--worked]': 'worked()',
    '[style.--taken]': 'taken()',
    '[style.--segment]': 'segment()',
  },
  styles: `
    :host {
      display: block;
      height: 6px;
      background: linear-gradient(
        to right,
        var(--ct-spruce) 0 var(--worked),
        var(--ct-resin) 0 var(--taken),
        var(--ct-line) 0
      );
    }
    :host::after {
      content: '';
      display: block;
      height: 100%;
      background: repeating-linear-gradient(
        to right,
        transparent 0 calc(var(--segment) - 2px),
        var(--ct-paper) 0 var(--segment)
      );
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class LoadBar {
  readonly load = input.required<Load>();

  protected readonly worked = computed(() => share(this.load().worked, this.load().capacity));
  protected readonly taken = computed(() =>
    share(this.load().worked + this.load().held, this.load().capacity),
  );
  protected readonly segment = computed(() => {
    const { capacity } = this.load();
    return capacity > MOST_SEGMENTS ? '102%' : `calc(100% / ${Math.max(1, capacity)})`;
  });
}

function share(part: number, whole: number): string {
  if (whole <= 0) return '0%';
  return `${Math.min(100, (100 * part) / whole)}%`;
}
