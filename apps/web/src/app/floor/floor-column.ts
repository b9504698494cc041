import {
  CdkDrag,
  CdkDragPlaceholder,
  CdkDropList,
  type CdkDragEnd,
  type CdkDragMove,
} from '@angular/cdk/drag-drop';
import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import type { Place } from '#shared/route/route';
import { placeWords } from '#shared/words/card-words';
import { BatchCard } from './batch-card';
import type { BoardCard } from './board-card';
import { COLUMNS, SHELVES, type BoardColumn } from './board-columns';
import { FloorBoard } from './floor-board';
import { FloorCarry } from './floor-carry';
import { FloorJudging } from './floor-judging';
import { LoadBar } from './load-bar';
import { loadWords } from './resource-load';

const SHELF_NAMES = { READY: 'Ready', WORKING: 'Working', HOLDING: 'Holding' };

/** One place on the Floor: its load, its three shelves, and what it says to a card in somebody's hand. */
@Component({
  selector: 'app-floor-column',
  imports: [BatchCard, CdkDrag, CdkDragPlaceholder, CdkDropList, LoadBar],
  templateUrl: './floor-column.html',
  styleUrl: './floor-column.scss',
  host: {
    '[class.strip]': '!isColumn()',
    '[class.over]': 'isOver()',
    '[attr.data-place]': 'column().place',
  },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class FloorColumn {
  protected readonly board = inject(FloorBoard);
  protected readonly carry = inject(FloorCarry);
  private readonly judging = inject(FloorJudging);

  readonly column = input.required<BoardColumn>();

  protected readonly delay = { touch: 300, mouse: 0 };
  protected readonly name = computed(() => placeWords(this.column().place));
  protected readonly isColumn = computed(() => this.board.isColumn(this.column().place));
  protected readonly isEdge = computed(() => {
    const { place } = this.column();
    return (place === 'QUEUED' || place === 'READY') && !this.board.narrow();
  });
  protected readonly load = computed(() => this.board.loads().get(this.column().place) ?? null);
  protected readonly loadWords = computed(() =>
    (this.load()?.resources ?? []).map(loadWords).join(' · '),
  );
  protected readonly shelves = computed(() => {
    const column = this.column();
    // Before and after the stages nothing is worked on and nothing holds.
    if (column.place === 'QUEUED' || column.place === 'READY') {
      const cards = SHELVES.flatMap((shelf) => column[shelf]);
      return [{ key: 'READY', name: null, cards }];
    }
    return SHELVES.map((shelf) => ({
      key: shelf,
      name: SHELF_NAMES[shelf],
      cards: column[shelf],
    }));
  });
  protected readonly said = computed(() => this.carry.verdicts()?.get(this.column().place) ?? null);
  protected readonly isOver = computed(() => {
    const held = this.carry.held();
    return held?.over === this.column().place && held.over !== held.from;
  });
  protected readonly noDrag = computed(() => this.board.narrow() || this.judging.whyNot() !== null);

  protected readonly accepts = (_drag: unknown, list: CdkDropList<Place>): boolean =>
    this.carry.accepts(list.data);

  protected lift(card: BoardCard): void {
    this.carry.lift(card);
  }

  protected hover({ pointerPosition }: CdkDragMove): void {
    this.carry.hover(placeUnder(pointerPosition));
  }

  protected ended({ dropPoint }: CdkDragEnd): void {
    this.carry.letGo(placeUnder(dropPoint));
  }
}

/** The place under the pointer. A place that refuses is never entered, so the drag itself does not know of it. */
function placeUnder({ x, y }: { readonly x: number; readonly y: number }): Place | null {
  for (const element of document.elementsFromPoint(x, y)) {
    const under = element.closest('[data-place]')?.getAttribute('data-place');
    if (under) return COLUMNS.find((place) => place === under) ?? null;
  }
  return null;
}
