import {
  ChangeDetectionStrategy,
  Component,
  computed,
  inject,
  input,
  signal,
  viewChild,
} from '@angular/core';
import { HELPER_BACKDATE_MINUTES, MAKER_BACKDATE_MINUTES } from '#shared/floor/happened';
import { may } from '#shared/members/permissions';
import { MINUTE_MS } from '#shared/time/instant';
import { clockWords, durationWords } from '#shared/time/words';
import { piecesName } from '#shared/words/command-words';
import { ServerClock } from '../graphql/server-clock';
import { readCard } from './board-card';
import { groupActions } from './card-details';
import { FloorBoard } from './floor-board';
import { FloorCommands } from './floor-commands';
import { FloorJudging } from './floor-judging';
import { FloorPanels } from './floor-panels';
import type { BoardBatch } from './floor-view';
import { PanelFrame } from './panel-frame';

const USUAL = [5, 15, 30, 60] as const;

/** Records late what was begun or done before. Holds and clamps count from when it happened. */
@Component({
  selector: 'app-earlier-panel',
  imports: [PanelFrame],
  template: `
    <app-panel-frame
      [heading]="batch().floor.code + ': it happened earlier'"
      (closed)="panels.close()"
    >
      <form novalidate (submit)="record($event, what.value)">
        <div class="ct-field">
          <label for="earlier-what">What</label>
          <select #what id="earlier-what" class="ct-input">
            @for (choice of choices(); track choice.words; let at = $index) {
              <option [value]="at">{{ choice.words }}</option>
            }
          </select>
        </div>
        <div class="ct-field">
          <label for="earlier-minutes">Minutes ago</label>
          <input
            #ago
            id="earlier-minutes"
            class="ct-input"
            type="number"
            inputmode="numeric"
            min="1"
            step="1"
            aria-describedby="earlier-when"
            [attr.max]="most()"
            [attr.aria-invalid]="tried() && !isGood()"
            [value]="minutes()"
            (input)="minutes.set(ago.valueAsNumber)"
          />
          <div class="usual">
            @for (usual of usuals; track usual) {
              <button type="button" class="ct-button" (click)="minutes.set(usual)">
                {{ usual }} min
              </button>
            }
          </div>
          <span class="hint" id="earlier-when" [attr.role]="tried() && !isGood() ? 'alert' : null">
            {{ when() }}
          </span>
        </div>
        <button type="submit" class="ct-button primary">Record it</button>
      </form>
    </app-panel-frame>
  `,
  styles: `
    form {
      display: grid;
      gap: 16px;
    }
    .usual {
      display: flex;
      flex-wrap: wrap;
      gap: 8px;
      margin-top: 4px;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class EarlierPanel {
  private readonly board = inject(FloorBoard);
  private readonly clock = inject(ServerClock);
  private readonly commands = inject(FloorCommands);
  private readonly judging = inject(FloorJudging);
  protected readonly panels = inject(FloorPanels);
  private readonly frame = viewChild.required(PanelFrame);

  readonly batch = input.required<BoardBatch>();

  protected readonly usuals = USUAL;
  protected readonly minutes = signal<number>(15);
  protected readonly tried = signal(false);
  protected readonly most = computed(() =>
    may(this.judging.actor().roles, 'backdateFreely')
      ? MAKER_BACKDATE_MINUTES
      : HELPER_BACKDATE_MINUTES,
  );
  protected readonly isGood = computed(() => {
    const minutes = this.minutes();
    return Number.isInteger(minutes) && minutes >= 1 && minutes <= this.most();
  });
  protected readonly when = computed(() => {
    if (!this.isGood()) return `Enter whole minutes, from 1 to ${this.most()}.`;
    const now = this.clock.minute();
    const at = now - this.minutes() * MINUTE_MS;
    return `${durationWords(this.minutes())} ago, at ${clockWords(this.board.zone(), now, at)}.`;
  });
  protected readonly choices = computed(() => {
    const { card } = readCard(this.batch(), this.clock.minute());
    return groupActions(this.batch().floor, card.actions).flatMap((group) => {
      const verb = group.kind === 'START' ? 'Started' : 'Finished';
      const choice = (pieces: readonly number[], all: boolean) => {
        const on = piecesName(group.step.scope, pieces, all);
        const words = `${verb} ${group.step.name}${on === '' ? '' : `, ${on}`}`;
        return { kind: group.kind, step: group.step.key, pieces, words };
      };
      const single = group.pieces.map((piece) => choice([piece], false));
      return single.length > 1 ? [...single, choice(group.pieces, true)] : single;
    });
  });

  protected record(event: Event, chosen: string): void {
    event.preventDefault();
    this.tried.set(true);
    const choice = this.choices()[Number(chosen)];
    if (!choice || !this.isGood()) return;
    const { id } = this.batch().floor;
    const happenedAt = Math.round(this.clock.now() - this.minutes() * MINUTE_MS);
    this.frame().close();
    const { kind, step, pieces } = choice;
    if (kind === 'START') void this.commands.start(id, step, pieces, happenedAt);
    else void this.commands.finish(id, step, pieces, happenedAt);
  }
}
