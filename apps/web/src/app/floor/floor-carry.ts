import { LiveAnnouncer } from '@angular/cdk/a11y';
import { computed, inject, Injectable, signal } from '@angular/core';
import type { Place } from '#shared/route/route';
import { placeWords } from '#shared/words/card-words';
import type { BoardCard } from './board-card';
import { COLUMNS } from './board-columns';
import { carryKey, type Carry } from './carry';
import type { DropVerdict } from './drop-verdict';
import { FloorCommands } from './floor-commands';
import { FloorJudging } from './floor-judging';
import { FloorStore } from './floor-store';
import { Notices } from './notices';

/** What a place says to the card in the hand. */
export interface PlaceVerdict {
  readonly verdict: DropVerdict;
  readonly words: string;
}

interface Held extends Carry {
  readonly by: 'POINTER' | 'KEYS';
}

/** The card in somebody's hand, whether a pointer or the keyboard holds it, and what every place says to it. */
@Injectable()
export class FloorCarry {
  private readonly store = inject(FloorStore);
  private readonly judging = inject(FloorJudging);
  private readonly commands = inject(FloorCommands);
  private readonly notices = inject(Notices);
  private readonly announcer = inject(LiveAnnouncer);

  private readonly heldNow = signal<Held | null>(null);
  readonly held = this.heldNow.asReadonly();

  private readonly heldId = computed(() => this.heldNow()?.batchId ?? null);
  private readonly batch = computed(() => this.store.all().get(this.heldId() ?? '') ?? null);
  /** Null while nothing is carried. */
  readonly verdicts = computed<ReadonlyMap<Place, PlaceVerdict> | null>(() => {
    const batch = this.batch();
    if (!batch) return null;
    return new Map(
      COLUMNS.map((place) => {
        const verdict = this.judging.drop(batch, place);
        return [place, { verdict, words: this.words(verdict) }];
      }),
    );
  });

  /** A pointer has lifted the card. */
  lift(card: BoardCard): void {
    const { place } = card.card;
    this.heldNow.set({ batchId: card.id, from: place, over: place, by: 'POINTER' });
  }

  /** A pointer is over a place, or over none. */
  hover(over: Place | null): void {
    const held = this.heldNow();
    if (held && over !== null && over !== held.over) this.heldNow.set({ ...held, over });
  }

  accepts(place: Place): boolean {
    return this.verdicts()?.get(place)?.verdict.kind === 'ACCEPT';
  }

  /** A pointer has let go; over which place, if it was over one. */
  letGo(over: Place | null): void {
    const held = this.heldNow();
    const said = over === null ? undefined : this.verdicts()?.get(over);
    this.heldNow.set(null);
    if (!held || over === null || !said) return;
    if (said.verdict.kind !== 'HERE') void this.commands.move(held.batchId, over);
  }

  cancel(): void {
    this.heldNow.set(null);
  }

  /** Handles a key on a card's handle; false when the key means nothing to it. */
  key(card: BoardCard, key: string): boolean {
    const carried = { batchId: card.id, place: card.card.place };
    const step = carryKey(this.heldNow(), key, carried, COLUMNS, (place) => this.accepts(place));
    const { code } = card.batch.floor;
    switch (step.kind) {
      case 'NONE':
        return false;
      case 'GRABBED':
        this.heldNow.set({ ...step.carry, by: 'KEYS' });
        this.say(
          `${code} grabbed in ${placeWords(step.carry.from)}. Arrow keys choose a column, Space drops, Escape puts it back.`,
        );
        return true;
      case 'OVER': {
        this.heldNow.set({ ...step.carry, by: 'KEYS' });
        const said = this.verdicts()?.get(step.carry.over);
        this.say(`${placeWords(step.carry.over)}: ${said?.words ?? ''}`);
        return true;
      }
      case 'DROPPED':
        this.heldNow.set(null);
        void this.commands.move(step.carry.batchId, step.carry.over);
        return true;
      case 'REFUSED': {
        const said = this.verdicts()?.get(step.carry.over);
        if (said) this.notices.say(said.words, { isRefusal: true });
        return true;
      }
      case 'CANCELLED':
        this.heldNow.set(null);
        this.say(`${code} stays in ${placeWords(step.carry.from)}.`);
        // Tab goes on to where it leads.
        return key !== 'Tab';
    }
  }

  private words(verdict: DropVerdict): string {
    switch (verdict.kind) {
      case 'HERE':
        return 'it stands here';
      case 'ACCEPT':
        return verdict.isRework ? 'drop: back here, with a reason' : 'drop: ready here';
      case 'REFUSE': {
        const batch = this.batch();
        return batch ? this.judging.sentence(batch, verdict.refusal) : '';
      }
    }
  }

  private say(text: string): void {
    void this.announcer.announce(text, 'assertive');
  }
}
