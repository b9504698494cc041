import { computed, DestroyRef, inject, Injectable, linkedSignal, signal } from '@angular/core';
import { toSignal } from '@angular/core/rxjs-interop';
import { ActivatedRoute, Router } from '@angular/router';
import { STAGES, type Place } from '#shared/route/route';
import { ServerClock } from '../graphql/server-clock';
import { Session } from '../session/session';
import { localDate } from '../ui/when';
import { CardCache, type BoardCard } from './board-card';
import { COLUMNS, columnsOf, keepColumns, sameItems, type BoardColumn } from './board-columns';
import { passes, readFilters, writeFilters, type FloorFilters } from './floor-filters';
import { FloorStore } from './floor-store';
import { stageLoad } from './resource-load';

/** Below this width one column is shown at a time. */
const NARROW = '(max-width: 719px)';

/** What the Floor shows of its batches: which cards, on which shelves, through which filters. */
@Injectable()
export class FloorBoard {
  private readonly store = inject(FloorStore);
  private readonly clock = inject(ServerClock);
  private readonly session = inject(Session);
  private readonly router = inject(Router);
  private readonly route = inject(ActivatedRoute);
  private readonly cache = new CardCache();

  readonly zone = computed(() => this.store.around()?.shop.zone ?? this.session.zone());
  readonly today = computed(() => localDate(this.clock.minute(), this.zone()));

  private readonly query = toSignal(this.route.queryParamMap, { requireSync: true });
  readonly filters = computed(() => {
    const query = this.query();
    const read = (name: string) => query.get(name) ?? undefined;
    return readFilters({
      who: read('who'),
      design: read('design'),
      due: read('due'),
      late: read('late'),
    });
  });

  /** Asked each second, and each second the same list unless a batch changed or a hold cleared. */
  readonly cards = computed<readonly BoardCard[]>(
    () => {
      const now = this.clock.now();
      return this.store.open().map((batch) => this.cache.read(batch, now));
    },
    { equal: sameItems },
  );
  readonly shown = computed<readonly BoardCard[]>(
    () => {
      const [filters, today] = [this.filters(), this.today()];
      return this.cards().filter((card) => passes(filteredBy(card), filters, today));
    },
    { equal: sameItems },
  );
  readonly columns = linkedSignal<readonly BoardCard[], readonly BoardColumn[]>({
    source: this.shown,
    computation: (cards, before) => keepColumns(before?.value ?? [], columnsOf(cards)),
  }).asReadonly();

  readonly loads = computed(() => {
    const around = this.store.around();
    if (!around) return new Map<Place, ReturnType<typeof stageLoad>>();
    const floors = this.store.open().map((batch) => batch.floor);
    const routes = [...around.routes.values()];
    const now = this.clock.minute();
    return new Map<Place, ReturnType<typeof stageLoad>>(
      STAGES.map((stage) => [stage, stageLoad(stage, around.shop, routes, floors, now)]),
    );
  });

  private readonly narrowNow = signal(false);
  /** Whether there is room for one column only. */
  readonly narrow = this.narrowNow.asReadonly();
  private readonly opened = signal<ReadonlySet<Place>>(new Set());
  /** The column that is shown where there is room for one. */
  readonly picked = computed<Place>(() => {
    const asked = this.query().get('stage');
    const known = COLUMNS.find((place) => place === asked);
    const busiest = this.columns().find((column) => column.place !== 'QUEUED' && column.count > 0);
    return known ?? busiest?.place ?? 'BLANK';
  });

  constructor() {
    const media = window.matchMedia(NARROW);
    const take = () => this.narrowNow.set(media.matches);
    take();
    media.addEventListener('change', take);
    inject(DestroyRef).onDestroy(() => media.removeEventListener('change', take));
  }

  /** Whether a place is drawn as a column; queued and ready are strips until they are asked for. */
  isColumn(place: Place): boolean {
    return (place !== 'QUEUED' && place !== 'READY') || this.narrow() || this.opened().has(place);
  }

  toggle(place: Place): void {
    this.opened.update((opened) => {
      const after = new Set(opened);
      if (!after.delete(place)) after.add(place);
      return after;
    });
  }

  pick(stage: Place): void {
    this.ask({ stage });
  }

  filter(filters: Partial<FloorFilters>): void {
    this.ask(writeFilters(filters));
  }

  private ask(queryParams: Record<string, string | null>): void {
    void this.router.navigate([], {
      relativeTo: this.route,
      queryParams,
      queryParamsHandling: 'merge',
      replaceUrl: true,
    });
  }
}

function filteredBy(card: BoardCard) {
  return {
    people: card.people,
    designId: card.batch.design.id,
    dueDate: card.batch.floor.dueDate,
    isLate: card.isLate,
  };
}
