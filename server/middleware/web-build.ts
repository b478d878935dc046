import { existsSync } from 'node:fs';
import { resolve, sep } from 'node:path';
import express, { type RequestHandler, Router } from 'express';

const IMMUTABLE = 'public, max-age=31536000, immutable';

/** Expo's export puts a hash into every name below these folders. */
const HASHED = [`${sep}_expo${sep}`, `${sep}assets${sep}`];

/** The built web application: its files, and index.html for every address the router in the page answers. */
export function webBuild(folder: string): RequestHandler {
  const root = resolve(folder);
  const router = Router();
  router.use(
    express.static(root, {
      index: false,
      setHeaders: (res, path) => {
        const hashed = HASHED.some((part) => path.slice(root.length).startsWith(part));
        res.setHeader('Cache-Control', hashed ? IMMUTABLE : 'no-cache');
      },
    }),
  );
  router.get('/{*path}', (req, res, next) => {
    if (!req.accepts('html') || /\.\w+$/.test(req.path)) return next();
    if (!existsSync(resolve(root, 'index.html'))) return next();
    res.sendFile('index.html', { root, headers: { 'Cache-Control': 'no-cache' }, cacheControl: false });
  });
  return router;
}
