import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { LiveFeed } from '../graphql/live-feed';
import { Session } from '../session/session';
import { clockTime } from './when';

/** Whether what is shown is what is: a shape and a word, and since when not. */
@Component({
  selector: 'app-live-badge',
  template: `
    @if (text(); as words) {
      <span class="shape" [class]="feed.state()" aria-hidden="true"></span>
      <span role="status"
        >{{ words }}<span class="watchers">{{ watchers() }}</span></span
      >
    }
  `,
  styles: `
    :host {
      display: inline-flex;
      align-items: center;
      gap: 8px;
      color: var(--ct-quiet);
      font-weight: 600;
      white-space: nowrap;
    }
    .shape {
      width: 10px;
      height: 10px;
      box-sizing: border-box;
    }
    .shape.connected {
      border-radius: 2px;
      background: var(--ct-leaf);
      transform: rotate(45deg);
    }
    .shape.catching-up {
      border: 2px solid var(--ct-slate);
      border-radius: 50%;
    }
    .shape.offline {
      border: 2px solid var(--ct-madder);
    }
    @media (max-width: 600px) {
      .watchers {
        display: none;
      }
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class LiveBadge {
  protected readonly feed = inject(LiveFeed);
  private readonly session = inject(Session);

  protected readonly text = computed(() => {
    switch (this.feed.state()) {
      case 'off':
        return null;
      case 'connected':
        return 'live';
      case 'catching-up':
        return 'catching up';
      case 'offline': {
        const since = this.feed.since();
        return since === null
          ? 'offline'
          : `offline since ${clockTime(since, this.session.zone())}`;
      }
    }
  });
  protected readonly watchers = computed(() => {
    const count = this.feed.watchers();
    if (this.feed.state() !== 'connected' || count === null || count < 1) return '';
    return ` · ${count} ${count === 1 ? 'screen' : 'screens'}`;
  });
}
