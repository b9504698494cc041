import { ChangeDetectionStrategy, Component, computed, inject, input, output } from '@angular/core';
import { clockWords } from '#shared/time/words';
import { pieceName } from '#shared/words/card-words';
import { ServerClock } from '../graphql/server-clock';
import { Icon } from '../ui/icon';
import { burned } from './card-details';
import { FloorStore } from './floor-store';
import type { StepCell } from './piece-rows';

/** How a step stands on a piece, in words, with the button that takes it on. */
@Component({
  selector: 'app-step-state',
  imports: [Icon],
  template: `
    @switch (look().kind) {
      @case ('STARTABLE') {
        <button
          type="button"
          class="ct-button primary"
          [attr.aria-disabled]="isOff()"
          [attr.aria-label]="'Start ' + subject()"
          (click)="act('START')"
        >
          Start
        </button>
      }
      @case ('WORKING') {
        <span class="words">{{ look().words }}</span>
        <button
          type="button"
          class="ct-button soft"
          [attr.aria-disabled]="isOff()"
          [attr.aria-label]="'Finish ' + subject()"
          (click)="act('FINISH')"
        >
          Finish
        </button>
      }
      @case ('HOLDING') {
        <span class="words hold">{{ look().words }}</span>
        <span class="fuse" aria-hidden="true"><span [style.width.%]="look().burned"></span></span>
      }
      @case ('TODO') {
        <span class="words todo"
          ><span aria-hidden="true">–</span><span class="ct-hidden">to do</span></span
        >
      }
      @case ('LIMIT') {
        <span class="words hold"><app-icon name="clock" />{{ look().words }}</span>
      }
      @case ('CUT') {
        <span class="words cut"><app-icon name="warning" />{{ look().words }}</span>
      }
      @default {
        <span class="words done"><app-icon name="check" />{{ look().words }}</span>
      }
    }
  `,
  styles: `
    :host {
      display: grid;
      gap: 4px;
      justify-items: start;
    }
    .words {
      font-size: 0.875rem;
      font-weight: 600;
    }
    .done,
    .hold,
    .cut {
      display: inline-flex;
      align-items: center;
      gap: 4px;
      white-space: nowrap;
    }
    .done {
      color: var(--ct-leaf);
    }
    .cut {
      color: var(--ct-madder);
    }
    .todo {
      color: var(--ct-quiet);
    }
    .hold {
      color: var(--ct-resin-ink);
      white-space: nowrap;
    }
    .fuse {
      width: 100%;
      min-width: 72px;
      height: 6px;
      background: repeating-linear-gradient(
        115deg,
        var(--ct-resin-line) 0 5px,
        var(--ct-resin-rest) 5px 10px
      );
    }
    .fuse span {
      display: block;
      height: 100%;
      background: var(--ct-resin);
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class StepState {
  private readonly clock = inject(ServerClock);
  private readonly store = inject(FloorStore);

  readonly cell = input.required<StepCell>();
  readonly isOff = input(false);
  readonly acted = output<'START' | 'FINISH'>();

  protected readonly subject = computed(() => {
    const { step, piece } = this.cell();
    const on = pieceName(step.scope, piece);
    return on === '' ? step.name : `${step.name}, ${on}`;
  });
  protected readonly look = computed(() => {
    const { state } = this.cell();
    const zone = this.store.around()?.shop.zone ?? 'UTC';
    const now = this.clock.minute();
    const clock = (at: number) => clockWords(zone, now, at);
    const look = (words: string, part = 0) => ({ kind: state.kind, words, burned: part });
    switch (state.kind) {
      case 'TODO':
      case 'STARTABLE':
        return look('');
      case 'WORKING':
        return look(`since ${clock(state.since)}`);
      case 'DONE':
        return look(clock(state.at));
      case 'HOLDING':
        return look(`clear ${clock(state.clearAt)}`, burned(state, now));
      case 'CLEAR':
        return look(`clear ${clock(state.at)}`);
      case 'LIMIT':
        return look(`${state.isMissed ? 'too late since' : 'by'} ${clock(state.latestAt)}`);
      case 'CUT':
        return look(`overridden ${clock(state.at)}`);
    }
  });

  protected act(kind: 'START' | 'FINISH'): void {
    if (!this.isOff()) this.acted.emit(kind);
  }
}
