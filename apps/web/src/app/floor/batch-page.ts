import {
  ChangeDetectionStrategy,
  Component,
  computed,
  effect,
  inject,
  input,
  signal,
} from '@angular/core';
import { RouterLink } from '@angular/router';
import { may } from '#shared/members/permissions';
import { stepAt } from '#shared/route/route';
import { clockWords, dateWords } from '#shared/time/words';
import { holdWords, pieceName, placeWords, slackWords } from '#shared/words/card-words';
import { Apollo } from 'apollo-angular';
import { firstValueFrom } from 'rxjs';
import { BatchByCodeDocument } from '../graphql/generated/graphql';
import { LiveFeed } from '../graphql/live-feed';
import { ServerClock } from '../graphql/server-clock';
import { Session } from '../session/session';
import { FailedPanel } from '../ui/failed-panel';
import { failureSentence } from '../ui/failure-sentence';
import { Icon } from '../ui/icon';
import { Initials } from '../ui/initials';
import { Skeleton } from '../ui/skeleton';
import { StatePanel } from '../ui/state-panel';
import { Swatch } from '../ui/swatch';
import { BatchHistory } from './batch-history';
import { readCard } from './board-card';
import { CautionPanel } from './caution-panel';
import { FloorCommands } from './floor-commands';
import { FloorJudging } from './floor-judging';
import { FloorPanels } from './floor-panels';
import { FloorStore } from './floor-store';
import type { ApiBatch } from './floor-view';
import { GivePanel } from './give-panel';
import { MovePanel } from './move-panel';
import { NoticeBar } from './notice-bar';
import { Notices } from './notices';
import { overridesOf } from './override-offers';
import { PieceTable } from './piece-table';
import { RouteList } from './route-list';

/** A batch with all its pieces, its route, its overrides and its history. */
@Component({
  selector: 'app-batch-page',
  imports: [
    BatchHistory,
    CautionPanel,
    FailedPanel,
    GivePanel,
    Icon,
    Initials,
    MovePanel,
    NoticeBar,
    PieceTable,
    RouteList,
    RouterLink,
    Skeleton,
    StatePanel,
    Swatch,
  ],
  templateUrl: './batch-page.html',
  styleUrl: './batch-page.scss',
  providers: [FloorStore, FloorCommands, FloorJudging, FloorPanels, Notices],
  host: { class: 'ct-page ct-bench', '[class.stale]': 'feed.state() === "offline"' },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class BatchPage {
  private readonly apollo = inject(Apollo);
  private readonly clock = inject(ServerClock);
  private readonly session = inject(Session);
  private readonly judging = inject(FloorJudging);
  protected readonly feed = inject(LiveFeed);
  protected readonly store = inject(FloorStore);
  protected readonly commands = inject(FloorCommands);
  protected readonly panels = inject(FloorPanels);

  readonly code = input.required<string>();

  protected readonly batch = computed(() => {
    const code = this.code().toUpperCase();
    return (
      [...this.store.all().values()].find((each) => each.floor.code.toUpperCase() === code) ?? null
    );
  });
  /** A batch that is not on the floor any more; null when there is none, undefined until that is known. */
  protected readonly gone = signal<ApiBatch | null | undefined>(undefined);
  protected readonly failure = signal<string | null>(null);

  protected readonly zone = computed(() => this.store.around()?.shop.zone ?? this.session.zone());
  protected readonly card = computed(() => {
    const batch = this.batch();
    return batch && readCard(batch, this.clock.minute());
  });
  protected readonly facts = computed(() => {
    const [batch, card] = [this.batch(), this.card()];
    if (!batch || !card) return [];
    const { boards, dueDate, shipBy } = batch.floor;
    return [
      batch.design.name,
      boards === 1 ? '1 board' : `${boards} boards`,
      placeWords(card.card.place),
      ...(dueDate ? [`due ${dateWords(dueDate)}`] : ['for stock']),
      ...(shipBy && shipBy !== dueDate ? [`ship by ${dateWords(shipBy)}`] : []),
    ];
  });
  protected readonly slack = computed(() => {
    const forecast = this.batch()?.forecast;
    return forecast ? slackWords(forecast) : '';
  });
  protected readonly readyAt = computed(() => {
    const at = this.batch()?.forecast?.readyAt;
    return at ? this.clockWords(Date.parse(at)) : '';
  });
  protected readonly people = computed(() => {
    const people = this.store.around()?.people;
    return this.card()?.people.flatMap((id) => people?.get(id) ?? []) ?? [];
  });
  protected readonly offers = computed(() => {
    const [batch, card] = [this.batch(), this.card()];
    if (!batch || !card || this.judging.whyNot() !== null) return [];
    const view = this.judging.view(batch, this.clock.minute());
    return overridesOf(view, batch.floor, card.card.holds, this.judging.actor());
  });
  protected readonly undo = computed(() => {
    const undo = this.batch()?.undo;
    const actor = this.judging.actor();
    if (!undo || Date.parse(undo.until) <= this.clock.minute()) return null;
    const isMine = undo.by === actor.memberId || may(actor.roles, 'undoOthers');
    return isMine ? { event: undo.event, until: this.clockWords(Date.parse(undo.until)) } : null;
  });
  protected readonly overrides = computed(() => {
    const batch = this.batch();
    return (batch?.floor.overrides ?? []).map((override) => {
      const step = batch && stepAt(batch.floor.route, override.step)?.step;
      const piece = step ? pieceName(step.scope, override.piece) : '';
      const hold = step?.kind === 'WAIT' ? holdWords(step.hold) : override.step;
      return {
        id: override.id,
        what: piece === '' ? hold : `${piece}, ${hold}`,
        who: this.store.around()?.people.get(override.by)?.name ?? 'Someone',
        when: this.clockWords(override.at),
        reason: override.reason,
      };
    });
  });
  protected readonly whyNot = this.judging.whyNot;

  constructor() {
    // What is not among the open batches has left the shop, or never was.
    effect(() => {
      if (this.store.around() && !this.batch()) void this.lookUp(this.code());
    });
  }

  protected async lookUp(code: string): Promise<void> {
    try {
      const { data } = await firstValueFrom(
        this.apollo.query({ query: BatchByCodeDocument, variables: { code: code.toUpperCase() } }),
      );
      this.failure.set(null);
      this.gone.set(data?.batch ?? null);
    } catch (error) {
      this.failure.set(failureSentence(error));
    }
  }

  protected clockWords(at: number): string {
    return clockWords(this.zone(), this.clock.minute(), at);
  }

  protected retry(): void {
    this.failure.set(null);
    if (this.store.around()) void this.lookUp(this.code());
    else void this.store.read();
  }
}
