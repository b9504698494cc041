import { computed, inject, Injectable } from '@angular/core';
import type { FloorView } from '#shared/floor/judge';
import type { Actor } from '#shared/floor/model';
import { refusalSentence } from '#shared/words/refusal-words';
import type { Refusal } from '#shared/floor/refusal';
import type { CautionCode, Place } from '#shared/route/route';
import { LiveFeed } from '../graphql/live-feed';
import { ServerClock } from '../graphql/server-clock';
import { Session } from '../session/session';
import { momentOf } from './board-card';
import { dropVerdict, overrideCautions, type DropVerdict, type Overridable } from './drop-verdict';
import { FloorStore } from './floor-store';
import type { BoardBatch } from './floor-view';

/** Asks the rules of the floor for the person who is signed in, over the batches as they are shown. */
@Injectable()
export class FloorJudging {
  private readonly store = inject(FloorStore);
  private readonly clock = inject(ServerClock);
  private readonly feed = inject(LiveFeed);
  private readonly session = inject(Session);

  readonly actor = computed<Actor>(() => {
    const member = this.session.viewer()?.member;
    return { memberId: member?.id ?? '', roles: member?.roles ?? [] };
  });
  /** Why no command can be given at all just now; null when one can. */
  readonly whyNot = computed(() => {
    if (!this.session.may('moveBatches')) return 'You may look at the floor, not move batches.';
    if (this.feed.state() === 'offline') return 'No connection: what you see may be old.';
    return null;
  });

  private readonly floors = computed(() => this.store.open().map((batch) => batch.floor));

  /** What the rules look at; `now` is the exact moment unless a caller that only shows something is content with less. */
  view(batch: BoardBatch, now = this.clock.now()): FloorView {
    const around = this.store.around();
    return {
      shop: around?.shop ?? { zone: 'UTC', stations: [], clamps: [] },
      batches: this.floors(),
      now: momentOf(batch, now),
    };
  }

  drop(batch: BoardBatch, to: Place): DropVerdict {
    return dropVerdict(this.view(batch), batch.floor, to, this.actor());
  }

  cautions(batch: BoardBatch, command: Overridable): CautionCode[] | null {
    return overrideCautions(this.view(batch), batch.floor, command, this.actor());
  }

  sentence(batch: BoardBatch, refusal: Refusal): string {
    const { shop, now } = this.view(batch);
    return refusalSentence(refusal, { batchCode: batch.floor.code, zone: shop.zone, now });
  }
}
