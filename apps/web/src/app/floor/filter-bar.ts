import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { may } from '#shared/members/permissions';
import { Icon } from '../ui/icon';
import { FloorBoard } from './floor-board';
import { isFiltered, NO_FILTERS, NOBODY } from './floor-filters';
import { FloorStore } from './floor-store';

/** Which cards are shown: by person, design, due date, lateness. */
@Component({
  selector: 'app-filter-bar',
  imports: [Icon],
  template: `
    @if (board.narrow()) {
      <button
        type="button"
        class="ct-button toggle"
        aria-controls="filters"
        [attr.aria-label]="isFiltered() ? 'Filter: some cards are left out' : 'Filter'"
        [attr.aria-expanded]="isOpen()"
        [class.set]="isFiltered()"
        (click)="isOpen.set(!isOpen())"
      >
        <app-icon name="filter" />
      </button>
    }
    @if (!board.narrow() || isOpen()) {
      <div id="filters" class="filters" role="group" aria-label="Filter the cards">
        <select
          #who
          class="ct-input"
          aria-label="Person"
          [class.set]="filters().who"
          (change)="board.filter({ who: who.value || null })"
        >
          <option value="">Everyone</option>
          @for (person of people(); track person.id) {
            <option [value]="person.id" [selected]="person.id === filters().who">
              {{ person.name }}
            </option>
          }
          <option [value]="nobody" [selected]="filters().who === nobody">No one yet</option>
        </select>
        <select
          #design
          class="ct-input"
          aria-label="Design"
          [class.set]="filters().design"
          (change)="board.filter({ design: design.value || null })"
        >
          <option value="">All designs</option>
          @for (each of designs(); track each.id) {
            <option [value]="each.id" [selected]="each.id === filters().design">
              {{ each.name }}
            </option>
          }
        </select>
        <select
          #due
          class="ct-input"
          aria-label="Due"
          [class.set]="filters().due"
          (change)="chooseDue(due.value)"
        >
          <option value="" [selected]="filters().due === null">Any due date</option>
          <option value="week" [selected]="filters().due === 'week'">Due this week</option>
          <option value="date" [selected]="isDate()">Due on …</option>
        </select>
        @if (isDate()) {
          <input
            #date
            class="ct-input date"
            type="date"
            aria-label="Due on"
            [value]="filters().due"
            (change)="date.value && board.filter({ due: date.value })"
          />
        }
        <button
          type="button"
          class="ct-button late"
          [class.set]="filters().late"
          [attr.aria-pressed]="filters().late"
          (click)="board.filter({ late: !filters().late })"
        >
          Late only
        </button>
        @if (isFiltered()) {
          <button type="button" class="ct-button bare" (click)="board.filter(none)">
            <app-icon name="close" /> Show all
          </button>
        }
      </div>
    }
  `,
  styles: `
    :host {
      display: contents;
    }
    .filters {
      display: flex;
      flex-wrap: wrap;
      gap: 8px;
    }
    .ct-input {
      width: auto;
      min-height: 40px;
      padding: 4px 8px;
      border-color: var(--ct-line);
      font-weight: 600;
    }
    .late {
      min-height: 40px;
      border-color: var(--ct-line);
      font-weight: 600;
    }
    .bare {
      min-height: 40px;
    }
    .toggle {
      min-width: 56px;
      padding: 0;
    }
    .set {
      border-color: var(--ct-spruce);
      background: var(--ct-spruce-wash);
      color: var(--ct-spruce);
    }
    @media (pointer: coarse) {
      .ct-input,
      .late,
      .bare {
        min-height: 56px;
      }
    }
    @media (max-width: 719px) {
      .filters {
        flex-basis: 100%;
        order: 9;
      }
      .filters > * {
        flex: 1 1 40%;
      }
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class FilterBar {
  private readonly store = inject(FloorStore);
  protected readonly board = inject(FloorBoard);

  protected readonly filters = this.board.filters;
  protected readonly isFiltered = computed(() => isFiltered(this.filters()));
  protected readonly isDate = computed(() => {
    const { due } = this.filters();
    return due !== null && due !== 'week';
  });
  protected readonly isOpen = signal(false);
  protected readonly nobody = NOBODY;
  protected readonly none = NO_FILTERS;
  protected readonly designs = computed(() => [...(this.store.around()?.designs.values() ?? [])]);
  protected readonly people = computed(() =>
    [...(this.store.around()?.people.values() ?? [])].filter((person) =>
      may(person.roles, 'moveBatches'),
    ),
  );

  protected chooseDue(choice: string): void {
    const due = choice === 'date' ? this.board.today() : choice || null;
    this.board.filter({ due });
  }
}
