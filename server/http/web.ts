import { existsSync } from 'node:fs';
import path from 'node:path';
import express, { type Express } from 'express';

/** Serves the built web app: hashed files for a year, the page itself always fresh, every other address the page. */
export function serveWeb(app: Express, folder: string): void {
  const page = path.join(folder, 'index.html');
  app.use(
    express.static(folder, {
      index: false,
      setHeaders: (response, file) => {
        const hashed =
          /-[A-Z0-9]{8}\.\w+$/.test(path.basename(file)) ||
          file.includes(`${path.sep}media${path.sep}`);
        response.setHeader(
          'Cache-Control',
          hashed ? 'public, max-age=31536000, immutable' : 'no-cache',
        );
      },
    }),
  );
  app.use((request, response, next) => {
    const wantsPage =
      (request.method === 'GET' || request.method === 'HEAD') &&
      request.accepts('html') !== false &&
      path.extname(request.path) === '';
    if (!wantsPage) return next();
    if (!existsSync(page)) {
      response
        .status(503)
        .type('text/plain')
        .send('The web app is not built yet: run "npm start".');
      return;
    }
    response.setHeader('Cache-Control', 'no-cache');
    // From the folder: a path above it may have names with a dot, which are not served.
    response.sendFile('index.html', { root: folder });
  });
  app.use((_request, response) => {
    response.status(404).type('text/plain').send('There is nothing here.');
  });
}
