import { hoursSchema } from '#shared/time/hours-schema';
import type { FormProblem } from '../ui/problem-list';
import type { HoursDraft, Span } from './hours-draft';

/** What the server would say of these hours, beside the fields of the form. */
export function checkHours(
  weekly: HoursDraft['weekly'],
  exceptions: HoursDraft['exceptions'],
): FormProblem[] {
  const parsed = hoursSchema.safeParse({
    weekly: weekly.map((spans) => spans.map(fromTo)),
    exceptions: exceptions.map(({ date, spans, reason }) => ({
      date,
      spans: spans.map(fromTo),
      reason: reason ?? undefined,
    })),
  });
  return onForm(
    (parsed.error?.issues ?? []).map((issue) => ({
      field: issue.path.map(String).join('.') || null,
      sentence: issue.message,
    })),
  );
}

/** The schema says `from` and `to` where the API and the form say `fromMinute` and `toMinute`. */
export function onForm(problems: readonly FormProblem[]): FormProblem[] {
  return problems.map(({ field, sentence }) => ({
    sentence,
    field: field?.replace(/\.(from|to)$/, '.$1Minute') ?? null,
  }));
}

function fromTo({ fromMinute, toMinute }: Span): { from: number; to: number } {
  return { from: fromMinute, to: toMinute };
}
