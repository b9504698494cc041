import {
  ChangeDetectionStrategy,
  Component,
  computed,
  inject,
  input,
  viewChild,
} from '@angular/core';
import { may } from '#shared/members/permissions';
import { Initials } from '../ui/initials';
import { FloorCommands } from './floor-commands';
import { FloorPanels } from './floor-panels';
import { FloorStore } from './floor-store';
import type { BoardBatch } from './floor-view';
import { PanelFrame } from './panel-frame';

/** Gives a batch to a person, or to no one. */
@Component({
  selector: 'app-give-panel',
  imports: [Initials, PanelFrame],
  template: `
    <app-panel-frame [heading]="'Give ' + batch().floor.code + ' to'" (closed)="panels.close()">
      <ul>
        @for (person of people(); track person.id) {
          <li>
            <button
              type="button"
              class="ct-button choice"
              [attr.aria-pressed]="person.id === batch().floor.assignedTo"
              (click)="give(person.id)"
            >
              <app-initials [initials]="person.initials" [name]="''" aria-hidden="true" />
              {{ person.name }}
              @if (person.id === batch().floor.assignedTo) {
                <span class="said">has it</span>
              }
            </button>
          </li>
        }
        <li>
          <button type="button" class="ct-button choice" (click)="give(null)">No one</button>
        </li>
      </ul>
    </app-panel-frame>
  `,
  styleUrl: './choice-list.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class GivePanel {
  private readonly commands = inject(FloorCommands);
  private readonly store = inject(FloorStore);
  protected readonly panels = inject(FloorPanels);
  private readonly frame = viewChild.required(PanelFrame);

  readonly batch = input.required<BoardBatch>();

  /** Those who may work on the floor. */
  protected readonly people = computed(() =>
    [...(this.store.around()?.people.values() ?? [])].filter((person) =>
      may(person.roles, 'moveBatches'),
    ),
  );

  protected give(memberId: string | null): void {
    const { id } = this.batch().floor;
    this.frame().close();
    void this.commands.assign(id, memberId);
  }
}
