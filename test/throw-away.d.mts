/** A PostgreSQL cluster of its own for tests; see throw-away.mjs. */
export function startThrowAway(): Promise<{
  /** The superuser's address of the database "postgres". */
  url: string;
  /** Stops the server and removes its files. */
  end(): Promise<void>;
}>;
