import { Injectable, signal } from '@angular/core';

/** What is said at the foot of the page for a while: what was done, or why not. */
export interface Notice {
  readonly text: string;
  /** A refusal stays until it is closed; what was done goes by itself. */
  readonly isRefusal: boolean;
  readonly action: { readonly name: string; readonly run: () => void } | null;
}

/** Milliseconds that a notice of something done stays: long enough to read it and to reach for Undo. */
const DONE_STAYS = 8_000;

@Injectable()
export class Notices {
  private readonly shown = signal<Notice | null>(null);
  private timer: ReturnType<typeof setTimeout> | undefined;

  readonly notice = this.shown.asReadonly();

  say(text: string, more: Partial<Omit<Notice, 'text'>> = {}): void {
    clearTimeout(this.timer);
    const notice = { text, isRefusal: false, action: null, ...more };
    this.shown.set(notice);
    if (!notice.isRefusal) this.timer = setTimeout(() => this.close(), DONE_STAYS);
  }

  close(): void {
    clearTimeout(this.timer);
    this.shown.set(null);
  }
}
