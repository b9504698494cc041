import type { NodePgDatabase } from 'drizzle-orm/node-postgres';
import type { ShopSnapshot } from '#server/db/doors';
import type { MemberPrincipal, Principal } from './principal';
import type { Services } from './services';

/** What a resolver may lean on: who asks, and one snapshot of their shop for the whole operation. */
export interface Context {
  services: Services;
  principal: Principal | null;
  /** What the browser says of itself, and where it calls from; for sessions and limits. */
  device: string;
  address: string;
  /** Sets the session cookie, or clears it with null. Does nothing on a socket. */
  setSession(token: string | null): void;
  /**
   * Reads from the operation's one read-only snapshot. Reads run one after another on its connection. A command calls
   * `forget` after its commit, so that its answer is read in a fresh one.
   */
  read<T>(work: (tx: NodePgDatabase, shopId: string) => Promise<T>): Promise<T>;
  forget(): Promise<void>;
}

/** The context of one operation. Whoever makes it calls `forget` when the operation has ended. */
export function makeContext(
  services: Services,
  principal: Principal | null,
  request: Pick<Context, 'device' | 'address' | 'setSession'>,
): Context {
  let snapshot: Promise<ShopSnapshot> | null = null;
  let queue: Promise<unknown> = Promise.resolve();
  return {
    services,
    principal,
    ...request,
    read: (work) => {
      if (!principal) throw new Error('Nobody is signed in, so there is no shop to read.');
      const run = queue.then(async () => {
        snapshot ??= services.doors.snapshot(principal.shopId);
        return work((await snapshot).tx, principal.shopId);
      });
      queue = run.catch(() => undefined);
      return run;
    },
    forget: async () => {
      await queue;
      const open = snapshot;
      snapshot = null;
      if (open) await open.then((s) => s.close()).catch(() => undefined);
    },
  };
}

/** The member who asks. The access table has let nobody else through to where this is called. */
export function memberOf(context: Context): MemberPrincipal {
  if (context.principal?.kind !== 'member') throw new Error('Only members reach this.');
  return context.principal;
}
