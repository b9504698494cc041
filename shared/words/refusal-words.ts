import type { Holder, PieceKind, Refusal } from '#shared/floor/refusal';
import type { HoldKind } from '#shared/route/route';
import type { Instant } from '#shared/time/instant';
import { clockWords, durationWords } from '#shared/time/words';
import { holdWords, pieceName, placeWords } from './card-words';
import { cautionWords } from './caution-words';

/** What a refusal's sentence needs to know of where it is read. */
export interface RefusalContext {
  batchCode: string;
  zone: string;
  now: Instant;
}

/** Why the rules refuse, for a person: the rule, the reason and the way out. */
export function refusalSentence(refusal: Refusal, context: RefusalContext): string {
  const { batchCode, zone, now } = context;
  const clock = (at: Instant) => clockWords(zone, now, at);
  switch (refusal.code) {
    case 'FORBIDDEN':
      switch (refusal.what) {
        case 'MOVE':
          return 'Your role moves no batches. Ask a maker.';
        case 'OVERRIDE':
          return 'Only an owner or a maker may override a hold. Ask one of them, or wait.';
        case 'UNDO':
          return 'Only whoever did it, or a maker, can take it back.';
      }
    // eslint-disable-next-line no-fallthrough -- the switch above returns in every case
    case 'BATCH_GONE':
      return `${batchCode} has left the shop.`;
    case 'ALREADY_THERE':
      return `${batchCode} stands in ${placeWords(refusal.place)} already.`;
    case 'NOT_ON_ROUTE':
      return `The route of ${batchCode} has no ${placeWords(refusal.place).toLowerCase()}.`;
    case 'STEP_UNKNOWN':
      return `The route of ${batchCode} has no work called “${refusal.step}”.`;
    case 'PIECE_UNKNOWN':
      return `${batchCode} has pieces 1 to ${refusal.pieces} for ${refusal.step}; there is no ${refusal.piece}.`;
    case 'PIECES_EMPTY':
      return 'Say which panel or block it is.';
    case 'ALREADY_STARTED':
      return `${subject(refusal, batchCode)}: ${refusal.stepName} is under way already.`;
    case 'ALREADY_FINISHED':
      return `${subject(refusal, batchCode)}: ${refusal.stepName} is done already.`;
    case 'NOT_STARTED':
      return `${subject(refusal, batchCode)}: ${refusal.stepName} was not started. Start it first.`;
    case 'STEP_BEFORE':
      return `${subject(refusal, batchCode)} comes to ${refusal.stepName} after ${refusal.beforeName}. Finish that first.`;
    case 'HOLD_RUNNING':
      return (
        `${subject(refusal, batchCode)} is ${holdWords(refusal.kind)} until ${clock(refusal.clearAt)}. ` +
        needWords(refusal.kind, refusal.minMinutes, refusal.source, refusal.referenceTenthsC)
      );
    case 'HOLD_AHEAD':
      return (
        `${batchCode} has ${refusal.beforeName} before it, and that needs its time afterwards: ` +
        `${durationWords(refusal.minMinutes)} ${holdWords(refusal.kind)}. Do ${refusal.beforeName} first.`
      );
    case 'STATION_FULL':
      return (
        `The ${refusal.station} is full: it takes ${refusal.capacity}, ${refusal.free} free, ${refusal.need} needed.` +
        freeWords(refusal.holder, clock)
      );
    case 'CLAMPS_FULL':
      return refusal.owned < refusal.need
        ? `${batchCode} needs ${refusal.need} clamps long enough; the shop has ${refusal.owned}.`
        : `${batchCode} needs ${refusal.need} clamps long enough; ${refusal.free} are free.` +
            freeWords(refusal.holder, clock);
    case 'IN_THE_FUTURE':
      return 'This is later than now. Say when it happened.';
    case 'TOO_LONG_AGO':
      return `You can say what happened up to ${durationWords(refusal.minutes)} ago. Ask a maker to record it.`;
    case 'BEFORE_THE_FACT_BEFORE':
      return `What comes before it was at ${clock(refusal.earliest)}. It cannot have happened earlier.`;
    case 'REASON_MISSING':
      return refusal.what === 'OVERRIDE'
        ? 'Write why the hold is overridden, in 3 to 500 characters. It stays on the batch.'
        : 'Write why the batch goes back, in 3 to 500 characters.';
    case 'CAUTION_FIRST':
      return `Read this first: ${cautionWords(refusal.caution)}`;
    case 'NOTHING_TO_OVERRIDE':
      return `No hold on ${batchCode} stands in the way. Do it without an override.`;
    case 'SHIPPED_STAYS':
      return `${batchCode} has left the shop and stays there.`;
    case 'UNDO_TOO_LATE':
      return 'Ten minutes have passed. Move it back instead, and say why.';
    case 'UNDO_BUILT_ON':
      return 'Something has been built on it since, so it cannot be taken back. Move the batch instead.';
  }
}

/** "Panel 2 of CT-014", or the batch itself. */
function subject(on: { piece: number; pieceKind: PieceKind }, batchCode: string): string {
  const piece = pieceName(on.pieceKind, on.piece);
  return piece === ''
    ? batchCode
    : `${piece.charAt(0).toUpperCase()}${piece.slice(1)} of ${batchCode}`;
}

function needWords(
  kind: HoldKind,
  minutes: number,
  source: string,
  referenceTenthsC: number | null,
): string {
  const length = durationWords(minutes);
  const at = referenceTenthsC === null ? '' : ` at ${referenceTenthsC / 10} °C`;
  switch (kind) {
    case 'CLAMPED':
    case 'CURE':
      return `The glue (${source}) needs ${length}${at}.`;
    case 'SOAK':
    case 'DWELL':
    case 'FINISH_CURE':
      return `The finish (${source}) needs ${length}${at}.`;
    case 'FILLER_CURE':
      return `The filler needs ${length}.`;
    case 'ACCLIMATION':
      return `The wood needs ${length} in the shop’s air.`;
    case 'FRESHNESS':
      return '';
  }
}

function freeWords(holder: Holder | null, clock: (at: Instant) => string): string {
  if (!holder) return '';
  return holder.freeAt === null
    ? ` ${holder.batchCode} has it.`
    : ` ${holder.batchCode} should give it back first, at about ${clock(holder.freeAt)}.`;
}
