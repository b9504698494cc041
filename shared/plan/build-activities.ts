import type { FloorShop } from '#shared/floor/model';
import { runOf, standardMinutes } from '#shared/floor/progress';
import { clampNeedOf, CLAMPS, stationUnits } from '#shared/floor/resources';
import type { Calendar } from '#shared/time/calendar';
import type { Instant } from '#shared/time/instant';
import type { WorkStep } from '#shared/route/route';
import type { BatchPieces } from './batch-pieces';
import { linksBefore } from './build-links';
import { inTurnKey, takesTurns } from './build-resources';
import type { Activity, ActivityState, ClampTake, Take } from './model';
import { minutesLeft } from './started';

/** The work of a batch, in the order of its route. */
export function activitiesOf(
  of: BatchPieces,
  shop: FloorShop,
  people: readonly string[],
  now: Instant,
  calendarOf: (person: string | null) => Calendar,
): Activity[] {
  return of.batch.route.steps.flatMap((step, index) => {
    if (step.kind !== 'WORK') return [];
    const left = minutesLeft(of, step, now, calendarOf);
    return of.pieces(step).map((piece): Activity => {
      const state = stateOf(of, step, piece, people);
      const isFree = state.kind === 'FREE';
      return {
        id: of.id(step, piece),
        batchId: of.batch.id,
        step: step.key,
        piece,
        minutes: left.get(piece) ?? Math.max(1, Math.ceil(standardMinutes(of.batch, step))),
        pausable: step.pausable,
        people: step.people,
        skill: step.skill,
        takes: isFree ? takesOf(of, shop, step, piece) : [],
        clamps: isFree ? clampsOf(of, step, piece) : null,
        state,
        after: state.kind === 'DONE' ? [] : linksBefore(of, index, piece, now),
      };
    });
  });
}

function stateOf(
  of: BatchPieces,
  step: WorkStep,
  piece: number,
  people: readonly string[],
): ActivityState {
  const run = runOf(of.batch, step.key, piece);
  if (run?.finishedAt != null) {
    const { startedAt, finishedAt } = run;
    return { kind: 'DONE', startedAt: startedAt ?? finishedAt, finishedAt };
  }
  if (run?.startedAt == null) return { kind: 'FREE' };
  const { startedAt, startedBy } = run;
  const known = startedBy !== null && people.includes(startedBy) ? [startedBy] : [];
  return { kind: 'STARTED', startedAt, people: known };
}

/** What a step takes of stations, and until when. Stations that the shop has given up limit nothing. */
function takesOf(of: BatchPieces, shop: FloorShop, step: WorkStep, piece: number): Take[] {
  const named = [step.station, ...step.takes.map((take) => take.resource)];
  const takes: Take[] = [];
  for (const station of shop.stations) {
    if (!named.includes(station.key)) continue;
    takes.push({
      resource: station.key,
      units: stationUnits(station, of.batch, step.scope),
      until: of.release(step, piece, station.key),
    });
    if (takesTurns(station, step)) {
      takes.push({
        resource: inTurnKey(station.key, of.batch.id),
        units: 1,
        until: [of.id(step, piece)],
      });
    }
  }
  return takes;
}

function clampsOf(of: BatchPieces, step: WorkStep, piece: number): ClampTake | null {
  if (!step.takes.some((take) => take.resource === CLAMPS)) return null;
  const need = clampNeedOf(of.batch, step.scope);
  if (!need || need.count === 0) return null;
  return { ...need, until: of.release(step, piece, CLAMPS) };
}
