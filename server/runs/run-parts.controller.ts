import type { Request, RequestHandler, Response } from 'express';
import { z } from 'zod';
import { sha256Schema } from '../../shared/wire/common';
import { actorOf } from '../middleware/authenticate';
import { parseQuery, pathId } from '../middleware/parse';
import { InvalidRequest, NotFound } from '../problems/domain-errors';
import type { Kept, RunPartsService, Sent } from './run-parts.service';

const HASH_HEADER = 'X-Content-SHA256';
const checkpointQuerySchema = z.object({ frame: z.coerce.number().int().min(0) });

const runId = (req: Request) => pathId(req, 'runId', 'run');

function chunkIndex(req: Request): number {
  const text = String(req.params.index);
  if (!/^\d{1,6}$/.test(text)) throw new NotFound('chunk');
  return Number(text);
}

function sent(req: Request): Sent {
  const bytes: unknown = req.body;
  if (!Buffer.isBuffer(bytes) || bytes.length === 0)
    throw new InvalidRequest('Send bytes, as application/octet-stream.');
  const sha256 = sha256Schema.safeParse(req.get(HASH_HEADER)?.toLowerCase());
  if (!sha256.success)
    throw new InvalidRequest(`Send the SHA-256 of the bytes in the header ${HASH_HEADER}, as 64 hex digits.`);
  return { bytes, sha256: sha256.data };
}

/** Caches may keep the bytes but must ask every time, so that nobody reads on after being signed out. */
async function give(req: Request, res: Response, { sha256, read }: Kept): Promise<void> {
  res.set({ ETag: `"${sha256}"`, [HASH_HEADER]: sha256, 'Cache-Control': 'private, no-cache' });
  if (req.fresh) {
    res.status(304).end();
    return;
  }
  res.type('application/octet-stream').send(await read());
}

/** The bytes of a run. */
export class RunPartsController {
  constructor(private readonly parts: RunPartsService) {}

  putChunk: RequestHandler = async (req, res) => {
    await this.parts.putChunk(actorOf(res), runId(req), chunkIndex(req), sent(req));
    res.status(204).end();
  };

  putRecipe: RequestHandler = async (req, res) => {
    await this.parts.putRecipe(actorOf(res), runId(req), sent(req));
    res.status(204).end();
  };

  putCheckpoint: RequestHandler = async (req, res) => {
    const { frame } = parseQuery(checkpointQuerySchema, req);
    await this.parts.putCheckpoint(actorOf(res), runId(req), frame, sent(req));
    res.status(204).end();
  };

  chunk: RequestHandler = async (req, res) => {
    await give(req, res, await this.parts.chunk(actorOf(res), runId(req), chunkIndex(req)));
  };

  recipe: RequestHandler = async (req, res) => {
    await give(req, res, await this.parts.recipe(actorOf(res), runId(req)));
  };

  checkpoint: RequestHandler = async (req, res) => {
    const { frame, ...kept } = await this.parts.checkpoint(actorOf(res), runId(req));
    res.set('X-Frame', String(frame));
    await give(req, res, kept);
  };
}
