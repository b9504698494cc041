import type { Instant } from '#shared/time/instant';
import { ClampShelf, type ClampChoice } from './clamp-shelf';
import type { Activity, ClampTake, Held, Problem, Take } from './model';
import { Journal } from './profile';
import { StationLoad } from './station-load';
import { Teams } from './teams';

/** Everything that is taken while a plan is laid: people, stations, clamps. All of it can be rolled back. */
export class Bookings {
  readonly journal = new Journal();
  readonly teams: Teams;
  readonly clamps: ClampShelf;
  private readonly stations: ReadonlyMap<string, StationLoad>;

  constructor(private readonly problem: Problem) {
    this.teams = new Teams(problem, this.journal);
    this.clamps = new ClampShelf(problem.clamps, this.journal);
    this.stations = new Map(
      problem.stations.map((station) => [station.key, new StationLoad(station, this.journal)]),
    );
  }

  station(key: string): StationLoad | undefined {
    return this.stations.get(key);
  }

  /** Occupies what is a fact, without end while it is not known when it is given back. */
  holdFact(held: Held): void {
    const { now } = this.problem;
    const to = held.until ?? Infinity;
    if (held.isClamps) this.clamps.hold(held.resource, held.units, now, to);
    else this.stations.get(held.resource)?.hold(held.batchId, held.units, now, to);
  }

  /** Gives back what is a fact, from an instant on. */
  freeFact(held: Held, at: Instant): void {
    if (held.isClamps) this.clamps.hold(held.resource, -held.units, at, Infinity);
    else this.stations.get(held.resource)?.giveBack(held.batchId, held.units, at, Infinity);
  }

  /** Null when a station has room through all of [from, to), else when its last shortage in it ends. */
  stationShortUntil(activity: Activity, take: Take, from: Instant, to: number): number | null {
    const station = this.stations.get(take.resource);
    return station?.shortUntil(activity.batchId, take.units, from, to) ?? null;
  }

  holdStation(activity: Activity, take: Take, from: Instant, to: number): void {
    this.stations.get(take.resource)?.hold(activity.batchId, take.units, from, to);
  }

  freeStation(activity: Activity, take: Take, from: Instant, to: number): void {
    this.stations.get(take.resource)?.giveBack(activity.batchId, take.units, from, to);
  }

  chooseClamps(need: ClampTake, from: Instant, to: number) {
    return this.clamps.choose(need, from, to);
  }

  holdClamps(choice: ClampChoice, from: Instant, to: number, sign: 1 | -1 = 1): void {
    for (const { key, amount } of choice) this.clamps.hold(key, sign * amount, from, to);
  }
}
