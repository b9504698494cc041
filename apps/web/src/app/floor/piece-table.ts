import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import type { RouteStep, StepScope } from '#shared/route/route';
import { holdWords, pieceName } from '#shared/words/card-words';
import { ServerClock } from '../graphql/server-clock';
import { momentOf } from './board-card';
import { FloorCommands } from './floor-commands';
import { FloorJudging } from './floor-judging';
import type { BoardBatch } from './floor-view';
import { pieceRows, type StepCell } from './piece-rows';
import { StepState } from './step-state';

/** The panels or the blocks of a batch, each with the chain of its steps. */
@Component({
  selector: 'app-piece-table',
  imports: [StepState],
  template: `
    <div class="ct-scroll" tabindex="0" role="group" [attr.aria-label]="title()">
      <table class="ct-table">
        <thead>
          <tr>
            <th scope="col">{{ title() }}</th>
            @for (step of steps(); track step.key) {
              <th scope="col">{{ nameOf(step) }}</th>
            }
          </tr>
        </thead>
        <tbody>
          @for (row of rows(); track row.piece) {
            <tr>
              <th scope="row">{{ pieceName(row.scope, row.piece) }}</th>
              @for (cell of row.cells; track cell.step.key) {
                <td [class.holding]="cell.state.kind === 'HOLDING'">
                  <app-step-state [cell]="cell" [isOff]="isOff()" (acted)="act(cell, $event)" />
                </td>
              }
            </tr>
          }
        </tbody>
      </table>
    </div>
  `,
  styles: `
    /* What is hidden for sighted people stays inside, too, or a phone would grow as wide as the table. */
    .ct-scroll {
      position: relative;
    }
    tbody th {
      position: sticky;
      z-index: 1;
      left: 0;
      background: var(--ct-surface);
      color: var(--ct-ink);
      font-size: 0.9375rem;
    }
    th:first-child {
      padding-left: 0;
    }
    .holding {
      background: var(--ct-resin-wash);
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PieceTable {
  private readonly clock = inject(ServerClock);
  private readonly commands = inject(FloorCommands);
  private readonly judging = inject(FloorJudging);

  readonly batch = input.required<BoardBatch>();
  readonly scope = input.required<StepScope>();

  protected readonly title = computed(() => (this.scope() === 'PANEL' ? 'Panels' : 'Blocks'));
  protected readonly rows = computed(() =>
    pieceRows(this.batch().floor, this.scope(), momentOf(this.batch(), this.clock.minute())),
  );
  protected readonly steps = computed(() => this.rows()[0]?.cells.map((cell) => cell.step) ?? []);
  protected readonly isOff = computed(
    () => this.judging.whyNot() !== null || this.commands.busy().has(this.batch().floor.id),
  );
  protected readonly pieceName = pieceName;

  protected nameOf(step: RouteStep): string {
    return step.kind === 'WAIT' ? holdWords(step.hold) : step.name;
  }

  protected act({ step, piece }: StepCell, kind: 'START' | 'FINISH'): void {
    const { id } = this.batch().floor;
    if (kind === 'START') void this.commands.start(id, step.key, [piece]);
    else void this.commands.finish(id, step.key, [piece]);
  }
}
