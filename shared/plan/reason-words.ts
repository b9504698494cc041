import { clockWords, durationWords } from '#shared/time/words';
import { holdWords, pieceName } from '#shared/words/card-words';
import type { PlanInput } from './build';
import type { Placement, UnplannedReason } from './model';

/** Why a step does not start earlier, in words; null where nothing but now keeps it. */
export function reasonSentence(placement: Placement, input: PlanInput): string | null {
  const { reason } = placement;
  const zone = input.hours.zone;
  switch (reason.code) {
    case 'NOW':
      return null;
    case 'AFTER': {
      const before = nameOf(reason.activity, input);
      return `After ${before}.`;
    }
    case 'WAIT': {
      const wait = stepOf(placement.activity, reason.wait, input);
      const state = wait?.kind === 'WAIT' ? holdWords(wait.hold) : 'waiting';
      return `Not before ${clockWords(zone, input.now, reason.until)}: ${state} until then.`;
    }
    case 'STATION': {
      const station = input.shop.stations.find((candidate) => candidate.key === reason.station);
      return `The ${station?.name ?? reason.station} is taken before.`;
    }
    case 'CLAMPS':
      return 'The clamps are on other pieces before.';
    case 'PEOPLE':
      return 'Whoever can do it is at other work before.';
    case 'HOURS':
      return 'Outside working hours before, or too little time left that day.';
    case 'FRESH':
      return 'Later on purpose, so that what comes after it is not too late.';
  }
}

/** Why a batch could not be planned, and what would help. */
export function unplannedSentence(reason: UnplannedReason): string {
  switch (reason.code) {
    case 'NO_PERSON':
      return reason.skill === null
        ? `${reason.step} needs ${reason.people} people, and the shop has fewer.`
        : `${reason.step} needs ${reason.people} with the skill ${reason.skill}. Nobody, or too few, have it.`;
    case 'NO_SPAN':
      return `${reason.step} takes ${durationWords(reason.minutes)} in one go, and no working hours are that long.`;
    case 'TOO_FEW_CLAMPS':
      return `${reason.step} needs ${reason.needed} clamps long enough; the shop has ${reason.owned}.`;
    case 'STATION_TOO_SMALL':
      return `${reason.step} needs ${reason.needed} places of the ${reason.station}; it has ${reason.capacity}.`;
  }
}

function stepOf(activity: string, key: string, input: PlanInput) {
  const batch = input.batches.find((candidate) => activity.startsWith(`${candidate.id}/`));
  return batch?.route.steps.find((step) => step.key === key);
}

function nameOf(activity: string, input: PlanInput): string {
  const [, key = '', piece = '0'] = activity.split('/');
  const step = stepOf(activity, key, input);
  const on = step ? pieceName(step.scope, Number(piece)) : '';
  return `${step?.name ?? key}${on === '' ? '' : `, ${on}`}`;
}
