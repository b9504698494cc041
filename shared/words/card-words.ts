import type { NextAction, PieceCount } from '#shared/floor/card';
import type { HoldKind, Place, StepScope } from '#shared/route/route';
import { clockWords, durationWords } from '#shared/time/words';
import type { Instant } from '#shared/time/instant';

/** The name of a place. */
export function placeWords(place: Place): string {
  switch (place) {
    case 'QUEUED':
      return 'Queued';
    case 'BLANK':
      return 'Blank';
    case 'FIRST_GLUE_UP':
      return 'First glue-up';
    case 'SLICE':
      return 'Slice';
    case 'SECOND_GLUE_UP':
      return 'Second glue-up';
    case 'SURFACE':
      return 'Surface';
    case 'SAND':
      return 'Sand';
    case 'FINISH':
      return 'Finish';
    case 'READY':
      return 'Ready to ship';
    case 'SHIPPED':
      return 'Shipped';
  }
}

/** What a hold is called on a card: "in clamps", "curing". */
export function holdWords(kind: HoldKind): string {
  switch (kind) {
    case 'ACCLIMATION':
      return 'acclimating';
    case 'CLAMPED':
      return 'in clamps';
    case 'CURE':
      return 'curing';
    case 'FILLER_CURE':
      return 'filler curing';
    case 'SOAK':
      return 'soaking';
    case 'DWELL':
      return 'between coats';
    case 'FINISH_CURE':
      return 'finish curing';
    case 'FRESHNESS':
      return 'faces fresh';
  }
}

/** "panel 2", "block 3"; empty for the whole batch. */
export function pieceName(scope: StepScope, piece: number): string {
  switch (scope) {
    case 'BATCH':
      return '';
    case 'PANEL':
      return `panel ${piece}`;
    case 'BLOCK':
      return `block ${piece}`;
  }
}

/** "1 in clamps, 2 curing, 1 to glue". */
export function pieceWords(counts: readonly PieceCount[]): string {
  return counts
    .map(({ count, state }) => {
      switch (state.kind) {
        case 'HOLD':
          return `${count} ${holdWords(state.hold)}`;
        case 'WORKING':
          return `${count} in ${state.name}`;
        case 'TODO':
          return `${count} to ${state.verb}`;
      }
    })
    .join(', ');
}

/** A button's words: "Start glue-up, panel 2", "Finish milling", "Wipe by 15:40". */
export function actionWords(action: NextAction, zone: string, now: Instant): string {
  const piece = pieceName(action.step.scope, action.piece);
  const on = piece === '' ? '' : `, ${piece}`;
  if (action.kind === 'START' && action.latestAt !== null) {
    const verb = action.step.verb.charAt(0).toUpperCase() + action.step.verb.slice(1);
    return `${verb} by ${clockWords(zone, now, action.latestAt)}${on}`;
  }
  return `${action.kind === 'START' ? 'Start' : 'Finish'} ${action.step.name}${on}`;
}

/** How a forecast stands to its ship-by date. */
export interface Slack {
  slackMinutes: number | null;
  slackDays: number | null;
}

/** "2 d early", "on the day", "late by 5 h"; empty without a date. Hours and minutes are working time. */
export function slackWords({ slackMinutes, slackDays }: Slack): string {
  if (slackMinutes === null || slackDays === null) return '';
  if (slackMinutes < 0) {
    return slackDays < 0 ? `late by ${-slackDays} d` : `late by ${durationWords(-slackMinutes)}`;
  }
  return slackDays > 0 ? `${slackDays} d early` : 'on the day';
}
