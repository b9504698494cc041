import { CdkMenuTrigger } from '@angular/cdk/menu';
import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { judge } from '#shared/floor/judge';
import { clockWords } from '#shared/time/words';
import { holdWords, pieceWords, slackWords } from '#shared/words/card-words';
import { cautionLine } from '#shared/words/caution-words';
import { ServerClock } from '../graphql/server-clock';
import { Icon } from '../ui/icon';
import { Initials } from '../ui/initials';
import { Swatch } from '../ui/swatch';
import type { BoardCard } from './board-card';
import { burned, fullWords, groupActions, groupWords, limitOf, type Limit } from './card-details';
import { CardMenu } from './card-menu';
import { FloorBoard } from './floor-board';
import { FloorCarry } from './floor-carry';
import { FloorCommands } from './floor-commands';
import { FloorJudging } from './floor-judging';
import { FloorPanels } from './floor-panels';
import { FloorStore } from './floor-store';
import { PieceMenu } from './piece-menu';

/** A batch on the Floor: what it is, how it stands, who is on it, and the one next action. */
@Component({
  selector: 'app-batch-card',
  imports: [CardMenu, CdkMenuTrigger, Icon, Initials, PieceMenu, Swatch],
  templateUrl: './batch-card.html',
  styleUrl: './batch-card.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class BatchCard {
  private readonly board = inject(FloorBoard);
  private readonly carry = inject(FloorCarry);
  private readonly clock = inject(ServerClock);
  private readonly commands = inject(FloorCommands);
  private readonly judging = inject(FloorJudging);
  private readonly panels = inject(FloorPanels);
  private readonly store = inject(FloorStore);

  readonly card = input.required<BoardCard>();

  protected readonly floor = computed(() => this.card().batch.floor);
  protected readonly design = computed(() => this.card().batch.design);
  protected readonly boards = computed(() => {
    const { boards } = this.floor();
    return boards === 1 ? '1 board' : `${boards} boards`;
  });
  protected readonly pieces = computed(() => {
    const words = pieceWords(this.card().counts);
    const { since } = this.card();
    if (words !== '' || since === null) return words;
    return `since ${clockWords(this.board.zone(), this.clock.minute(), since)}`;
  });
  protected readonly slack = computed(() => {
    const { forecast } = this.card().batch;
    return forecast ? slackWords(forecast) : '';
  });
  protected readonly people = computed(() => {
    const people = this.store.around()?.people;
    return this.card().card.people.flatMap((id) => people?.get(id) ?? []);
  });
  protected readonly groups = computed(() => groupActions(this.floor(), this.card().card.actions));
  /** The one next action. */
  protected readonly next = computed(() => this.groups()[0] ?? null);
  protected readonly nextWords = computed(() => {
    const next = this.next();
    return next ? groupWords(next, this.board.zone(), this.clock.minute()) : '';
  });
  protected readonly caution = computed(() => {
    const code = this.next()?.step.caution ?? null;
    return code === null ? null : { code, line: cautionLine(code) };
  });
  protected readonly hold = computed(() => {
    const { shelf, holds } = this.card().card;
    const [hold] = holds;
    if (shelf !== 'HOLDING' || !hold) return null;
    const now = this.clock.minute();
    return {
      name: holdWords(hold.kind),
      clear: `clear ${clockWords(this.board.zone(), now, hold.clearAt)}`,
      burned: burned(hold, now),
    };
  });
  /** The first maximum that runs, unless the button says it already. */
  protected readonly limit = computed<Limit | null>(() => {
    const [hold] = this.card().card.limits;
    if (!hold) return null;
    const limit = limitOf(this.floor(), hold, this.board.zone(), this.clock.minute());
    const isOnButton = this.next()?.latestAt === hold.latestAt;
    return limit && (limit.isUrgent || !isOnButton) ? limit : null;
  });
  /** What is full, when the next step cannot start for that. */
  protected readonly full = computed(() => {
    const next = this.next();
    const [piece = 0] = next?.pieces ?? [];
    if (next?.kind !== 'START' || this.card().card.shelf !== 'READY') return null;
    const { batch } = this.card();
    const verdict = judge(
      this.judging.view(batch, this.clock.minute()),
      batch.floor,
      { kind: 'START', step: next.step.key, pieces: [piece], happenedAt: null, override: null },
      this.judging.actor(),
    );
    if (verdict.ok) return null;
    return fullWords(verdict.refusal, this.board.zone(), this.clock.minute());
  });
  protected readonly isBusy = computed(() => this.commands.busy().has(this.card().id));
  protected readonly isCarried = computed(() => {
    const held = this.carry.held();
    return held?.batchId === this.card().id && held.by === 'KEYS';
  });
  protected readonly whyNot = this.judging.whyNot;

  protected act(): void {
    const next = this.next();
    if (!next || this.isBusy()) return;
    if (next.kind === 'START') void this.commands.start(this.card().id, next.step.key, next.pieces);
    else void this.commands.finish(this.card().id, next.step.key, next.pieces);
  }

  protected ship(): void {
    void this.commands.move(this.card().id, 'SHIPPED');
  }

  protected openMove(): void {
    this.panels.open({ kind: 'MOVE', batchId: this.card().id });
  }

  protected readCaution(): void {
    const caution = this.caution();
    if (caution) this.panels.open({ kind: 'CAUTION', code: caution.code });
  }

  protected handleKey(event: KeyboardEvent): void {
    if (event.ctrlKey || event.metaKey || event.altKey || this.whyNot() !== null) return;
    if (this.carry.key(this.card(), event.key)) {
      event.preventDefault();
      event.stopPropagation();
    }
  }

  /** Somebody who goes elsewhere has let go. */
  protected handleBlur(): void {
    if (this.isCarried()) this.carry.cancel();
  }
}
