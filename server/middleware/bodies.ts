import express, { type RequestHandler } from 'express';
import { plainStrings } from '../plain-text';

/** Traces of 4,801 frames with a handful of gauges are megabytes; nothing else is. */
const TRACES = '24mb';
const ORDINARY = '2mb';

/** A JSON body; refused with 413 while it streams. Routes put it behind the check of who sends it. */
export const jsonBody: RequestHandler = express.json({ limit: ORDINARY, reviver: plainStrings });
export const tracesBody: RequestHandler = express.json({ limit: TRACES, reviver: plainStrings });

/** A binary body as one Buffer in `req.body`. */
export function binaryBody(mostBytes: number): RequestHandler {
  return express.raw({ type: 'application/octet-stream', limit: mostBytes, inflate: false });
}
