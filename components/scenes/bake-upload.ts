import { deflateSync } from 'fflate';
import { z } from 'zod';
import type { SceneDocument } from '../../shared/scene-document';
import { runSchema, type Run, type RunTraces } from '../../shared/wire/runs';
import type { PoseTrace, Ready } from '../../solver/index';
import type { ApiClient } from '../api/client';
import { ApiProblem, NO_CONNECTION } from '../api/problem';
import type { BakeChunk } from '../solver-client/solver-client';

const AGAIN_SECONDS = 3;

/** Starts a run of a saved revision and sends how its coefficients become the surface. */
export async function startRun(
  api: ApiClient,
  sceneId: string,
  revisionId: string,
  document: SceneDocument,
  ready: Ready,
): Promise<Run> {
  if (document.time.kind !== 'motion') throw new Error('Only motion can be baked. Choose motion under Time.');
  const run = await api.post(
    `/api/scenes/${sceneId}/runs`,
    {
      revisionId,
      frames: document.time.frames,
      framesPerSecond: document.time.framesPerSecond,
      provenance: {
        solverVersion: ready.solverVersion,
        kernels: ready.kernels,
        partCount: ready.partCount,
        basis: ready.basis,
        diagonal: ready.report.diagonal,
        materials: document.materials.map((m) => ({
          name: m.name,
          presetId: m.preset?.id ?? null,
          presetVersion: m.preset?.version ?? null,
        })),
      },
    },
    runSchema,
  );
  await api.putBytes(`/api/runs/${run.id}/recipe`, deflateSync(ready.recipe));
  return run;
}

const kept = z.object({ traces: z.array(z.unknown()), state: z.array(z.number()) });

/**
 * Sends the chunks of a bake one after another, each followed by the state a later bake can go on from. While there
 * is no connection it waits and tries again, so nothing is lost; `onWaiting` is told.
 */
export class BakeUpload {
  private queue: Promise<void> = Promise.resolve();
  private traces: PoseTrace[] = [];
  private failed: Error | null = null;
  private stopped = false;

  constructor(
    private readonly api: ApiClient,
    private readonly run: Run,
    private readonly onWaiting: (waiting: boolean) => void,
    private readonly onFault: (message: string) => void,
  ) {}

  add(chunk: BakeChunk): void {
    this.traces.push(...chunk.traces);
    const traces = this.traces.slice();
    this.queue = this.queue.then(async () => {
      if (this.failed || this.stopped) return;
      await this.keepTrying(() =>
        this.api.putBytes(`/api/runs/${this.run.id}/chunks/${chunk.index}`, deflateSync(chunk.bytes)),
      );
      if (chunk.pose <= this.run.frames && !this.failed) {
        const state = new TextEncoder().encode(JSON.stringify({ traces, state: Array.from(chunk.state) }));
        await this.keepTrying(() =>
          this.api.putBytes(`/api/runs/${this.run.id}/checkpoint?frame=${chunk.pose}`, deflateSync(state)),
        );
      }
    });
  }

  /** Waits for everything to arrive, then closes the run. */
  async finish(): Promise<Run> {
    await this.queue;
    if (this.failed) throw this.failed;
    return this.api.post(`/api/runs/${this.run.id}/complete`, { traces: tracesOf(this.traces) }, runSchema);
  }

  stop(): void {
    this.stopped = true;
  }

  /** Where a broken-off bake can go on: the kept state and the traces up to it. */
  async resume(inflate: (bytes: Uint8Array) => Uint8Array): Promise<{ pose: number; state: Float64Array } | null> {
    if (this.run.checkpointFrame === null) return null;
    const { bytes } = await this.api.getBytes(`/api/runs/${this.run.id}/checkpoint`);
    const { traces, state } = kept.parse(JSON.parse(new TextDecoder().decode(inflate(bytes))));
    this.traces = traces as PoseTrace[];
    return { pose: this.run.checkpointFrame, state: Float64Array.from(state) };
  }

  private async keepTrying(send: () => Promise<void>): Promise<void> {
    while (!this.stopped) {
      try {
        await send();
        this.onWaiting(false);
        return;
      } catch (error) {
        if (!(error instanceof ApiProblem) || (error.type !== NO_CONNECTION && error.status < 500)) {
          this.failed = error as Error;
          this.onFault(this.failed.message);
          return;
        }
        this.onWaiting(true);
        await new Promise((resolve) => setTimeout(resolve, AGAIN_SECONDS * 1000));
      }
    }
  }
}

function tracesOf(poses: readonly PoseTrace[]): RunTraces {
  const gauges = poses[0]?.gauges ?? [];
  return {
    gauges: gauges.map(({ id, name }, k) => ({
      id,
      name,
      displacement: poses.map((pose) => pose.gauges[k]!.displacement),
    })),
    energy: poses.map((pose) => pose.energy),
    volumeChange: poses.map((pose) => pose.volumeChange),
    worstCompression: poses.map((pose) => pose.worstCompression),
  };
}
