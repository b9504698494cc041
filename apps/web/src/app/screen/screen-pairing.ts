import {
  ChangeDetectionStrategy,
  Component,
  computed,
  DestroyRef,
  inject,
  output,
  signal,
} from '@angular/core';
import { Apollo } from 'apollo-angular';
import { firstValueFrom } from 'rxjs';
import {
  PollPairingDocument,
  ScreenNowDocument,
  StartPairingDocument,
  type StartPairingMutation,
} from '../graphql/generated/graphql';
import { ServerClock } from '../graphql/server-clock';
import { failureSentence } from '../ui/failure-sentence';
import { Mark } from '../ui/mark';

/** Milliseconds between two questions whether the code was entered. */
const ASK_EVERY = 2_000;
/** Milliseconds before the server is asked for a code again after it gave none. */
const TRY_AGAIN = 10_000;

/** What a display shows that belongs to no shop yet: a code for the owner to enter. */
@Component({
  selector: 'app-screen-pairing',
  imports: [Mark],
  template: `
    <p class="brand"><app-mark /> Clamptide</p>
    <h1>Pair this display</h1>
    @if (pairing(); as wanted) {
      <p class="code">
        <span class="ct-hidden">{{ spelled() }}</span>
        <span aria-hidden="true">{{ halves()[0] }}</span>
        <span aria-hidden="true">{{ halves()[1] }}</span>
      </p>
      <p class="how">
        The owner of the shop enters this code under <strong>Settings, Screens</strong> at
        <strong>{{ address }}</strong>
      </p>
      <p class="left">Good for {{ left() }} more.</p>
    } @else if (failure() === null) {
      <p class="how" role="status">Asking for a code …</p>
    }
    @if (failure(); as sentence) {
      <p class="failure" role="alert">{{ sentence }} This display goes on trying by itself.</p>
    }
  `,
  styleUrl: './screen-pairing.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ScreenPairing {
  private readonly apollo = inject(Apollo);
  private readonly clock = inject(ServerClock);
  private timer: ReturnType<typeof setTimeout> | undefined;
  private destroyed = false;

  readonly paired = output<string>();

  protected readonly pairing = signal<StartPairingMutation['startPairing'] | null>(null);
  protected readonly failure = signal<string | null>(null);
  protected readonly address = location.host;
  private readonly plainCode = computed(() => (this.pairing()?.code ?? '').replace(/\W/g, ''));
  /** The code in two halves, as it is easiest to carry in one's head. */
  protected readonly halves = computed(() => {
    const code = this.plainCode();
    const middle = Math.ceil(code.length / 2);
    return [code.slice(0, middle), code.slice(middle)] as const;
  });
  protected readonly spelled = computed(() => [...this.plainCode()].join(' '));
  private readonly expiresAt = computed(() => Date.parse(this.pairing()?.expiresAt ?? ''));
  protected readonly left = computed(() => {
    const seconds = Math.max(0, Math.ceil((this.expiresAt() - this.clock.now()) / 1_000));
    const rest = String(seconds % 60).padStart(2, '0');
    return `${Math.floor(seconds / 60)}:${rest} min`;
  });

  constructor() {
    inject(DestroyRef).onDestroy(() => {
      this.destroyed = true;
      clearTimeout(this.timer);
    });
    void this.start();
  }

  private async start(): Promise<void> {
    try {
      const told = await firstValueFrom(this.apollo.query({ query: ScreenNowDocument }));
      if (told.data) this.clock.observe(told.data.now);
      const { data } = await firstValueFrom(
        this.apollo.mutate({ mutation: StartPairingDocument, fetchPolicy: 'no-cache' }),
      );
      if (this.destroyed) return;
      if (!data) throw new Error('The server gave no answer.');
      this.pairing.set(data.startPairing);
      this.failure.set(null);
      this.later(ASK_EVERY, () => this.poll(data.startPairing.secret));
    } catch (error) {
      this.pairing.set(null);
      this.failure.set(failureSentence(error));
      this.later(TRY_AGAIN, () => this.start());
    }
  }

  private async poll(secret: string): Promise<void> {
    try {
      const variables = { secret };
      const { data } = await firstValueFrom(
        this.apollo.mutate({ mutation: PollPairingDocument, variables, fetchPolicy: 'no-cache' }),
      );
      if (this.destroyed) return;
      this.failure.set(null);
      switch (data?.pollPairing.state) {
        case 'PAIRED':
          if (data.pollPairing.token !== null) {
            this.paired.emit(data.pollPairing.token);
            return;
          }
          break;
        case 'EXPIRED':
          this.pairing.set(null);
          await this.start();
          return;
        case 'WAITING':
        case undefined:
          break;
      }
    } catch (error) {
      this.failure.set(failureSentence(error));
    }
    // A code that ran out while the line was down is not shown any longer.
    if (this.clock.now() > this.expiresAt()) {
      this.pairing.set(null);
      this.later(ASK_EVERY, () => this.start());
      return;
    }
    this.later(ASK_EVERY, () => this.poll(secret));
  }

  private later(wait: number, what: () => Promise<void>): void {
    if (this.destroyed) return;
    clearTimeout(this.timer);
    this.timer = setTimeout(() => void what(), wait);
  }
}
