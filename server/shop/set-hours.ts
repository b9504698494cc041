import { eq } from 'drizzle-orm';
import { shop } from '#drizzle/tables/shop';
import { hoursSchema } from '#shared/time/hours-schema';
import type { HoursException } from '#shared/time/hours';
import type {
  HoursExceptionInput,
  HourSpanInput,
  MutationSetHoursArgs,
  ShopPayload,
} from '#server/generated/schema';
import type { Context } from '#server/http/context';
import { inputProblems } from '#server/http/problem';
import { changeShop, shopNow } from './change-shop';

/** Sets the shop's weekly hours and all its dated exceptions. */
export async function setHours(
  context: Context,
  { version, weekly, exceptions }: MutationSetHoursArgs,
): Promise<ShopPayload> {
  const parsed = hoursSchema.safeParse({
    weekly: weekly.map(spansOf),
    exceptions: exceptions.map(exceptionOf),
  });
  if (!parsed.success) {
    const problems = inputProblems(parsed).map((each) => ({
      ...each,
      // The schema has the spans as they are stored; the API calls their ends by longer names.
      field: each.field?.replace(/\.(from|to)$/, '.$1Minute') ?? null,
    }));
    return { shop: await shopNow(context), problems };
  }
  const hours = {
    weekly: parsed.data.weekly,
    exceptions: parsed.data.exceptions.map(({ date, spans, reason }): HoursException => ({
      date,
      spans,
      ...(reason && { reason }),
    })),
  };
  return changeShop(context, version, 'HOURS', async (tx, shopId) => {
    await tx.update(shop).set(hours).where(eq(shop.id, shopId));
    return [];
  });
}

function spansOf(spans: readonly HourSpanInput[]) {
  return spans.map(({ fromMinute, toMinute }) => ({ from: fromMinute, to: toMinute }));
}

function exceptionOf({ date, spans, reason }: HoursExceptionInput) {
  return { date, spans: spansOf(spans), reason: reason ?? undefined };
}
