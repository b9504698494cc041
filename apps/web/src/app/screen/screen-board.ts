import {
  ChangeDetectionStrategy,
  Component,
  computed,
  effect,
  inject,
  output,
  untracked,
} from '@angular/core';
import type { CautionCode } from '#shared/route/route';
import { agoWords } from '#shared/time/words';
import { CAUTION_ENDING, cautionLine } from '#shared/words/caution-words';
import { FloorStore } from '../floor/floor-store';
import type { BoardBatch } from '../floor/floor-view';
import { LiveFeed } from '../graphql/live-feed';
import { ServerClock } from '../graphql/server-clock';
import { Swatch } from '../ui/swatch';
import { clockTime } from '../ui/when';
import { atWork, doNext, type DoNextRow } from './do-next';
import { handsOff } from './hands-off';
import { ScreenColumn } from './screen-column';
import { airWords, longDay } from './screen-words';
import { shipsNext } from './ships-next';

/** Milliseconds of silence after which what is shown counts as old: the line says something every ten seconds. */
const SILENCE = 35_000;
/** Milliseconds that one caution stays. */
const CAUTION_FOR = 20_000;
/** Milliseconds between two attempts to read the floor while the line is down. */
const ASK_EVERY = 30_000;

/** What to do next, what to leave alone until when, what ships next. It has no controls and is read from far away. */
@Component({
  selector: 'app-screen-board',
  imports: [ScreenColumn, Swatch],
  providers: [FloorStore],
  templateUrl: './screen-board.html',
  styleUrl: './screen-board.scss',
  host: { '[class.stale]': 'stale()' },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ScreenBoard {
  private readonly feed = inject(LiveFeed);
  private readonly clock = inject(ServerClock);
  protected readonly store = inject(FloorStore);

  readonly pairAgain = output();

  private readonly zone = computed(() => this.store.around()?.shop.zone ?? 'UTC');
  private readonly heardAt = computed(() =>
    Math.max(this.feed.heardAt() ?? 0, this.store.heardAt()),
  );
  protected readonly stale = computed(
    () => this.feed.state() === 'offline' || this.clock.now() - this.heardAt() > SILENCE,
  );
  /** The instant that is shown: now, or while the line is down the last one that is known of. */
  private readonly second = computed(() => (this.stale() ? this.heardAt() : this.clock.now()));
  /** To the ten seconds: rows need no more, and a slow display is spared the rest. */
  private readonly shownAt = computed(() =>
    this.stale() ? this.heardAt() : Math.floor(this.clock.now() / 10_000) * 10_000,
  );

  protected readonly clockFace = computed(() => clockTime(this.second(), this.zone()));
  protected readonly day = computed(() => longDay(this.second(), this.zone()));
  protected readonly air = computed(() =>
    airWords(this.store.around()?.air ?? null, this.second()),
  );
  protected readonly since = computed(() =>
    clockTime(this.feed.since() ?? this.heardAt(), this.zone()),
  );
  protected readonly heard = computed(() => agoWords(this.clock.now() - this.heardAt()));

  protected readonly next = computed(() => doNext(this.store.open(), this.zone(), this.shownAt()));
  protected readonly holding = computed(() =>
    handsOff(this.store.open(), this.zone(), this.shownAt()),
  );
  protected readonly shipping = computed(() =>
    shipsNext(this.store.open(), this.zone(), this.shownAt()),
  );
  protected readonly working = computed(() =>
    atWork(this.store.open(), this.shownAt())
      .map(({ memberId, codes }) => `${this.initials(memberId)} ${codes.join(', ')}`)
      .join(' · '),
  );
  protected readonly caution = computed(() => {
    const codes = cautionsOf(this.next());
    const turn = Math.floor(this.clock.now() / CAUTION_FOR);
    const code = codes[turn % codes.length];
    return code === undefined ? '' : cautionLine(code);
  });
  protected readonly cautionEnding = CAUTION_ENDING;

  constructor() {
    // A socket that closes says nothing about why; the floor's answer does, and a revoked token is told there.
    effect((onCleanup) => {
      if (this.feed.state() !== 'offline') return;
      untracked(() => void this.store.read());
      const timer = setInterval(() => void this.store.read(), ASK_EVERY);
      onCleanup(() => clearInterval(timer));
    });
  }

  protected initials(memberId: string): string {
    return this.store.around()?.people.get(memberId)?.initials ?? '?';
  }

  /** "coat 1 · Ember, 12 boards, oil rack" */
  protected detail({ step, batch }: DoNextRow): string {
    const station = this.store.around()?.shop.stations.find((each) => each.key === step.station);
    const says = step.verb.slice(0, 3) === step.name.slice(0, 3) && !/\d/.test(step.name);
    const about = [this.boards(batch), station?.name].filter(Boolean).join(', ');
    return says ? about : `${step.name} · ${about}`;
  }

  protected boards({ design, floor }: BoardBatch): string {
    return `${design.name}, ${floor.boards === 1 ? '1 board' : `${floor.boards} boards`}`;
  }
}

/** The cautions of the work that comes next, else one that always holds. */
function cautionsOf(rows: readonly DoNextRow[]): CautionCode[] {
  const codes = new Set(rows.flatMap(({ step }) => step.caution ?? []));
  return codes.size > 0 ? [...codes] : ['DUST'];
}
