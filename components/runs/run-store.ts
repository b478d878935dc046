import { inflateSync } from 'fflate';
import type { Patch, SurfaceMap } from '../../solver/index';
import type { Run } from '../../shared/wire/runs';
import type { ApiClient } from '../api/client';
import { stageModule } from '../stage/stage-module';

const POSES_PER_CHUNK = 24;

/** The poses of one run as they arrive: the first chunk first, the others in order behind it. */
export class RunPoses {
  private readonly poses = new Map<number, Float64Array>();
  private readonly listeners = new Set<() => void>();
  private stopped = false;
  fault: string | null = null;

  constructor(
    private readonly api: ApiClient,
    readonly run: Run,
  ) {}

  async load(): Promise<void> {
    try {
      for (const { index } of this.run.chunks) {
        if (this.stopped) return;
        const { bytes } = await this.api.getBytes(`/api/runs/${this.run.id}/chunks/${index}`);
        const { decodeChunk } = await stageModule();
        const chunk = decodeChunk(inflateSync(bytes));
        chunk.poses.forEach((pose, k) => this.poses.set(index * POSES_PER_CHUNK + k, pose));
        this.tell();
      }
    } catch (error) {
      this.fault = (error as Error).message;
      this.tell();
    }
  }

  stop(): void {
    this.stopped = true;
  }

  /** The pose of a frame, or the nearest earlier one that has arrived. */
  at(frame: number): Float64Array | null {
    for (let f = Math.max(0, Math.min(this.run.frames, Math.round(frame))); f >= 0; f--) {
      const pose = this.poses.get(f);
      if (pose) return pose;
    }
    return null;
  }

  get arrived(): number {
    return this.poses.size;
  }

  subscribe(listener: () => void): () => void {
    this.listeners.add(listener);
    return () => this.listeners.delete(listener);
  }

  private tell(): void {
    for (const listener of this.listeners) listener();
  }
}

/** The drawn surface of a run, rebuilt from its recipe. */
export async function runSurface(
  api: ApiClient,
  run: Run,
  patches: readonly Patch[],
  unit: number,
): Promise<SurfaceMap> {
  const [{ scalePatch, surfaceFromRecipe }, { bytes }] = await Promise.all([
    stageModule(),
    api.getBytes(`/api/runs/${run.id}/recipe`),
  ]);
  return surfaceFromRecipe(
    patches.map((patch) => scalePatch(patch, unit)),
    inflateSync(bytes),
  );
}
