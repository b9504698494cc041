import { CdkDropListGroup } from '@angular/cdk/drag-drop';
import { CdkScrollable } from '@angular/cdk/scrolling';
import {
  afterRenderEffect,
  ChangeDetectionStrategy,
  Component,
  computed,
  ElementRef,
  inject,
} from '@angular/core';
import { RouterLink } from '@angular/router';
import { dateWords } from '#shared/time/words';
import { placeWords } from '#shared/words/card-words';
import { LiveFeed } from '../graphql/live-feed';
import { ServerClock } from '../graphql/server-clock';
import { Session } from '../session/session';
import { FailedPanel } from '../ui/failed-panel';
import { Icon } from '../ui/icon';
import { Skeleton } from '../ui/skeleton';
import { StatePanel } from '../ui/state-panel';
import { clockTime } from '../ui/when';
import { SHELVES } from './board-columns';
import { cardTowards } from './carry';
import { CautionPanel } from './caution-panel';
import { EarlierPanel } from './earlier-panel';
import { FilterBar } from './filter-bar';
import { FloorBoard } from './floor-board';
import { FloorCarry } from './floor-carry';
import { FloorColumn } from './floor-column';
import { FloorCommands } from './floor-commands';
import { isFiltered, NO_FILTERS } from './floor-filters';
import { FloorJudging } from './floor-judging';
import { FloorPanels } from './floor-panels';
import { FloorStore } from './floor-store';
import { FocusKeeper } from './focus-keeper';
import { GivePanel } from './give-panel';
import { MovePanel } from './move-panel';
import { NewBatchPanel } from './new-batch-panel';
import { NoticeBar } from './notice-bar';
import { Notices } from './notices';

/** The board of the shop: a column for each stage, each with what is ready, worked on and holding. */
@Component({
  selector: 'app-floor-page',
  imports: [
    CautionPanel,
    CdkDropListGroup,
    CdkScrollable,
    EarlierPanel,
    FailedPanel,
    FilterBar,
    FloorColumn,
    FocusKeeper,
    GivePanel,
    Icon,
    MovePanel,
    NewBatchPanel,
    NoticeBar,
    RouterLink,
    Skeleton,
    StatePanel,
  ],
  templateUrl: './floor-page.html',
  styleUrl: './floor-page.scss',
  providers: [
    FloorStore,
    FloorBoard,
    FloorCarry,
    FloorCommands,
    FloorJudging,
    FloorPanels,
    Notices,
  ],
  host: { class: 'ct-bench', '[class.stale]': 'isStale()' },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class FloorPage {
  protected readonly store = inject(FloorStore);
  protected readonly board = inject(FloorBoard);
  protected readonly carry = inject(FloorCarry);
  protected readonly panels = inject(FloorPanels);
  private readonly clock = inject(ServerClock);
  private readonly feed = inject(LiveFeed);
  private readonly session = inject(Session);
  private readonly root = inject<ElementRef<HTMLElement>>(ElementRef).nativeElement;

  protected readonly isStale = computed(() => this.feed.state() === 'offline');
  /** The day and the clock; while the line is down, those of the last message. */
  protected readonly when = computed(() => {
    const zone = this.board.zone();
    const since = this.feed.since();
    if (this.isStale() && since !== null) return `as of ${clockTime(since, zone)}`;
    const now = this.clock.minute();
    return now === 0 ? '' : `${dateWords(this.board.today())}, ${clockTime(now, zone)}`;
  });
  protected readonly air = computed(() => {
    const air = this.store.around()?.air;
    if (!air) return '';
    const humidity = air.humidityPercent === null ? '' : `, ${air.humidityPercent} %`;
    return `shop ${Math.round(air.temperatureTenthsC / 10)} °C${humidity}`;
  });
  protected readonly mayMake = computed(
    () => this.session.may('makeBatches') && !this.isStale() && this.store.around() !== null,
  );
  protected readonly isEmpty = computed(
    () => this.store.around() !== null && this.store.open().length === 0,
  );
  protected readonly isFilteredOut = computed(
    () => !this.isEmpty() && this.board.shown().length === 0 && isFiltered(this.board.filters()),
  );
  protected readonly hasDesigns = computed(() => (this.store.around()?.designs.size ?? 0) > 0);
  protected readonly visible = computed(() =>
    this.board.narrow()
      ? this.board.columns().filter((column) => column.place === this.board.picked())
      : this.board.columns(),
  );
  protected readonly template = computed(() =>
    this.visible()
      .map(({ place }) => (this.board.isColumn(place) ? 'minmax(var(--column), 1fr)' : '44px'))
      .join(' '),
  );
  /** The batch that the open dialog is about. */
  protected readonly subject = computed(() => {
    const panel = this.panels.panel();
    return panel && 'batchId' in panel ? (this.store.all().get(panel.batchId) ?? null) : null;
  });
  protected readonly placeWords = placeWords;
  protected readonly none = NO_FILTERS;
  protected readonly stages = Array.from({ length: 7 });

  constructor() {
    // The picked stage, and the column that a card is carried over by keys, are where one can see them.
    afterRenderEffect({
      write: () => {
        const held = this.carry.held();
        const shown =
          held?.by === 'KEYS' ? `[data-place="${held.over}"]` : '.picker [aria-current="true"]';
        if (held?.by === 'KEYS' || this.board.picked()) {
          const near = { inline: 'nearest', block: 'nearest' } as const;
          this.root.querySelector(shown)?.scrollIntoView(near);
        }
      },
    });
  }

  /** Arrow keys lead from card to card while none is carried. */
  protected walk(event: KeyboardEvent): void {
    const on = (event.target as Element).closest('[data-part="card"]');
    if (!on || on !== event.target || event.ctrlKey || event.metaKey || event.altKey) return;
    const from = on.closest('[data-batch]')?.getAttribute('data-batch') ?? '';
    const columns = this.visible().map((column) =>
      SHELVES.flatMap((shelf) => column[shelf].map((card) => card.id)),
    );
    const to = cardTowards(columns, from, event.key);
    if (to === null) return;
    event.preventDefault();
    this.root
      .querySelector<HTMLElement>(`[data-batch="${CSS.escape(to)}"] [data-part="card"]`)
      ?.focus();
  }

  protected newBatch(): void {
    this.panels.open({ kind: 'NEW_BATCH' });
  }
}
