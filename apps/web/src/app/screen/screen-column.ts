import {
  afterNextRender,
  ChangeDetectionStrategy,
  Component,
  computed,
  DestroyRef,
  type ElementRef,
  inject,
  input,
  signal,
  viewChild,
} from '@angular/core';

/** The height of a row, in the display's own letter height. */
const ROW_EM = 4;

/** A column of a display that nobody scrolls: it knows how many rows fit, and says how many more there are. */
@Component({
  selector: 'app-screen-column',
  template: `
    <h2>{{ heading() }}</h2>
    <div #body class="body"><ng-content /></div>
    <p class="more">
      @if (count() > shown()) {
        + {{ count() - shown() }} more
      } @else {
        <ng-content select="[under]" />
      }
    </p>
  `,
  host: { '[style.--screen-row]': 'rowHeight' },
  styles: `
    :host {
      display: grid;
      grid-template-rows: auto 1fr 1.6em;
      min-width: 0;
      min-height: 0;
    }
    h2 {
      margin: 0 0 0.5em;
      color: var(--ct-quiet);
      font-size: 1em;
      letter-spacing: 0.06em;
      text-transform: uppercase;
    }
    .body {
      min-height: 0;
      overflow: hidden;
    }
    .more {
      margin: 0;
      overflow: hidden;
      color: var(--ct-quiet);
      font-weight: 600;
      line-height: 1.6em;
      text-overflow: ellipsis;
      white-space: nowrap;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ScreenColumn {
  private readonly body = viewChild.required<ElementRef<HTMLElement>>('body');
  private readonly room = signal(0);

  readonly heading = input.required<string>();
  /** How many rows there are to show. */
  readonly count = input.required<number>();

  /** How many rows fit, or all when they do. */
  readonly shown = computed(() => Math.min(this.count(), this.room()));
  protected readonly rowHeight = `${ROW_EM}em`;

  constructor() {
    const destroyed = inject(DestroyRef);
    afterNextRender(() => {
      const body = this.body().nativeElement;
      const observer = new ResizeObserver(() => {
        const em = parseFloat(getComputedStyle(body).fontSize);
        this.room.set(Math.max(1, Math.floor((body.clientHeight + 1) / (em * ROW_EM))));
      });
      observer.observe(body);
      destroyed.onDestroy(() => observer.disconnect());
    });
  }
}
