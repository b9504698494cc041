import { ChangeDetectionStrategy, Component, DestroyRef, inject } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { LiveFeed } from '../graphql/live-feed';
import { LostSession } from '../graphql/lost-session';
import { ScreenBoard } from './screen-board';
import { ScreenPairing } from './screen-pairing';
import { ScreenToken } from './screen-token';
import { stayAwake } from './stay-awake';

/** A display in the shop: paired once, then it starts by itself. */
@Component({
  selector: 'app-screen-page',
  imports: [ScreenBoard, ScreenPairing],
  template: `
    <main>
      @if (token.token() === null) {
        <app-screen-pairing (paired)="token.keep($event)" />
      } @else {
        <app-screen-board (pairAgain)="pairAgain()" />
      }
    </main>
  `,
  styles: `
    :host {
      position: fixed;
      inset: 0;
      overflow: hidden;
      color-scheme: dark;
      background: var(--ct-paper);
      color: var(--ct-ink);
      font-size: clamp(15px, min(1.5vw, 2.41vh), 64px);
    }
    @media (orientation: portrait) {
      :host {
        font-size: clamp(15px, min(2.6vw, 1.7vh), 64px);
      }
    }
    main {
      height: 100%;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ScreenPage {
  private readonly feed = inject(LiveFeed);
  protected readonly token = inject(ScreenToken);

  constructor() {
    this.token.recall();
    // The token was revoked: nothing of the shop stays on the display.
    inject(LostSession)
      .happened$.pipe(takeUntilDestroyed())
      .subscribe(() => this.pairAgain());
    const letSleep = stayAwake();
    inject(DestroyRef).onDestroy(() => {
      letSleep();
      this.feed.stop();
      this.token.release();
    });
  }

  protected pairAgain(): void {
    this.feed.stop();
    this.token.forget();
  }
}
