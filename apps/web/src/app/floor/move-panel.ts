import {
  ChangeDetectionStrategy,
  Component,
  computed,
  inject,
  input,
  viewChild,
} from '@angular/core';
import { PLACES, type Place } from '#shared/route/route';
import { placeWords } from '#shared/words/card-words';
import { moveTo } from './drop-verdict';
import { FloorCommands } from './floor-commands';
import { FloorJudging } from './floor-judging';
import { FloorPanels } from './floor-panels';
import type { BoardBatch } from './floor-view';
import { PanelFrame } from './panel-frame';

/** Every place, with whether the batch may go there, and why not. All that dragging does, without dragging. */
@Component({
  selector: 'app-move-panel',
  imports: [PanelFrame],
  template: `
    <app-panel-frame [heading]="'Move ' + batch().floor.code" (closed)="panels.close()">
      <ul>
        @for (choice of choices(); track choice.place) {
          <li>
            @if (choice.isOpen) {
              <button type="button" class="ct-button choice" (click)="move(choice.place)">
                {{ choice.name }} <span class="said">{{ choice.words }}</span>
              </button>
            } @else {
              <div class="refused">
                <strong>{{ choice.name }}</strong>
                <p>{{ choice.words }}</p>
                @if (choice.canOverride) {
                  <button
                    type="button"
                    class="ct-button danger"
                    [attr.aria-label]="'Override the hold to move to ' + choice.name"
                    (click)="override(choice.place)"
                  >
                    Override the hold …
                  </button>
                }
              </div>
            }
          </li>
        }
      </ul>
    </app-panel-frame>
  `,
  styleUrl: './choice-list.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class MovePanel {
  private readonly commands = inject(FloorCommands);
  private readonly judging = inject(FloorJudging);
  protected readonly panels = inject(FloorPanels);
  private readonly frame = viewChild.required(PanelFrame);

  readonly batch = input.required<BoardBatch>();

  protected readonly choices = computed(() => {
    const batch = this.batch();
    return PLACES.map((place) => {
      const verdict = this.judging.drop(batch, place);
      const choice = { place, name: placeWords(place), canOverride: false };
      switch (verdict.kind) {
        case 'HERE':
          return { ...choice, isOpen: false, words: 'It stands here.' };
        case 'ACCEPT': {
          const forward = place === 'SHIPPED' ? 'it leaves the shop' : 'ready there';
          return {
            ...choice,
            isOpen: true,
            words: verdict.isRework ? 'back, with a reason' : forward,
          };
        }
        case 'REFUSE':
          return {
            ...choice,
            isOpen: false,
            words: this.judging.sentence(batch, verdict.refusal),
            canOverride:
              verdict.refusal.code === 'HOLD_RUNNING' &&
              this.judging.cautions(batch, moveTo(place)) !== null,
          };
      }
    });
  });

  protected move(place: Place): void {
    const { id } = this.batch().floor;
    this.frame().close();
    void this.commands.move(id, place);
  }

  protected override(place: Place): void {
    const { id } = this.batch().floor;
    this.frame().close();
    void this.commands.override(id, moveTo(place));
  }
}
