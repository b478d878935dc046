import type { LiveFrame, Patch, PoseTrace, Ready, Request, Response } from '../../solver/index';
import type { Scene, Vec3 } from '../../solver/index';

export interface BakeChunk {
  index: number;
  bytes: Uint8Array;
  traces: PoseTrace[];
  /** the pose that comes after the chunk's last */
  pose: number;
  state: Float64Array;
}

export interface SolverEvents {
  onProgress?: (stage: string, share: number) => void;
  onReady?: (ready: Ready, frame: LiveFrame, remark: string | null) => void;
  onFrame?: (frame: LiveFrame) => void;
  onPaused?: () => void;
  onError?: (message: string, during: 'open' | 'scene' | 'live' | 'bake') => void;
  onChunk?: (chunk: BakeChunk) => void;
  onBakeProgress?: (progress: { pose: number; poses: number; coefficients: Float64Array; secondsLeft: number }) => void;
  onBaked?: () => void;
  onBakeStopped?: (pose: number) => void;
}

/** A scene and the body it moves: patches in metres, named by the model and its unit. */
export interface OpenScene {
  body: string;
  scene: Scene;
  patches: Patch[];
}

/** Names the patches of a document in metres. */
export function bodyName({ geometry, unit }: Scene): string {
  return JSON.stringify([geometry, unit]);
}

/** A body set up ahead waits this long for its scene after the screen that asked for it was left. */
const PATIENCE_MILLISECONDS = 20_000;

/** `body` null: the worker has started and waits for one. */
let ahead: { body: string | null; worker: Worker } | null = null;
let leaving: ReturnType<typeof setTimeout> | undefined;

/**
 * Starts a worker, and sets a body up in it while a person still reads about it (null: it is not known yet). The next
 * SolverClient that opens the same body takes the worker over. Returns what to call when the screen is left.
 */
export function prepareAhead(open: OpenScene | null): () => void {
  clearTimeout(leaving);
  if (ahead && ahead.body !== null && ahead.body !== open?.body) dropAhead();
  if (!ahead) {
    const worker = newWorker();
    // A fault shows when the scene is opened.
    worker.onerror = (event) => event.preventDefault();
    ahead = { body: null, worker };
  }
  if (open && ahead.body === null) {
    ahead.worker.postMessage({ type: 'prepare-ahead', ...open } satisfies Request);
    ahead.body = open.body;
  }
  return () => {
    leaving = setTimeout(dropAhead, PATIENCE_MILLISECONDS);
  };
}

function dropAhead(): void {
  ahead?.worker.terminate();
  ahead = null;
}

function newWorker(): Worker {
  return new Worker(new URL('../../solver/worker/solver.worker', import.meta.url));
}

function takeAhead(body: string): Worker | null {
  if (ahead?.body !== body) return null;
  const { worker } = ahead;
  ahead = null;
  return worker;
}

/** One solver in a web worker. When the worker itself breaks, the scene it had is opened again in a new one. */
export class SolverClient {
  private worker: Worker | null = null;
  private opened: OpenScene | null = null;

  constructor(private readonly events: SolverEvents) {}

  private start(worker: Worker): Worker {
    worker.onmessage = ({ data }: MessageEvent<Response>) => this.take(data);
    worker.onerror = (event) => {
      event.preventDefault();
      this.events.onError?.(
        'The solver broke off and was started again. The scene is kept and stands at rest.',
        'live',
      );
      this.restart();
    };
    return worker;
  }

  private restart(): void {
    this.worker?.terminate();
    this.worker = this.start(newWorker());
    if (this.opened) this.send({ type: 'open', ...this.opened });
  }

  private take(response: Response): void {
    const { events } = this;
    switch (response.type) {
      case 'progress':
        return events.onProgress?.(response.stage, response.share);
      case 'ready':
        return events.onReady?.(response.ready, response.frame, response.remark);
      case 'frame':
        return events.onFrame?.(response.frame);
      case 'paused':
        return events.onPaused?.();
      case 'chunk':
        return events.onChunk?.(response);
      case 'bake-progress':
        return events.onBakeProgress?.(response);
      case 'baked':
        return events.onBaked?.();
      case 'bake-stopped':
        return events.onBakeStopped?.(response.pose);
      case 'error':
        return events.onError?.(response.message, response.during);
    }
  }

  private send(request: Request): void {
    this.worker?.postMessage(request);
  }

  open(open: OpenScene): void {
    this.worker?.terminate();
    this.worker = this.start(takeAhead(open.body) ?? newWorker());
    this.opened = open;
    this.send({ type: 'open', ...open });
  }

  setScene(scene: Scene): void {
    if (this.opened) this.opened.scene = scene;
    this.send({ type: 'scene', scene });
  }

  play(speed: 'slow' | 'real-time' | 'flat-out'): void {
    this.send({ type: 'play', speed });
  }

  pause(): void {
    this.send({ type: 'pause' });
  }

  step(): void {
    this.send({ type: 'step' });
  }

  rest(): void {
    this.send({ type: 'rest' });
  }

  pull(pull: { rest: Vec3; target: Vec3 } | null): void {
    this.send({ type: 'pull', pull });
  }

  bake(from: { pose: number; state: Float64Array } | null): void {
    this.send({ type: 'bake', from });
  }

  stopBake(): void {
    this.send({ type: 'stop-bake' });
  }

  close(): void {
    this.worker?.terminate();
    this.worker = null;
    this.opened = null;
  }
}
