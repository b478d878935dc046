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

/** One solver in a web worker. When the worker itself breaks, the scene it had is opened again in a new one. */
export class SolverClient {
  private worker: Worker;
  private opened: { scene: Scene; patches: Patch[] } | null = null;
  private closed = false;

  constructor(private readonly events: SolverEvents) {
    this.worker = this.start();
  }

  private start(): Worker {
    const worker = new Worker(new URL('../../solver/worker/solver.worker', import.meta.url));
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
    this.worker.terminate();
    if (this.closed) return;
    this.worker = this.start();
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
    this.worker.postMessage(request);
  }

  /** Patches in metres. */
  open(scene: Scene, patches: Patch[]): void {
    this.opened = { scene, patches };
    this.send({ type: 'open', scene, patches });
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
    this.closed = true;
    this.worker.terminate();
  }
}
