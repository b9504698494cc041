import type { FloorBatch, FloorShop } from '#shared/floor/model';
import type { Hours, HoursException, WeeklyHours } from '#shared/time/hours';
import type { Instant } from '#shared/time/instant';

/** Someone who does work on the floor. Leave out who does not (the office): a step without a skill takes anyone here. */
export interface PlanPerson {
  id: string;
  skills: readonly string[];
  /** Null: the shop's weekly hours. Whoever has their own works only while the shop is open, too. */
  weekly: WeeklyHours | null;
  /** Dates on which their own hours differ. */
  exceptions: readonly HoursException[];
}

/**
 * What a plan is made from. Plain data that a structured clone carries to a worker thread; it would be JSON but for the
 * lengths in `shop.clamps` and `batches[].needs`, which are bigint.
 */
export interface PlanInput {
  now: Instant;
  shop: FloorShop;
  /** The shop's. */
  hours: Hours;
  people: readonly PlanPerson[];
  batches: readonly FloorBatch[];
}
