import { CdkMenu, CdkMenuItem } from '@angular/cdk/menu';
import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { piecesName } from '#shared/words/command-words';
import type { ActionGroup } from './card-details';
import { FloorCommands } from './floor-commands';

/** On which of several pieces the next action is: each by itself, or all. */
@Component({
  selector: 'app-piece-menu',
  imports: [CdkMenu, CdkMenuItem],
  template: `
    <div cdkMenu class="ct-menu">
      @for (choice of choices(); track choice.words) {
        <button type="button" cdkMenuItem (cdkMenuItemTriggered)="act(choice.pieces)">
          {{ choice.words }}
        </button>
      }
    </div>
  `,
  styleUrl: './menu.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PieceMenu {
  private readonly commands = inject(FloorCommands);

  readonly batchId = input.required<string>();
  readonly group = input.required<ActionGroup>();

  protected readonly choices = computed(() => {
    const { kind, step, pieces } = this.group();
    const verb = kind === 'START' ? 'Start' : 'Finish';
    const words = (on: readonly number[], all: boolean) =>
      `${verb} ${step.name}, ${piecesName(step.scope, on, all)}`;
    return [
      ...pieces.map((piece) => ({ words: words([piece], false), pieces: [piece] })),
      { words: words(pieces, true), pieces },
    ];
  });

  protected act(pieces: readonly number[]): void {
    const { kind, step } = this.group();
    if (kind === 'START') void this.commands.start(this.batchId(), step.key, pieces);
    else void this.commands.finish(this.batchId(), step.key, pieces);
  }
}
