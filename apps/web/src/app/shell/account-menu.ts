import {
  CdkMenu,
  CdkMenuGroup,
  CdkMenuItem,
  CdkMenuItemRadio,
  CdkMenuTrigger,
} from '@angular/cdk/menu';
import { ChangeDetectionStrategy, Component, inject, signal } from '@angular/core';
import { Router } from '@angular/router';
import { roleNames } from '../session/role-names';
import { Session } from '../session/session';
import { Ask } from '../ui/ask';
import { failureSentence } from '../ui/failure-sentence';
import { Icon } from '../ui/icon';
import { Initials } from '../ui/initials';
import { SCHEMES, SchemeChoice, type Scheme } from '../ui/scheme';

/** Who one is here: roles, other shops, sessions, light or dark, sign out. */
@Component({
  selector: 'app-account-menu',
  imports: [CdkMenu, CdkMenuGroup, CdkMenuItem, CdkMenuItemRadio, CdkMenuTrigger, Icon, Initials],
  templateUrl: './account-menu.html',
  styleUrl: './account-menu.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class AccountMenu {
  protected readonly session = inject(Session);
  protected readonly scheme = inject(SchemeChoice);
  private readonly router = inject(Router);
  private readonly ask = inject(Ask);

  protected readonly schemes = SCHEMES;
  protected readonly roleNames = roleNames;
  protected readonly busy = signal(false);

  protected schemeName(scheme: Scheme): string {
    switch (scheme) {
      case 'auto':
        return 'As the device';
      case 'light':
        return 'Light';
      case 'dark':
        return 'Dark';
    }
  }

  protected openSessions(): void {
    void this.router.navigateByUrl('/sessions');
  }

  protected async switchShop(shopId: string): Promise<void> {
    await this.attempt(() => this.session.switchShop(shopId), 'The shop was not switched.');
  }

  protected async signOut(): Promise<void> {
    await this.attempt(() => this.session.signOut(), 'You are still signed in.');
  }

  private async attempt(command: () => Promise<void>, heading: string): Promise<void> {
    this.busy.set(true);
    try {
      await command();
    } catch (error) {
      await this.ask.ask({ heading, text: failureSentence(error), action: 'Close' });
    } finally {
      this.busy.set(false);
    }
  }
}
