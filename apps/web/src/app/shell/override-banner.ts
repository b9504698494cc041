import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { RouterLink } from '@angular/router';
import { Apollo } from 'apollo-angular';
import { filter, firstValueFrom } from 'rxjs';
import {
  SeeOverrideDocument,
  UnseenOverridesDocument,
  type UnseenOverridesQuery,
} from '../graphql/generated/graphql';
import { LiveFeed } from '../graphql/live-feed';
import { ServerClock } from '../graphql/server-clock';
import { Session } from '../session/session';
import { Icon } from '../ui/icon';
import { dayTime } from '../ui/when';

/** Tells the owner of holds that were overridden, until they say that they have seen it. */
@Component({
  selector: 'app-override-banner',
  imports: [RouterLink, Icon],
  template: `
    @if (unseen().length > 0) {
      <section aria-label="Overridden holds">
        @for (each of shown(); track each.override.id) {
          <div class="one">
            <app-icon name="warning" />
            <p>
              <a [routerLink]="['/batch', each.batchCode]">{{ each.batchCode }}</a>
              {{ when(each.override.at) }}: {{ each.sentence }}
            </p>
            <button
              type="button"
              class="ct-button"
              [attr.aria-label]="'Seen: ' + each.sentence"
              (click)="see(each.override.id)"
            >
              Seen
            </button>
          </div>
        }
        @if (unseen().length > shown().length) {
          <button type="button" class="ct-button more" (click)="isOpen.set(true)">
            {{ unseen().length - shown().length }} more
          </button>
        }
      </section>
    }
  `,
  styles: `
    section {
      max-height: 40vh;
      overflow: auto;
      border-bottom: 1px solid var(--ct-resin-line);
      background: var(--ct-resin-wash);
      color: var(--ct-resin-ink);
    }
    .one {
      display: flex;
      align-items: center;
      gap: 10px;
      padding: 6px 20px;
    }
    .more {
      margin: 0 20px 8px 48px;
    }
    p {
      flex: 1;
      margin: 0;
      font-weight: 600;
      overflow-wrap: anywhere;
    }
    a {
      color: inherit;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class OverrideBanner {
  private readonly apollo = inject(Apollo);
  private readonly clock = inject(ServerClock);
  private readonly session = inject(Session);
  protected readonly unseen = signal<UnseenOverridesQuery['unseenOverrides']>([]);
  protected readonly isOpen = signal(false);
  /** The newest, unless the person wants all: the page below must stay in view. */
  protected readonly shown = computed(() =>
    this.isOpen() ? this.unseen() : this.unseen().slice(-1),
  );

  constructor() {
    void this.read();
    inject(LiveFeed)
      .changes$.pipe(
        filter(
          (change) =>
            change.reset ||
            change.batches.some((batch) => batch.overrides.some((override) => !override.seen)),
        ),
        takeUntilDestroyed(),
      )
      .subscribe(() => void this.read());
  }

  protected when(at: string): string {
    return dayTime(at, this.session.zone(), this.clock.minute());
  }

  protected async see(id: string): Promise<void> {
    try {
      await firstValueFrom(
        this.apollo.mutate({ mutation: SeeOverrideDocument, variables: { id } }),
      );
    } catch {
      // It stays in the banner, which is what it is for.
    }
    await this.read();
  }

  private async read(): Promise<void> {
    try {
      const { data } = await firstValueFrom(this.apollo.query({ query: UnseenOverridesDocument }));
      if (data) this.unseen.set(data.unseenOverrides);
    } catch {
      // Asked again with the next change; the batch's own page shows its overrides for ever.
    }
  }
}
