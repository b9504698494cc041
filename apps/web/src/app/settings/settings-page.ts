import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { RouterLink } from '@angular/router';
import { Apollo } from 'apollo-angular';
import { filter } from 'rxjs';
import {
  SettingsDocument,
  type ProfileKind,
  type SettingsQuery,
  type StationUnit,
} from '../graphql/generated/graphql';
import { LiveFeed } from '../graphql/live-feed';
import { roleNames } from '../session/role-names';
import { FailedPanel } from '../ui/failed-panel';
import { Icon } from '../ui/icon';
import { Initials } from '../ui/initials';
import { Skeleton } from '../ui/skeleton';
import { ClampsForm } from './clamps-form';
import { HoursForm } from './hours-form';

/** The shop as its people set it up. */
@Component({
  selector: 'app-settings-page',
  imports: [ClampsForm, FailedPanel, HoursForm, Icon, Initials, RouterLink, Skeleton],
  templateUrl: './settings-page.html',
  styleUrl: './settings-page.scss',
  host: { class: 'ct-page' },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SettingsPage {
  private readonly settings = inject(Apollo).watchQuery({
    query: SettingsDocument,
    errorPolicy: 'all',
  });

  protected readonly data = signal<SettingsQuery | null>(null);
  protected readonly failed = signal(false);
  protected readonly hasDefaults = computed(() =>
    (this.data()?.shop.profiles ?? []).some((profile) => profile.isDefault),
  );
  protected readonly roleNames = roleNames;

  constructor() {
    this.settings.valueChanges.pipe(takeUntilDestroyed()).subscribe((result) => {
      if (result.dataState === 'complete') this.data.set(result.data);
      this.failed.set(result.error !== undefined && this.data() === null);
    });
    inject(LiveFeed)
      .changes$.pipe(
        filter((change) => change.shopChanged || change.reset),
        takeUntilDestroyed(),
      )
      .subscribe(() => this.read());
  }

  protected read(): void {
    this.failed.set(false);
    this.settings.refetch().catch(() => this.failed.set(this.data() === null));
  }

  protected kindName(kind: ProfileKind): string {
    return kind === 'GLUE' ? 'glue' : 'finish';
  }

  protected capacity(count: number, unit: StationUnit): string {
    switch (unit) {
      case 'BATCH':
        return count === 1 ? '1 batch' : `${count} batches`;
      case 'PIECE':
        return count === 1 ? '1 panel or block' : `${count} panels or blocks`;
      case 'BOARD':
        return count === 1 ? '1 board' : `${count} boards`;
    }
  }
}
