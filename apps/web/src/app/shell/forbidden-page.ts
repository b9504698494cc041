import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { RouterLink } from '@angular/router';
import { roleNames } from '../session/role-names';
import { Session } from '../session/session';
import { StatePanel } from '../ui/state-panel';

@Component({
  selector: 'app-forbidden-page',
  imports: [RouterLink, StatePanel],
  template: `
    <h1 class="ct-hidden">Not for you</h1>
    <app-state-panel heading="Your roles do not open this page." icon="lock">
      You are signed in as {{ roles() }}. The shop's owner can change that.
      <a actions class="ct-button primary" routerLink="/">To your first page</a>
    </app-state-panel>
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ForbiddenPage {
  private readonly session = inject(Session);
  protected readonly roles = computed(() => roleNames(this.session.viewer()?.member.roles ?? []));
}
