import type { ApolloServer } from '@apollo/server';
import { expressMiddleware } from '@as-integrations/express5';
import compression from 'compression';
import express, { type ErrorRequestHandler, type Express, type Request } from 'express';
import helmet from 'helmet';
import { migrationsAtHead } from '#server/db/setup';
import { principalOf } from './authenticate';
import { makeContext, type Context } from './context';
import { readSessionCookie, writeSessionCookie } from './cookie';
import { MAX_BYTES } from './limits';
import { isOwnOrigin } from './origin';
import type { Services } from './services';
import { serveWeb } from './web';

/** What the process says of itself to whoever runs it. */
export interface Lifecycle {
  draining: boolean;
}

/** The Express application around a started Apollo server. */
export function makeApp(
  services: Services,
  apollo: ApolloServer<Context>,
  lifecycle: Lifecycle,
): Express {
  const { settings, log } = services;
  const app = express();
  app.disable('x-powered-by');
  // Behind a reverse proxy on the same machine the caller's address is in X-Forwarded-For.
  app.set('trust proxy', 'loopback');
  app.use(securityHeaders(settings.publicUrl));
  app.get('/livez', (_request, response) => {
    response.type('text/plain').send('alive');
  });
  app.get('/readyz', (_request, response) => {
    readiness(services, lifecycle).then(
      (ready) =>
        response
          .status(ready ? 200 : 503)
          .type('text/plain')
          .send(ready ? 'ready' : 'not ready'),
      () => response.status(503).type('text/plain').send('not ready'),
    );
  });
  app.use(compression());
  app.use('/graphql', (request, response, next) => {
    if (isOwnOrigin(request, settings)) return next();
    response.status(403).json(errorBody('CROSS_SITE', 'This page may not talk to the shop.'));
  });
  app.use(
    '/graphql',
    express.json({ limit: MAX_BYTES }),
    expressMiddleware(apollo, {
      context: async ({ req, res }) =>
        makeContext(
          services,
          await principalOf(services, {
            session: readSessionCookie(req.headers.cookie, settings),
            authorization: req.headers.authorization ?? null,
          }),
          {
            device: deviceOf(req),
            address: req.ip ?? '',
            setSession: (token) => writeSessionCookie(res, settings, token),
          },
        ),
    }),
  );
  serveWeb(app, settings.webFolder);
  app.use(mapErrors(log));
  return app;
}

/** Whether requests should come here: the database answers, its migrations are this build's, and nobody is leaving. */
async function readiness({ doors }: Services, lifecycle: Lifecycle): Promise<boolean> {
  if (lifecycle.draining) return false;
  await doors.ping();
  return migrationsAtHead(doors);
}

function securityHeaders(publicUrl: string) {
  const secure = publicUrl.startsWith('https:');
  return helmet({
    contentSecurityPolicy: {
      directives: {
        'default-src': ["'self'"],
        'script-src': ["'self'"],
        // Angular adds component styles as style elements.
        'style-src': ["'self'", "'unsafe-inline'"],
        'img-src': ["'self'", 'data:'],
        'connect-src': ["'self'", 'ws:', 'wss:'],
        'object-src': ["'none'"],
        'frame-ancestors': ["'none'"],
        'upgrade-insecure-requests': secure ? [] : null,
      },
    },
    strictTransportSecurity: secure,
    crossOriginOpenerPolicy: secure,
    originAgentCluster: secure,
  });
}

function deviceOf(request: Request): string {
  return (request.headers['user-agent'] ?? 'unknown').slice(0, 200);
}

/** Errors before GraphQL: a body that is too large, or not JSON. Never a stack. */
function mapErrors(log: Services['log']): ErrorRequestHandler {
  return (error: { type?: string; status?: number }, _request, response, next) => {
    if (response.headersSent) {
      next(error);
      return;
    }
    switch (error.type) {
      case 'entity.parse.failed':
        response.status(400).json(errorBody('BAD_REQUEST', 'The body is not JSON.'));
        return;
      case 'entity.too.large':
        response
          .status(413)
          .json(errorBody('TOO_LARGE', `The body is larger than ${MAX_BYTES / 1024} kB.`));
        return;
      default:
        if (error.status !== undefined && error.status < 500) {
          response
            .status(error.status)
            .json(errorBody('BAD_REQUEST', 'The request cannot be read.'));
          return;
        }
        log.error({ error }, 'a request failed');
        response
          .status(500)
          .json(errorBody('INTERNAL_SERVER_ERROR', 'Something went wrong on the server.'));
    }
  };
}

function errorBody(code: string, message: string) {
  return { errors: [{ message, extensions: { code } }] };
}
