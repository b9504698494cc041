import { orderSchema } from '#shared/orders/order-schema';
import type { CreateOrderInput } from '../graphql/generated/graphql';
import type { FormProblem } from '../ui/problem-list';

/** What stands in the form. An empty number field gives null. */
export interface TypedOrder {
  readonly customerName: string;
  readonly customerEmail: string;
  readonly dueDate: string;
  readonly lines: readonly { readonly designId: string; readonly count: number | null }[];
}

export type OrderDraft =
  | { readonly input: CreateOrderInput; readonly problems: readonly [] }
  | { readonly input: null; readonly problems: readonly FormProblem[] };

/** What was typed, checked as the server will check it; `today` is the shop's local date. */
export function readOrder(typed: TypedOrder, today: string): OrderDraft {
  const parsed = orderSchema.safeParse({
    customerName: typed.customerName,
    customerEmail: typed.customerEmail,
    clientReference: null,
    dueDate: typed.dueDate,
    lines: typed.lines.map(({ designId, count }) => ({ designId, count: count ?? Number.NaN })),
  });
  const problems: FormProblem[] = (parsed.error?.issues ?? []).map((issue) => ({
    field: issue.path.length > 0 ? issue.path.map(String).join('.') : null,
    sentence: issue.message,
  }));
  if (parsed.success && parsed.data.dueDate < today) {
    problems.push({ field: 'dueDate', sentence: 'That day is over. Choose today or a later day.' });
  }
  if (!parsed.success || problems.length > 0) return { input: null, problems };
  const { customerName, customerEmail, dueDate, lines } = parsed.data;
  return { input: { customerName, customerEmail, dueDate, lines }, problems: [] };
}
