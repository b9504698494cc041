import { inject, Injectable } from '@angular/core';
import { Bearer } from '../graphql/bearer';

const KEY = 'clamptide.screen';

/** The read-only token of this display, kept in this browser so that it starts by itself. */
@Injectable({ providedIn: 'root' })
export class ScreenToken {
  private readonly bearer = inject(Bearer);

  /** Null while the display is not paired. */
  readonly token = this.bearer.token.asReadonly();

  /** Takes up what this browser kept from last time. */
  recall(): void {
    try {
      this.bearer.token.set(localStorage.getItem(KEY));
    } catch {
      // A browser that keeps nothing has to be paired at each start.
    }
  }

  keep(token: string): void {
    this.bearer.token.set(token);
    try {
      localStorage.setItem(KEY, token);
    } catch {
      // It works until the page is left.
    }
  }

  forget(): void {
    this.bearer.token.set(null);
    try {
      localStorage.removeItem(KEY);
    } catch {
      // Nothing was kept.
    }
  }

  /** Lets go of it without forgetting: whoever goes on in this browser asks as themselves. */
  release(): void {
    this.bearer.token.set(null);
  }
}
