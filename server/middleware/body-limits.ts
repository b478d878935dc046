import express, { type RequestHandler, Router } from 'express';

/** Traces of 4,801 frames with a handful of gauges are megabytes; nothing else is. */
const TRACES = '24mb';
const ORDINARY = '2mb';

/** JSON bodies, parsed once. Uploads and chunks have their own readers, behind the check of who sends them. */
export function jsonBodies(): RequestHandler {
  const router = Router();
  router.post('/api/runs/:runId/complete', express.json({ limit: TRACES }));
  router.use('/api', express.json({ limit: ORDINARY }));
  return router;
}

/** A binary body as one Buffer in `req.body`; refused with 413 while it streams. */
export function binaryBody(mostBytes: number): RequestHandler {
  return express.raw({ type: 'application/octet-stream', limit: mostBytes, inflate: false });
}
