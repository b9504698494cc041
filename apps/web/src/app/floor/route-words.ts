import type { RouteStep } from '#shared/route/route';
import { durationWords } from '#shared/time/words';

/** The standard time of a step of work, or the length of a wait. */
export function standardWords(step: RouteStep): string {
  if (step.kind === 'WAIT') {
    const least = step.minMinutes > 0 ? [`at least ${durationWords(step.minMinutes)}`] : [];
    const most =
      step.maxMinutes === null ? [] : [`the next step within ${durationWords(step.maxMinutes)}`];
    return [...least, ...most].join(', ') || 'no time of its own';
  }
  const each = { BATCH: 'a board', PANEL: 'a panel', BLOCK: 'a block' }[step.scope];
  const parts = [
    ...(step.setupMinutes > 0 ? [`${durationWords(step.setupMinutes)} set-up`] : []),
    ...(step.pieceMinutes > 0 ? [`${durationWords(step.pieceMinutes)} ${each}`] : []),
  ];
  return parts.join(' + ') || 'no standard time';
}

/** Whose figure a wait is: "D3 white glue at 20 °C, default figures: data sheet first". Empty for work. */
export function sourceWords(
  step: RouteStep,
  profiles: readonly { readonly name: string; readonly isDefault: boolean }[],
): string {
  if (step.kind === 'WORK') return '';
  const at = step.referenceTenthsC === null ? '' : ` at ${step.referenceTenthsC / 10} °C`;
  const isDefault = profiles.some((profile) => profile.name === step.source && profile.isDefault);
  return `${step.source}${at}${isDefault ? ', default figures: data sheet first' : ''}`;
}
