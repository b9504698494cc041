import { placeOf } from '#shared/floor/progress';
import { DAY_MS, type Instant } from '#shared/time/instant';
import { slackWords } from '#shared/words/card-words';
import type { BoardBatch } from '../floor/floor-view';
import { dateName, localDate } from '../ui/when';

/** What leaves the shop next, and how its forecast stands to its ship-by date. */
export interface ShipsNextRow {
  readonly id: string;
  readonly batch: BoardBatch;
  /** "today", "Wed", "Wed 9 Dec" */
  readonly day: string;
  /** "2 d early", "late by 5 h", "ready"; empty while there is no forecast. */
  readonly slack: string;
  readonly late: boolean;
}

/** Batches with a ship-by date, the earliest first; of one day the latest against it first. */
export function shipsNext(
  batches: readonly BoardBatch[],
  zone: string,
  now: Instant,
): ShipsNextRow[] {
  const today = localDate(now, zone);
  return batches
    .flatMap((batch) => {
      const { shipBy } = batch.floor;
      return shipBy === null ? [] : [{ batch, shipBy }];
    })
    .sort((a, b) => order(a.shipBy, b.shipBy) || order(slackOf(a.batch), slackOf(b.batch)))
    .map(({ batch, shipBy }) => {
      const isReady = placeOf(batch.floor, now) === 'READY';
      return {
        id: batch.floor.id,
        batch,
        day: dayWords(shipBy, today),
        slack: isReady ? 'ready' : forecastWords(batch, shipBy, today),
        late: shipBy < today || (!isReady && slackOf(batch) < 0),
      };
    });
}

/** Without a forecast only a day that is over says something. */
function forecastWords(batch: BoardBatch, shipBy: string, today: string): string {
  if (batch.forecast) return slackWords(batch.forecast);
  const days = daysBetween(shipBy, today);
  return days > 0 ? `late by ${days} d` : '';
}

function slackOf(batch: BoardBatch): number {
  return batch.forecast?.slackMinutes ?? 0;
}

/** A weekday alone is only clear within the six days after today. */
function dayWords(date: string, today: string): string {
  if (date === today) return 'today';
  const days = daysBetween(today, date);
  const name = dateName(date, today);
  return days > 0 && days <= 6 ? name.slice(0, 3) : name;
}

function daysBetween(from: string, to: string): number {
  return (Date.parse(to) - Date.parse(from)) / DAY_MS;
}

function order<T extends string | number>(a: T, b: T): number {
  return a < b ? -1 : a > b ? 1 : 0;
}
