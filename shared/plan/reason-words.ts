import { formatLength } from '#shared/length/length';
import type { FloorBatch } from '#shared/floor/model';
import type { RouteStep } from '#shared/route/route';
import type { Instant } from '#shared/time/instant';
import { clockWords, durationWords } from '#shared/time/words';
import { holdWords, pieceName } from '#shared/words/card-words';
import type { ActivityRef, Reason, UnplannedReason } from './model';
import type { PlanInput } from './plan-input';

/** Says why a step does not start earlier, and why a batch has no plan, in the words of one shop. */
export class ReasonWords {
  private readonly batches: ReadonlyMap<string, FloorBatch>;

  constructor(private readonly input: PlanInput) {
    this.batches = new Map(input.batches.map((batch) => [batch.id, batch]));
  }

  /** "Not before Wed 07:40: panel 1 is curing."; null where only now keeps it. */
  reason(batchId: string, reason: Reason): string | null {
    switch (reason.code) {
      case 'NOW':
      case 'STARTED':
        return null;
      case 'PRECEDENCE':
        return this.notBefore(reason.at, `after ${this.within(reason.before)}`);
      case 'WAIT': {
        const piece = this.piece(reason.wait);
        return this.notBefore(reason.at, `${piece || 'it'} is ${holdWords(reason.hold)}`);
      }
      case 'STATION': {
        const station = this.input.shop.stations.find(({ key }) => key === reason.station);
        const name = station?.name ?? reason.station;
        return this.notBefore(reason.at, `the ${name} is taken${this.by(batchId, reason.holders)}`);
      }
      case 'CLAMPS':
        return this.notBefore(reason.at, `the clamps are taken${this.by(batchId, reason.holders)}`);
      case 'PEOPLE': {
        const holders = this.list(batchId, reason.holders);
        const at = holders === '' ? 'at other work' : `at ${holders}`;
        return this.notBefore(reason.at, `whoever does it is ${at}`);
      }
      case 'HOURS':
        return this.notBefore(reason.at, hoursWords(reason.whose));
      case 'MAXIMUM':
        return this.notBefore(reason.at, `${this.within(reason.later)} must follow soon enough`);
    }
  }

  /** Why a batch could not be planned. */
  unplanned(batchId: string, reason: UnplannedReason): string {
    const step = this.stepOf({ batchId, step: reason.step })?.name ?? reason.step;
    switch (reason.code) {
      case 'ROUTE':
        return `The route cannot be followed: ${step} refers to a step that is not there or comes at the wrong place.`;
      case 'SKILL':
        return (
          `${sentence(step)} needs ${people(reason.need)}` +
          `${reason.skill === null ? '' : ` with the skill ${reason.skill}`}; there ${have(reason.have)}.`
        );
      case 'HOURS':
        return reason.pausable
          ? `${sentence(step)} takes ${durationWords(reason.minutes)}, and nobody who can do it works that long.`
          : `${sentence(step)} takes ${durationWords(reason.minutes)} without a break, and no working span is that long.`;
      case 'STATION': {
        const station = this.input.shop.stations.find(({ key }) => key === reason.station);
        return `${sentence(step)} needs ${reason.need} places at the ${station?.name ?? reason.station}; it has ${reason.capacity}.`;
      }
      case 'CLAMPS':
        return (
          `${sentence(step)} needs ${reason.need} clamps of at least ` +
          `${formatLength(reason.length, 'MILLIMETRE')} for one piece; the shop has ${reason.owned}.`
        );
      case 'HELD': {
        const holders = this.list(batchId, reason.holders);
        return `${sentence(step)} has to wait for something that is taken, and no plan gives it back${holders === '' ? '' : `: ${holders}`}.`;
      }
      case 'HORIZON':
        return `No room was found for ${step}.`;
    }
  }

  private notBefore(at: Instant, why: string): string {
    return `Not before ${clockWords(this.input.hours.zone, this.input.now, at)}: ${why}.`;
  }

  private by(batchId: string, holders: readonly ActivityRef[]): string {
    const words = this.list(batchId, holders);
    return words === '' ? '' : ` by ${words}`;
  }

  /** At most two names, then how many more. */
  private list(batchId: string, holders: readonly ActivityRef[]): string {
    const names = [...new Set(holders.map((holder) => this.name(batchId, holder)))];
    const more = names.length - 2;
    return more > 0 ? `${names.slice(0, 2).join(', ')} and ${more} more` : names.join(' and ');
  }

  /** With its batch's code when that is another one. */
  private name(batchId: string, ref: ActivityRef): string {
    const within = this.within(ref);
    if (ref.batchId === batchId) return within;
    return `${this.batches.get(ref.batchId)?.code ?? ''} (${within})`;
  }

  private within(ref: ActivityRef): string {
    const name = this.stepOf(ref)?.name ?? ref.step;
    const piece = this.piece(ref);
    return piece === '' ? name : `${name} of ${piece}`;
  }

  private piece(ref: ActivityRef): string {
    const step = this.stepOf(ref);
    return step ? pieceName(step.scope, ref.piece) : '';
  }

  private stepOf(ref: { batchId: string; step: string }): RouteStep | undefined {
    return this.batches.get(ref.batchId)?.route.steps.find((step) => step.key === ref.step);
  }
}

function hoursWords(whose: 'SHOP' | 'PEOPLE' | 'FIT'): string {
  switch (whose) {
    case 'SHOP':
      return 'the shop is closed until then';
    case 'PEOPLE':
      return 'whoever does it is not at work until then';
    case 'FIT':
      return 'it would not be done in one go before that';
  }
}

function sentence(step: string): string {
  return step.charAt(0).toUpperCase() + step.slice(1);
}

function people(count: number): string {
  return count === 1 ? 'someone' : `${count} people`;
}

function have(count: number): string {
  if (count === 0) return 'is nobody';
  return count === 1 ? 'is only one' : `are only ${count}`;
}
