import { setTimeout as pause } from 'node:timers/promises';
import { GraphQLError } from 'graphql';
import type { Resolvers, FloorChange } from '#server/generated/schema';
import { globalId } from '#server/http/global-id';
import type { Context } from '#server/http/context';
import { fromCursor, toCursor } from './cursor';
import { endable } from './endable';
import type { ShopMessage } from './project';

const HEARTBEAT_MS = 10_000;

export const liveResolvers: Resolvers = {
  Subscription: {
    heartbeat: {
      subscribe: (_source, _args, context: Context) => beats(context),
      resolve: (beat: { heartbeat: string }) => beat.heartbeat,
    },
    floorChanges: {
      subscribe: (_source, { after }, context: Context) => {
        const seq = after == null ? null : fromCursor(after);
        if (after != null && seq === null) {
          throw new GraphQLError(
            'This is not a place in the stream: hand cursors back as they came.',
            {
              extensions: { code: 'BAD_USER_INPUT' },
            },
          );
        }
        const shopId = context.principal?.shopId ?? '';
        return context.services.hub.follow(shopId, seq) as AsyncGenerator<never>;
      },
      resolve: (message: unknown, _args: unknown, context: Context) =>
        presentMessage(message as ShopMessage, context),
    },
  },
};

function presentMessage(message: ShopMessage, context: Context): FloorChange {
  return {
    cursor: toCursor(message.seq),
    now: message.now.toISOString(),
    reset: message.reset,
    shopChanged: message.shopChanged,
    batches: message.batches,
    by: message.by && globalId('member', message.by),
    watchers: context.services.hub.watchers(message.shopId),
  };
}

interface Beat {
  heartbeat: string;
}

function beats(context: Context): AsyncGenerator<Beat, void, undefined> {
  const ended = new AbortController();
  return endable(beat(context, ended.signal), () => ended.abort());
}

async function* beat(context: Context, ended: AbortSignal): AsyncGenerator<Beat, void, undefined> {
  while (!ended.aborted) {
    yield { heartbeat: context.services.now().toISOString() };
    await pause(HEARTBEAT_MS, undefined, { ref: false, signal: ended }).catch(() => undefined);
  }
}
