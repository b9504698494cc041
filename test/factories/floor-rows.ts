import type pg from 'pg';
import { localId } from '#server/http/global-id';

/** An event as it was written. */
export interface EventRow {
  seq: number;
  type: string;
  by: string | null;
  happened_at: Date;
  recorded_at: Date;
  batch_id: string | null;
  data: Record<string, unknown>;
}

/** What the database holds of one batch, straight from its tables. */
export async function floorRows(admin: pg.Pool, batch: { id: string }) {
  const id = localId('batch', batch.id);
  const read = async <Row extends pg.QueryResultRow>(text: string) =>
    (await admin.query<Row>(text, [id])).rows;
  return {
    batch: (
      await read<{ version: number; released_at: Date | null; assigned_to: string | null }>(
        'select * from batch where id = $1',
      )
    )[0],
    runs: await read<{
      step: string;
      piece: number;
      started_at: Date | null;
      started_by: string | null;
      finished_at: Date | null;
      finished_by: string | null;
      cut_at: Date | null;
      cut_by: string | null;
    }>('select * from step_run where batch_id = $1 order by step, piece'),
    occupations: await read<{
      resource: string;
      is_clamps: boolean;
      amount: number;
      step: string;
      piece: number;
      since: Date;
      until: Date | null;
    }>('select * from occupation where batch_id = $1 order by since, resource, piece'),
    overrides: await read<{
      id: string;
      step: string;
      piece: number;
      by: string;
      at: Date;
      reason: string;
      seen_at: Date | null;
    }>('select * from hold_override where batch_id = $1 order by at, piece'),
    events: await read<EventRow>('select * from event where batch_id = $1 order by seq'),
  };
}
