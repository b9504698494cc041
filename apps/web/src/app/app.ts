import { ChangeDetectionStrategy, Component, inject, signal } from '@angular/core';
import { NavigationEnd, NavigationError, Router, RouterOutlet } from '@angular/router';
import { FailedPanel } from './ui/failed-panel';
import { SchemeChoice } from './ui/scheme';

@Component({
  selector: 'app-root',
  imports: [RouterOutlet, FailedPanel],
  template: `
    @if (failed()) {
      <main>
        <app-failed-panel heading="This page could not be opened." (retry)="reload()" />
      </main>
    }
    <div [hidden]="failed()"><router-outlet /></div>
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class App {
  /** Whether the last page could not be opened: the server or a piece of script did not come. */
  protected readonly failed = signal(false);

  constructor() {
    inject(SchemeChoice);
    inject(Router).events.subscribe((event) => {
      if (event instanceof NavigationError) {
        console.error(event.error);
        this.failed.set(true);
      } else if (event instanceof NavigationEnd) {
        this.failed.set(false);
      }
    });
  }

  protected reload(): void {
    location.reload();
  }
}
