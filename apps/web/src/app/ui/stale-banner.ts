import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { LiveFeed } from '../graphql/live-feed';
import { ServerClock } from '../graphql/server-clock';
import { Session } from '../session/session';
import { Icon } from './icon';
import { ago, clockTime } from './when';

/** While the line is down: how old everything on the page is. */
@Component({
  selector: 'app-stale-banner',
  imports: [Icon],
  template: `
    @if (words(); as text) {
      <div class="banner" role="alert">
        <app-icon name="offline" />
        <span>{{ text }}</span>
      </div>
    }
  `,
  styles: `
    .banner {
      display: flex;
      align-items: center;
      gap: 10px;
      padding: 10px 20px;
      background: var(--ct-madder-wash);
      color: var(--ct-madder);
      border-bottom: 1px solid currentColor;
      font-weight: 600;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class StaleBanner {
  private readonly feed = inject(LiveFeed);
  private readonly clock = inject(ServerClock);
  private readonly session = inject(Session);

  protected readonly words = computed(() => {
    const since = this.feed.since();
    if (this.feed.state() !== 'offline' || since === null) return null;
    const clock = clockTime(since, this.session.zone());
    const age = ago(since, this.clock.minute());
    return `No live connection since ${clock}, ${age}. What you see may have changed since then.`;
  });
}
