import type { Resolvers } from '#server/generated/schema';
import { createOrder } from './create-order';
import { listOrders, readOrder } from './list-orders';

export const orderResolvers: Resolvers = {
  Query: {
    order: (_source, { code }, context) => readOrder(context, code),
    orders: (_source, { first, after, status }, context) =>
      listOrders(context, { first: first ?? 50, after: after ?? null, status: status ?? null }),
  },
  Mutation: {
    createOrder: (_source, { input }, context) => createOrder(context, input),
  },
};
