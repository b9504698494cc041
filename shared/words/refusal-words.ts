import { MAKER_BACKDATE_MINUTES } from '#shared/floor/happened';
import type { PieceKind, Refusal } from '#shared/floor/refusal';
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
      return `${batchCode} has ${refusal.pieces === 1 ? '1 piece' : `${refusal.pieces} pieces`} for ${refusal.step}, and none with the number ${refusal.piece}.`;
    case 'PIECES_EMPTY':
      return 'Say which panel or block it is.';
    case 'ALREADY_STARTED':
      return `${subject(refusal, batchCode)}: ${refusal.stepName} is under way already.`;
    case 'ALREADY_FINISHED':
      return `${subject(refusal, batchCode)}: ${refusal.stepName} is done already.`;
    case 'NOT_STARTED':
      return `${subject(refusal, batchCode)}: ${refusal.stepName} was not started. Start it first.`;
    case 'STEP_BEFORE':
      return stepBefore(refusal, batchCode);
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
      return stationFull(refusal, batchCode) + freeWords(refusal, context);
    case 'CLAMPS_FULL':
      return clampsFull(refusal, batchCode) + freeWords(refusal, context);
    case 'IN_THE_FUTURE':
      return 'This is later than now. Say when it happened.';
    case 'TOO_LONG_AGO':
      return refusal.minutes < MAKER_BACKDATE_MINUTES
        ? `You can say what happened up to ${durationWords(refusal.minutes)} ago. Ask a maker to record it.`
        : `You can say what happened up to ${durationWords(refusal.minutes)} ago. Say it as of then.`;
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
  return piece === '' ? batchCode : `${capital(piece)} of ${batchCode}`;
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

/** "Slicing comes after flattening of panel 2 of CT-014." */
function stepBefore(refusal: Extract<Refusal, { code: 'STEP_BEFORE' }>, batchCode: string): string {
  const { stepName, beforeName } = refusal;
  const piece = pieceName(refusal.pieceKind, refusal.piece);
  const of = piece === '' ? batchCode : `${piece} of ${batchCode}`;
  // Both glue-ups have one name.
  const what = stepName === beforeName ? 'The next' : capital(stepName);
  return `${what} comes after ${beforeName} of ${of}. Finish that first.`;
}

function stationFull(
  refusal: Extract<Refusal, { code: 'STATION_FULL' }>,
  batchCode: string,
): string {
  const { station, capacity, need, free } = refusal;
  if (need > capacity) {
    return `The ${station} takes ${capacity} at once, and ${batchCode} needs ${need}. Start fewer at once, or make more room.`;
  }
  if (free === 0) return `The ${station} is full (${capacity} of ${capacity}).`;
  return `The ${station} has room for ${free} more, and ${batchCode} needs ${need}.`;
}

function clampsFull(refusal: Extract<Refusal, { code: 'CLAMPS_FULL' }>, batchCode: string): string {
  const { need, free, owned } = refusal;
  const needs = `${batchCode} needs ${need} clamps that are long enough`;
  if (owned < need) {
    return `${needs}, and the shop has ${owned}. Start fewer pieces at once, or add clamps.`;
  }
  return `${needs}, and ${free === 0 ? 'none is' : free === 1 ? '1 is' : `${free} are`} free.`;
}

/** Who gives room first; nothing where no waiting would help. */
function freeWords(
  refusal: Extract<Refusal, { code: 'STATION_FULL' | 'CLAMPS_FULL' }>,
  { zone, now }: RefusalContext,
): string {
  const most = refusal.code === 'STATION_FULL' ? refusal.capacity : refusal.owned;
  const { holder } = refusal;
  if (!holder || refusal.need > most) return '';
  const { batchCode, freeAt } = holder;
  const them = refusal.code === 'STATION_FULL' ? 'it' : 'some';
  if (freeAt === null) return ` ${batchCode} has ${them}.`;
  const at = clockWords(zone, now, freeAt);
  return freeAt <= now
    ? ` ${batchCode} had ${them} until ${at}.`
    : ` ${batchCode} should free ${them} first, at ${at} at the earliest.`;
}

function capital(text: string): string {
  return `${text.charAt(0).toUpperCase()}${text.slice(1)}`;
}
