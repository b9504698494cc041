import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { stagesOf } from '#shared/route/route';
import { holdWords, placeWords } from '#shared/words/card-words';
import { cautionLine } from '#shared/words/caution-words';
import { ServerClock } from '../graphql/server-clock';
import { Icon } from '../ui/icon';
import { momentOf } from './board-card';
import { FloorCommands } from './floor-commands';
import { FloorJudging } from './floor-judging';
import { FloorPanels } from './floor-panels';
import { FloorStore } from './floor-store';
import type { BoardBatch } from './floor-view';
import { pieceRows, type StepCell } from './piece-rows';
import { sourceWords, standardWords } from './route-words';
import { StepState } from './step-state';

/** The batch's own route, stage by stage: standard times, waits and whose figures they are, cautions; and how far it is. */
@Component({
  selector: 'app-route-list',
  imports: [Icon, StepState],
  template: `
    @for (stage of stages(); track stage.stage) {
      <h3>{{ placeWords(stage.stage) }}</h3>
      <ul>
        @for (row of stage.rows; track row.step.key) {
          <li>
            <div class="what">
              <strong>{{ row.name }}</strong>
              <span class="ct-quiet">{{ row.standard }}</span>
              @if (row.source) {
                <span class="ct-quiet source">{{ row.source }}</span>
              }
              @if (row.caution; as code) {
                <button
                  type="button"
                  class="caution"
                  (click)="panels.open({ kind: 'CAUTION', code })"
                >
                  <app-icon name="warning" />{{ cautionLine(code) }}
                </button>
              }
            </div>
            @if (row.cell; as cell) {
              <app-step-state [cell]="cell" [isOff]="isOff()" (acted)="act(cell, $event)" />
            } @else {
              <span class="ct-quiet each">{{ row.each }}</span>
            }
          </li>
        }
      </ul>
    }
  `,
  styles: `
    h3 {
      margin: 18px 0 2px;
      color: var(--ct-quiet);
      font-size: 0.8125rem;
      letter-spacing: 0.04em;
      text-transform: uppercase;
    }
    ul {
      margin: 0;
      padding: 0;
      list-style: none;
    }
    li {
      display: flex;
      align-items: center;
      justify-content: space-between;
      gap: 16px;
      min-height: 52px;
      padding: 6px 0;
      border-bottom: 1px solid var(--ct-line);
    }
    .what {
      display: grid;
      gap: 0;
      min-width: 0;
    }
    .source,
    .each {
      font-size: 0.875rem;
    }
    .each {
      flex: none;
    }
    .caution {
      display: flex;
      align-items: center;
      gap: 6px;
      min-height: 32px;
      padding: 0;
      border: 0;
      background: none;
      color: var(--ct-resin-ink);
      font: inherit;
      font-size: 0.875rem;
      font-weight: 600;
      text-align: start;
      cursor: pointer;
    }
    .caution:hover {
      text-decoration: underline;
    }
    @media (pointer: coarse) {
      .caution {
        min-height: 48px;
      }
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class RouteList {
  private readonly clock = inject(ServerClock);
  private readonly commands = inject(FloorCommands);
  private readonly judging = inject(FloorJudging);
  private readonly store = inject(FloorStore);
  protected readonly panels = inject(FloorPanels);

  readonly batch = input.required<BoardBatch>();

  private readonly cells = computed(() => {
    const at = momentOf(this.batch(), this.clock.minute());
    const [whole] = pieceRows(this.batch().floor, 'BATCH', at);
    return new Map(whole?.cells.map((cell) => [cell.step.key, cell]));
  });
  protected readonly stages = computed(() => {
    const { route } = this.batch().floor;
    const profiles = this.store.around()?.profiles ?? [];
    return stagesOf(route).map((stage) => ({
      stage,
      rows: route.steps
        .filter((step) => step.stage === stage)
        .map((step) => ({
          step,
          name: step.kind === 'WAIT' ? holdWords(step.hold) : step.name,
          standard: standardWords(step),
          source: sourceWords(step, profiles),
          caution: step.kind === 'WORK' ? step.caution : null,
          cell: this.cells().get(step.key) ?? null,
          each: step.scope === 'PANEL' ? 'for each panel' : 'for each block',
        })),
    }));
  });
  protected readonly isOff = computed(
    () => this.judging.whyNot() !== null || this.commands.busy().has(this.batch().floor.id),
  );
  protected readonly placeWords = placeWords;
  protected readonly cautionLine = cautionLine;

  protected act({ step }: StepCell, kind: 'START' | 'FINISH'): void {
    const { id } = this.batch().floor;
    if (kind === 'START') void this.commands.start(id, step.key, [0]);
    else void this.commands.finish(id, step.key, [0]);
  }
}
