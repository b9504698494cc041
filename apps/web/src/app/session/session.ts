import { computed, inject, Injectable, InjectionToken, signal } from '@angular/core';
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
import { RefusedError } from '../ui/failure-sentence';

/** Opens an address of this app as a fresh page. */
export const GO_TO = new InjectionToken<(address: string) => void>('GO_TO', {
  providedIn: 'root',
  factory: () => (address) => location.assign(address),
});

/** Who is signed in, which shop they look at, and what they may do there. */
@Injectable({ providedIn: 'root' })
export class Session {
  private readonly apollo = inject(Apollo);
  private readonly router = inject(Router);
  private readonly clock = inject(ServerClock);
  private readonly goTo = inject(GO_TO);
  private readonly known = signal<ViewerFieldsFragment | null | undefined>(undefined);
  private leaving = false;
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
    await this.leave('/sign-in', async () => {
      await firstValueFrom(this.apollo.mutate({ mutation: SignOutDocument }));
    });
  }

  async switchShop(shopId: string): Promise<void> {
    await this.leave('/', async () => {
      const mutation = SwitchShopDocument;
      const { data } = await firstValueFrom(
        this.apollo.mutate({ mutation, variables: { shopId } }),
      );
      const refused = data?.switchShop.problems[0];
      if (refused) throw new RefusedError(refused.sentence);
    });
  }

  /** Goes to a fresh page, so that no row of this shop stays in memory and no socket open. */
  private async leave(to: string, command: () => Promise<void>): Promise<void> {
    // The socket may hear of it before the answer is here, and must not take it for a session that was ended.
    this.leaving = true;
    try {
      await command();
      this.goTo(to);
    } catch (error) {
      this.leaving = false;
      throw error;
    }
  }

  private async ask(): Promise<ViewerFieldsFragment | null> {
    const { data } = await firstValueFrom(this.apollo.query({ query: ViewerDocument }));
    if (!data) throw new Error('The server gave no answer.');
    this.clock.observe(data.now);
    this.known.set(data.viewer ?? null);
    return data.viewer ?? null;
  }

  private lost(): void {
    if (this.leaving || !this.viewer()) return;
    this.known.set(null);
    const next = this.router.url;
    this.goTo(`/sign-in?${new URLSearchParams({ next, ended: '1' }).toString()}`);
  }
}
