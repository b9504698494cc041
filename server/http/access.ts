import { defaultFieldResolver, GraphQLError, isObjectType, type GraphQLSchema } from 'graphql';
import type { ApiScope } from '#drizzle/tables/access';
import { may, type Permission } from '#shared/members/permissions';
import type { Context } from './context';
import type { Principal } from './principal';

/** Who may read a field or give a command. Whatever is not named may not. */
export interface Access {
  /** Members with the permission, or ANY member of the shop. */
  members?: Permission | 'ANY';
  /** API clients with the scope. */
  clients?: ApiScope;
  /** Paired screens. */
  screens?: true;
  /** Also whoever is not signed in. */
  anyone?: true;
  /** What the others get: an error, or null as if it were not there. */
  otherwise?: 'NULL';
}

const ANYONE: Access = { anyone: true };
const FLOOR: Access = { members: 'seeFloor', screens: true };
const MOVE: Access = { members: 'moveBatches' };

/**
 * Access field by field: every field of Query, Mutation and Subscription, and those fields of other types that not
 * everyone who reaches the type may read. A test fails when a root field is missing here.
 */
export const ACCESS: Readonly<Record<string, Access>> = {
  'Query.now': ANYONE,
  'Query.viewer': ANYONE,
  'Query.sessions': { members: 'ANY' },
  'Query.members': { members: 'ANY' },
  'Query.shop': { members: 'ANY', screens: true },
  'Query.designs': { members: 'ANY' },
  'Query.batch': { members: 'seeFloor' },
  'Query.batchHistory': { members: 'seeFloor' },
  'Query.floor': FLOOR,
  'Query.unseenOverrides': { members: 'manageShop' },
  'Query.order': { members: 'seeOrders', clients: 'ORDERS_READ' },
  'Query.orders': { members: 'seeOrders', clients: 'ORDERS_READ' },
  'Query.screens': { members: 'pairScreens' },
  'Query.apiKeys': { members: 'manageApi' },
  'Query.plan': { members: 'seePlan', screens: true },

  'Mutation.ping': ANYONE,
  'Mutation.signUp': ANYONE,
  'Mutation.signIn': ANYONE,
  'Mutation.signOut': ANYONE,
  'Mutation.switchShop': { members: 'ANY' },
  'Mutation.endSession': { members: 'ANY' },
  'Mutation.endOtherSessions': { members: 'ANY' },
  'Mutation.setHours': { members: 'manageShop' },
  'Mutation.setClamps': { members: 'manageShop' },
  'Mutation.createDesign': { members: 'editDesigns' },
  'Mutation.createBatch': { members: 'makeBatches' },
  'Mutation.startStep': MOVE,
  'Mutation.finishStep': MOVE,
  'Mutation.moveBatch': MOVE,
  'Mutation.undoCommand': MOVE,
  'Mutation.assignBatch': MOVE,
  'Mutation.seeOverride': { members: 'manageShop' },
  'Mutation.createOrder': { members: 'editOrders' },
  'Mutation.startPairing': ANYONE,
  'Mutation.pollPairing': ANYONE,
  'Mutation.pairScreen': { members: 'pairScreens' },
  'Mutation.revokeScreen': { members: 'pairScreens' },
  'Mutation.createApiKey': { members: 'manageApi' },
  'Mutation.revokeApiKey': { members: 'manageApi' },

  'Subscription.heartbeat': { members: 'ANY', screens: true },
  'Subscription.floorChanges': FLOOR,

  'Order.customer': { members: 'seeCustomers', clients: 'CUSTOMERS_READ', otherwise: 'NULL' },
  'Member.weekly': { members: 'ANY', otherwise: 'NULL' },
};

/** Whether a principal passes. */
export function passes(access: Access, principal: Principal | null): boolean {
  if (access.anyone) return true;
  switch (principal?.kind) {
    case 'member':
      return (
        access.members !== undefined &&
        (access.members === 'ANY' || may(principal.roles, access.members))
      );
    case 'client':
      return access.clients !== undefined && principal.scopes.includes(access.clients);
    case 'screen':
      return access.screens === true;
    case undefined:
      return false;
  }
}

/** Puts the access table in front of the schema's resolvers. */
export function guardSchema(schema: GraphQLSchema): GraphQLSchema {
  for (const [coordinate, access] of Object.entries(ACCESS)) {
    const [typeName = '', fieldName = ''] = coordinate.split('.');
    const type = schema.getType(typeName);
    const field = isObjectType(type) ? type.getFields()[fieldName] : undefined;
    if (!field) throw new Error(`The access table names ${coordinate}, which the schema lacks.`);
    const check = (principal: Principal | null): boolean => {
      if (passes(access, principal)) return true;
      if (access.otherwise === 'NULL') return false;
      throw principal ? forbidden() : unauthenticated();
    };
    const resolve = field.resolve ?? defaultFieldResolver;
    field.resolve = (source, args, context: Context, info) =>
      check(context.principal) ? resolve(source, args, context, info) : null;
    const { subscribe } = field;
    if (subscribe) {
      field.subscribe = (source, args, context: Context, info) => {
        check(context.principal);
        return subscribe(source, args, context, info);
      };
    }
  }
  return schema;
}

export function unauthenticated(): GraphQLError {
  return new GraphQLError('Sign in first.', { extensions: { code: 'UNAUTHENTICATED' } });
}

export function forbidden(): GraphQLError {
  return new GraphQLError(
    'Your role does not include this. An owner of the shop can change that.',
    {
      extensions: { code: 'FORBIDDEN' },
    },
  );
}
