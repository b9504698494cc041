import type {
  ClampClass,
  FloorBatch,
  FloorShop,
  Occupation,
  Override,
  PieceNeeds,
  Role,
  StepRun,
} from '#shared/floor/model';
import type { CautionCode, Route, RouteStep } from '#shared/route/route';
import { parseInstant } from '#shared/time/instant';
import type { BatchFieldsFragment, FloorQuery } from '../graphql/generated/graphql';

/*
 * What the API sends, as the rules of the floor want it: instants in milliseconds, lengths as whole nanometres, the
 * batch with its own route and its design's needs in it.
 */

export type ApiFloor = FloorQuery['floor'];
export type ApiBatch = BatchFieldsFragment;
type ApiRoute = ApiFloor['routes'][number];
type ApiStep = ApiRoute['steps'][number];
export type ApiDesign = ApiFloor['designs'][number];

/** A person of the shop, as cards show them. */
export interface Person {
  readonly id: string;
  readonly name: string;
  readonly initials: string;
  readonly roles: readonly Role[];
}

/** What all batches of a shop stand in. A new one is made whenever settings, people or designs changed. */
export interface FloorSurroundings {
  readonly shop: FloorShop;
  readonly name: string;
  readonly air: ApiFloor['shop']['air'];
  readonly profiles: ApiFloor['shop']['profiles'];
  readonly people: ReadonlyMap<string, Person>;
  readonly designs: ReadonlyMap<string, ApiDesign>;
  readonly routes: ReadonlyMap<string, Route>;
}

/** A batch with what the rules do not look at: its design, its forecast and the command that can be undone. */
export interface BoardBatch {
  readonly floor: FloorBatch;
  readonly design: ApiDesign;
  readonly forecast: ApiBatch['forecast'];
  readonly undo: ApiBatch['undo'];
}

export function toSurroundings(floor: ApiFloor): FloorSurroundings {
  return {
    shop: toFloorShop(floor.shop),
    name: floor.shop.name,
    air: floor.shop.air,
    profiles: floor.shop.profiles,
    people: new Map(floor.members.map((member) => [member.id, member])),
    designs: new Map(floor.designs.map((design) => [design.id, design])),
    routes: new Map(floor.routes.map((route) => [route.id, toRoute(route)])),
  };
}

export function toFloorShop(shop: ApiFloor['shop']): FloorShop {
  return {
    zone: shop.zone,
    stations: shop.stations.map(({ key, name, unit, capacity }) => ({ key, name, unit, capacity })),
    clamps: shop.clamps.map(({ key, length, count }): ClampClass => ({
      key,
      length: BigInt(length),
      count,
    })),
  };
}

/** Null when the batch's route or design is not among those read: the Floor has to be read again. */
export function toBoardBatch(batch: ApiBatch, around: FloorSurroundings): BoardBatch | null {
  const design = around.designs.get(batch.designId);
  const route = around.routes.get(batch.routeId);
  if (!design || !route) return null;
  return {
    floor: toFloorBatch(batch, needsOf(design), route),
    design,
    forecast: batch.forecast,
    undo: batch.undo,
  };
}

export function toFloorBatch(batch: ApiBatch, needs: PieceNeeds, route: Route): FloorBatch {
  return {
    id: batch.id,
    code: batch.code,
    version: batch.version,
    boards: batch.boards,
    needs,
    route,
    dueDate: batch.dueDate,
    shipBy: batch.shipBy,
    releasedAt: instant(batch.releasedAt),
    shippedAt: instant(batch.shippedAt),
    assignedTo: batch.assignedTo,
    runs: batch.runs.map((run): StepRun => ({
      step: run.step,
      piece: run.piece,
      startedAt: instant(run.startedAt),
      startedBy: run.startedBy,
      finishedAt: instant(run.finishedAt),
      finishedBy: run.finishedBy,
      cutAt: instant(run.cutAt),
      cutBy: run.cutBy,
    })),
    occupations: batch.occupations.map((held): Occupation => ({
      resource: held.resource,
      isClamps: held.isClamps,
      amount: held.amount,
      step: held.step,
      piece: held.piece,
      since: parseInstant(held.since),
      until: null,
    })),
    overrides: batch.overrides.map(({ id, step, piece, by, at, reason }): Override => ({
      id,
      step,
      piece,
      by,
      at: parseInstant(at),
      reason,
    })),
  };
}

export function needsOf(design: ApiDesign): PieceNeeds {
  const clamps = ({ count, length }: ApiDesign['panelClamps']) => ({
    count,
    length: BigInt(length),
  });
  return {
    panelCount: design.panelCount,
    panelBoards: design.panelBoards,
    blocksPerBoard: design.blocksPerBoard,
    panelClamps: clamps(design.panelClamps),
    blockClamps: clamps(design.blockClamps),
  };
}

export function toRoute(route: ApiRoute): Route {
  return { id: route.id, steps: route.steps.map(toStep) };
}

function toStep(step: ApiStep): RouteStep {
  const { key, name, scope } = step;
  const { stage } = step;
  if (stage === 'QUEUED' || stage === 'READY' || stage === 'SHIPPED') {
    throw new RangeError(`The step ${key} stands in no stage.`);
  }
  if (step.kind === 'WORK') {
    return {
      kind: 'WORK',
      key,
      stage,
      name,
      scope,
      verb: step.verb,
      setupMinutes: step.setupMinutes,
      pieceMinutes: step.pieceMinutes,
      pausable: step.pausable,
      people: step.people,
      skill: step.skill,
      station: step.station,
      takes: step.takes,
      caution: step.caution as CautionCode | null,
    };
  }
  if (step.hold === null || step.after === null) {
    throw new RangeError(`The wait ${key} does not say what it waits for.`);
  }
  return {
    kind: 'WAIT',
    key,
    stage,
    name,
    scope,
    hold: step.hold,
    after: step.after,
    minMinutes: step.minMinutes,
    maxMinutes: step.maxMinutes,
    source: step.source ?? 'the shop',
    referenceTenthsC: step.referenceTenthsC,
  };
}

function instant(iso: string | null): number | null {
  return iso === null ? null : parseInstant(iso);
}
