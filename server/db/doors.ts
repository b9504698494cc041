import { drizzle, type NodePgDatabase } from 'drizzle-orm/node-postgres';
import { sql } from 'drizzle-orm';
import type pg from 'pg';
import type { Secret } from '#server/settings/settings';
import { doorUrl, openPool } from './connections';

/** A transaction inside one shop. */
export type ShopTransaction = Parameters<Parameters<NodePgDatabase['transaction']>[0]>[0];

/** A read-only snapshot of one shop that stays open until it is closed. */
export interface ShopSnapshot {
  tx: NodePgDatabase;
  close(): Promise<void>;
}

export interface Doors {
  /** One read-write transaction that sees and touches the rows of one shop only. */
  inShop<T>(shopId: string, work: (tx: ShopTransaction) => Promise<T>): Promise<T>;
  /** One read-only REPEATABLE READ transaction of one shop. */
  readShop<T>(shopId: string, work: (tx: NodePgDatabase) => Promise<T>): Promise<T>;
  /** The same, held open over several reads; whoever opens it closes it. */
  snapshot(shopId: string): Promise<ShopSnapshot>;
  /** Calls one of the entry functions: a look-up that returns a person, a shop, a session; no table is seen. */
  entry<Row extends object>(query: string, values?: readonly unknown[]): Promise<Row[]>;
  /** Reads the events of all shops and keeps its own cursors. */
  relay: pg.Pool;
  /** The job queue's own connections. */
  work: pg.Pool;
  /** Answers when the database does, within a second. */
  ping(): Promise<void>;
  close(): Promise<void>;
}

/** Opens the four doors of a database that was set up. */
export function openDoors(
  adminUrl: string,
  secrets: readonly [Secret, ...Secret[]],
  onError: (error: Error) => void,
): Doors {
  const open = (door: 'shop' | 'entry' | 'relay' | 'work', max: number) =>
    openPool(doorUrl(adminUrl, door, secrets), max, onError);
  const shopPool = open('shop', 12);
  const entryPool = open('entry', 4);
  const relay = open('relay', 3);
  const work = open('work', 4);
  const shopDb = drizzle(shopPool);

  const snapshot = async (shopId: string): Promise<ShopSnapshot> => {
    const client = await shopPool.connect();
    let closed = false;
    const close = async (broken?: unknown) => {
      if (closed) return;
      closed = true;
      if (broken === undefined) {
        try {
          await client.query('commit');
          client.release();
          return;
        } catch {
          // The connection is gone, and with it the transaction: nothing is left to end.
        }
      }
      client.release(true);
    };
    try {
      await client.query('begin isolation level repeatable read read only');
      await client.query(`select set_config('clamptide.shop', $1, true)`, [shopId]);
    } catch (error) {
      await close(error);
      throw error;
    }
    return { tx: drizzle(client), close };
  };

  return {
    inShop: (shopId, work) =>
      shopDb.transaction(async (tx) => {
        await tx.execute(sql`select set_config('clamptide.shop', ${shopId}, true)`);
        return work(tx);
      }),
    readShop: async (shopId, work) => {
      const { tx, close } = await snapshot(shopId);
      try {
        return await work(tx);
      } finally {
        await close();
      }
    },
    snapshot,
    entry: async <Row extends object>(query: string, values: readonly unknown[] = []) => {
      const { rows } = await entryPool.query<Row & pg.QueryResultRow>(query, [...values]);
      return rows;
    },
    relay,
    work,
    ping: async () => {
      let timer: NodeJS.Timeout | undefined;
      const tooLate = new Promise<never>((_, reject) => {
        timer = setTimeout(
          () => reject(new Error('The database did not answer in a second.')),
          1000,
        );
      });
      try {
        await Promise.race([shopPool.query('select 1'), tooLate]);
      } finally {
        clearTimeout(timer);
      }
    },
    close: async () => {
      await Promise.all([shopPool, entryPool, relay, work].map((pool) => pool.end()));
    },
  };
}
