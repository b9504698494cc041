import {
  ChangeDetectionStrategy,
  Component,
  computed,
  type ElementRef,
  inject,
  viewChild,
} from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { NavigationEnd, Router, RouterLink, RouterLinkActive, RouterOutlet } from '@angular/router';
import { distinctUntilChanged, filter, map, skip } from 'rxjs';
import { LiveFeed } from '../graphql/live-feed';
import { Session } from '../session/session';
import { Icon } from '../ui/icon';
import { LiveBadge } from '../ui/live-badge';
import { Mark } from '../ui/mark';
import { StaleBanner } from '../ui/stale-banner';
import { AccountMenu } from './account-menu';
import { OverrideBanner } from './override-banner';
import { PAGES } from './pages';

/** What stands around every page of somebody who is signed in. */
@Component({
  selector: 'app-shell',
  imports: [
    RouterOutlet,
    RouterLink,
    RouterLinkActive,
    AccountMenu,
    Icon,
    LiveBadge,
    Mark,
    OverrideBanner,
    StaleBanner,
  ],
  templateUrl: './shell.html',
  styleUrl: './shell.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class Shell {
  protected readonly session = inject(Session);
  private readonly main = viewChild.required<ElementRef<HTMLElement>>('main');

  protected readonly pages = computed(() =>
    PAGES.filter((page) => page.needs === null || this.session.may(page.needs)),
  );

  constructor() {
    if (this.session.may('seeFloor')) inject(LiveFeed).keep();
    // Another page begins at its top for whoever does not see it, too; a filter in the address does not.
    inject(Router)
      .events.pipe(
        filter((event) => event instanceof NavigationEnd),
        map((event) => event.urlAfterRedirects.replace(/[?#].*$/, '')),
        distinctUntilChanged(),
        skip(1),
        takeUntilDestroyed(),
      )
      .subscribe(() => this.main().nativeElement.focus({ preventScroll: true }));
  }

  protected skipToMain(event: Event): void {
    event.preventDefault();
    this.main().nativeElement.focus();
  }
}
