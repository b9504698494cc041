import { MINUTE_MS, type Instant } from '#shared/time/instant';
import { may } from '#shared/members/permissions';
import type { Actor } from './model';
import type { Refusal } from './refusal';

/** How far back a helper may say that something happened. */
export const HELPER_BACKDATE_MINUTES = 120;

/** How far back a maker may. */
export const MAKER_BACKDATE_MINUTES = 60 * 24 * 31;

/** A clock that runs a little ahead is no reason to refuse: up to here it counts as now. */
const CLOCK_TOLERANCE_MS = 5_000;

/** The instant a fact counts from, or why that instant cannot be. */
export function happenedAt(
  given: Instant | null,
  now: Instant,
  actor: Actor,
): { at: Instant } | { refusal: Refusal } {
  if (given === null) return { at: now };
  if (!Number.isFinite(given) || given > now + CLOCK_TOLERANCE_MS) {
    return { refusal: { code: 'IN_THE_FUTURE' } };
  }
  const minutes = may(actor.roles, 'backdateFreely')
    ? MAKER_BACKDATE_MINUTES
    : HELPER_BACKDATE_MINUTES;
  if (given < now - minutes * MINUTE_MS) return { refusal: { code: 'TOO_LONG_AGO', minutes } };
  return { at: Math.min(given, now) };
}
