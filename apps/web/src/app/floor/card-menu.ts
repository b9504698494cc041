import { CdkMenu, CdkMenuItem } from '@angular/cdk/menu';
import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { Router } from '@angular/router';
import { may } from '#shared/members/permissions';
import { clockWords } from '#shared/time/words';
import { Icon } from '../ui/icon';
import type { BoardCard } from './board-card';
import { groupActions, groupWords } from './card-details';
import { FloorBoard } from './floor-board';
import { FloorCommands } from './floor-commands';
import { FloorJudging } from './floor-judging';
import { FloorPanels } from './floor-panels';
import { overridesOf } from './override-offers';
import { ServerClock } from '../graphql/server-clock';

/** Everything that can be done with a batch, for whoever does not drag. */
@Component({
  selector: 'app-card-menu',
  imports: [CdkMenu, CdkMenuItem, Icon],
  template: `
    <div cdkMenu class="ct-menu">
      @for (item of items(); track item.words) {
        <button
          type="button"
          cdkMenuItem
          [cdkMenuItemDisabled]="whyNot() !== null && !item.isReading"
          [class.dangerous]="item.isDangerous"
          (cdkMenuItemTriggered)="item.run()"
        >
          <app-icon [name]="item.icon" />{{ item.words }}
        </button>
      }
      @if (whyNot(); as words) {
        <p>{{ words }}</p>
      }
    </div>
  `,
  styleUrl: './menu.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class CardMenu {
  private readonly board = inject(FloorBoard);
  private readonly clock = inject(ServerClock);
  private readonly commands = inject(FloorCommands);
  private readonly judging = inject(FloorJudging);
  private readonly panels = inject(FloorPanels);
  private readonly router = inject(Router);

  readonly card = input.required<BoardCard>();
  protected readonly whyNot = this.judging.whyNot;

  protected readonly items = computed(() => {
    const { id, batch, card } = this.card();
    const [zone, now] = [this.board.zone(), this.clock.minute()];
    const actor = this.judging.actor();
    const steps = groupActions(batch.floor, card.actions).flatMap((group) => {
      const act = (pieces: readonly number[]) => () =>
        void (group.kind === 'START'
          ? this.commands.start(id, group.step.key, pieces)
          : this.commands.finish(id, group.step.key, pieces));
      const item = (pieces: readonly number[]) => ({
        icon: group.kind === 'START' ? ('right' as const) : ('check' as const),
        words: groupWords({ ...group, pieces }, zone, now),
        run: act(pieces),
      });
      const single = group.pieces.map((piece) => item([piece]));
      if (single.length < 2) return single;
      const all = item(group.pieces);
      return [...single, { ...all, words: `${all.words}, all ${group.pieces.length}` }];
    });
    const overrides = overridesOf(
      this.judging.view(batch, this.clock.minute()),
      batch.floor,
      card.holds,
      actor,
    ).map(({ words, command }) => ({
      icon: 'warning' as const,
      words,
      isDangerous: true,
      run: () => void this.commands.override(id, command),
    }));
    const { undo } = batch;
    const isMine = undo?.by === actor.memberId || may(actor.roles, 'undoOthers');
    const canUndo = undo && isMine && Date.parse(undo.until) > now;
    return [
      ...steps,
      ...(steps.length > 0
        ? [
            {
              icon: 'clock' as const,
              words: 'It happened earlier …',
              run: () => this.panels.open({ kind: 'EARLIER', batchId: id }),
            },
          ]
        : []),
      {
        icon: 'floor' as const,
        words: 'Move to …',
        run: () => this.panels.open({ kind: 'MOVE', batchId: id }),
      },
      {
        icon: 'person' as const,
        words: 'Give to …',
        run: () => this.panels.open({ kind: 'GIVE', batchId: id }),
      },
      ...overrides,
      ...(canUndo
        ? [
            {
              icon: 'undo' as const,
              words: `Undo the last command (until ${clockWords(zone, now, Date.parse(undo.until))})`,
              run: () => void this.commands.undo(id, undo.event),
            },
          ]
        : []),
      {
        icon: 'info' as const,
        words: 'Pieces and history',
        isReading: true,
        run: () => void this.router.navigate(['/batch', batch.floor.code]),
      },
    ].map((item) => ({ isDangerous: false, isReading: false, ...item }));
  });
}
