import { existsSync } from 'node:fs';
import path from 'node:path';
import express, { type RequestHandler } from 'express';

/** Serves the built client: hashed assets for a year, the page for every other address. */
export function builtClient(folder: string): RequestHandler[] {
  const page = path.resolve(folder, 'index.html');
  if (!existsSync(page))
    throw new Error(`The client is not built: ${page} is missing. Run "npm start", which builds it.`);
  return [
    express.static(folder, {
      index: false,
      setHeaders: (response, file) => {
        const isHashed = file.includes(`${path.sep}assets${path.sep}`);
        response.setHeader('Cache-Control', isHashed ? 'public, max-age=31536000, immutable' : 'no-cache');
      },
    }),
    (request, response, next) => {
      if (request.method !== 'GET' || !request.accepts('html')) return next();
      response.setHeader('Cache-Control', 'no-cache');
      // With a root, a hidden folder above the project does not count as a hidden file.
      response.sendFile('index.html', { root: path.dirname(page) });
    },
  ];
}

/** Vite inside this process: same origin, hot reload, no proxy. Development only. */
export async function developmentClient(): Promise<{ handlers: RequestHandler[]; close(): Promise<void> }> {
  const { createServer } = await import('vite');
  const vite = await createServer({ server: { middlewareMode: true }, appType: 'spa' });
  return { handlers: [vite.middlewares], close: () => vite.close() };
}
