import { Injectable, computed, inject, signal } from '@angular/core';
import { Router } from '@angular/router';
import { may, type Permission } from '#shared/members/permissions';
import { Apollo } from 'apollo-angular';
import { firstValueFrom } from 'rxjs';
import {
  SignOutDocument,
  SwitchShopDocument,
  ViewerDocument,
  type ViewerFieldsFragment,
} from '../graphql/generated/graphql';
import { LostSession } from '../graphql/lost-session';
import { ServerClock } from '../graphql/server-clock';

/** Who is signed in, which shop they look at, and what they may do there. */
@Injectable({ providedIn: 'root' })
export class Session {
  private readonly apollo = inject(Apollo);
  private readonly router = inject(Router);
  private readonly clock = inject(ServerClock);
  private readonly known = signal<ViewerFieldsFragment | null | undefined>(undefined);
  private asking: Promise<ViewerFieldsFragment | null> | null = null;

  /** Null when nobody is signed in or nobody has asked yet. */
  readonly viewer = computed(() => this.known() ?? null);
  readonly zone = computed(() => this.viewer()?.shop.zone ?? 'UTC');

  constructor() {
    inject(LostSession).happened$.subscribe(() => this.lost());
  }

  may(permission: Permission): boolean {
    const viewer = this.viewer();
    return viewer !== null && may(viewer.member.roles, permission);
  }

  /** Asks the server once; later calls get the same answer. Throws when the server cannot be reached. */
  async find(): Promise<ViewerFieldsFragment | null> {
    const known = this.known();
    if (known !== undefined) return known;
    this.asking ??= this.ask();
    try {
      return await this.asking;
    } finally {
      this.asking = null;
    }
  }

  /** Asks again, as after signing in. */
  async renew(): Promise<void> {
    await this.ask();
  }

  async signOut(): Promise<void> {
    await firstValueFrom(this.apollo.mutate({ mutation: SignOutDocument }));
    // A fresh page: no row of this shop stays in memory, no socket open.
    location.assign('/sign-in');
  }

  async switchShop(shopId: string): Promise<void> {
    await firstValueFrom(
      this.apollo.mutate({ mutation: SwitchShopDocument, variables: { shopId } }),
    );
    location.assign('/');
  }

  private async ask(): Promise<ViewerFieldsFragment | null> {
    const { data } = await firstValueFrom(this.apollo.query({ query: ViewerDocument }));
    if (!data) throw new Error('The server gave no answer.');
    this.clock.observe(data.now);
    this.known.set(data.viewer ?? null);
    return data.viewer ?? null;
  }

  private lost(): void {
    if (!this.viewer()) return;
    this.known.set(null);
    const next = this.router.url;
    location.assign(`/sign-in?${new URLSearchParams({ next, ended: '1' }).toString()}`);
  }
}
