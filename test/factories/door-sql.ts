import pg from 'pg';
import { DOORS, doorUrl, type Door } from '#server/db/connections';
import type { ApiServer } from './api-server';

/** What a statement came to: its rows, or the SQLSTATE with which it was refused. */
export type Outcome = { rowCount: number; rows: Record<string, unknown>[] } | { refused: string };

/** The SQLSTATE of a missing right, and of a row that the wall does not let in. */
export const DENIED: Outcome = { refused: '42501' };
export const NO_ROWS: Outcome = { rowCount: 0, rows: [] };

/** SQL of our own through the four doors of a server's database. */
export class DoorSql {
  private readonly pools: Record<Door, pg.Pool>;

  constructor({ settings: { adminDatabaseUrl, secrets } }: ApiServer) {
    const open = (door: Door) => {
      const pool = new pg.Pool({
        connectionString: doorUrl(adminDatabaseUrl, door, secrets),
        max: 2,
      });
      pool.on('error', () => undefined);
      return [door, pool] as const;
    };
    this.pools = Object.fromEntries(DOORS.map(open)) as Record<Door, pg.Pool>;
  }

  /** Runs one statement through a door, inside a shop or none, and takes it back. */
  async run(
    door: Door,
    shopId: string | null,
    text: string,
    values: unknown[] = [],
  ): Promise<Outcome> {
    const client = await this.pools[door].connect();
    try {
      await client.query('begin');
      if (shopId !== null) {
        await client.query(`select set_config('clamptide.shop', $1, true)`, [shopId]);
      }
      const { rowCount, rows } = await client.query<Record<string, unknown>>(text, values);
      return { rowCount: rowCount ?? 0, rows };
    } catch (error) {
      return { refused: String((error as { code?: string }).code) };
    } finally {
      await client.query('rollback');
      client.release();
    }
  }

  async end(): Promise<void> {
    await Promise.all(Object.values(this.pools).map((pool) => pool.end()));
  }
}
